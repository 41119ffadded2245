import { describe, expect, it } from 'vitest'
import { groupMoment, nextMoment } from '#shared/verdict/next'
import type { NextFacts } from '#shared/verdict/next'
import { hour, minute } from './facts'

const never = { betterAt: null, betterKind: null, betterGrip: null }
const facts = (changes: Partial<NextFacts>): NextFacts => ({ verdict: never, lastStarts: [], mayBegins: [], checks: [], ...changes })
const varnish = { stepId: 1, stepKind: 'coat' as const, what: 'Second varnish' }
const all = { ...varnish, at: hour(13.8), shutsAt: hour(15), pieces: { some: 12, all: 12 } }
const four = { ...varnish, at: hour(14.5), shutsAt: hour(15), pieces: { some: 4, all: 12 } }
const handled = { betterAt: hour(14), betterKind: 'may be handled' as const, betterGrip: null }

describe('the next moment of a piece', () => {
  it('is nothing where nothing is to come', () => {
    expect(nextMoment(facts({}), hour(9), null)).toBeNull()
  })

  it('is the first of all that is to come', () => {
    const every = { verdict: handled, lastStarts: [all], mayBegins: [{ ...varnish, at: hour(11), plannedAt: null }], checks: [{ stepId: 3, at: hour(12), what: 'Change the blotters', out: null }] }
    expect(nextMoment(facts(every), hour(9), null)).toMatchObject({ kind: 'may begin', stepId: 1, at: hour(11), open: false })
    expect(nextMoment(facts({ ...every, mayBegins: [] }), hour(9), null)).toMatchObject({ kind: 'check', stepId: 3, at: hour(12), due: false })
    expect(nextMoment(facts({ ...every, mayBegins: [], checks: [] }), hour(9), null)).toMatchObject({ kind: 'start by', stepId: 1, at: hour(13.8), shutsAt: hour(15) })
    expect(nextMoment(facts({ verdict: handled }), hour(9), null)).toEqual({ kind: 'better', at: hour(14), what: 'may be handled', grip: null })
  })

  it('says the last moment to start once the step may begin, never the window\'s end', () => {
    const moment = nextMoment(facts({ lastStarts: [all], mayBegins: [{ ...varnish, at: hour(11), plannedAt: null }] }), hour(12), null)
    expect(moment).toMatchObject({ kind: 'start by', stepId: 1, at: hour(13.8) })
  })

  it('goes on to the first four when all twelve can no longer be done, and stays late after that', () => {
    const both = facts({ lastStarts: [four, all] })
    expect(nextMoment(both, hour(13.8), null)).toMatchObject({ at: hour(13.8), pieces: { some: 12 } })
    expect(nextMoment(both, hour(13.8) + 1, null)).toMatchObject({ at: hour(14.5), pieces: { some: 4 } })
    expect(nextMoment(both, hour(14.6), null)).toMatchObject({ at: hour(14.5), pieces: { some: 4 } })
    expect(nextMoment(facts({ lastStarts: [all, four] }), hour(14.6), null)).toMatchObject({ at: hour(14.5) })
  })

  it('counts what is past as now, in the order named', () => {
    const sanding = { stepId: 2, stepKind: 'light sanding' as const, what: 'Sanding', at: hour(8), plannedAt: null }
    const due = { stepId: 3, at: hour(7), what: 'Turn over', out: null }
    expect(nextMoment(facts({ verdict: handled, mayBegins: [sanding], checks: [due] }), hour(9), null)).toMatchObject({ kind: 'may begin', open: true })
    expect(nextMoment(facts({ verdict: handled, checks: [due] }), hour(9), null)).toMatchObject({ kind: 'check', due: true })
    expect(nextMoment(facts({ lastStarts: [{ ...all, at: hour(8) }], mayBegins: [sanding] }), hour(9), null)).toMatchObject({ kind: 'start by' })
  })

  it('opens nothing by the clock of a page cut off', () => {
    const sanding = { stepId: 2, stepKind: 'light sanding' as const, what: 'Sanding', at: hour(9), plannedAt: null }
    expect(nextMoment(facts({ mayBegins: [sanding] }), hour(9), hour(9) - 10 * minute)).toMatchObject({ kind: 'may begin', open: false })
  })

  it('lets nobody take anything out by the clock of a page cut off, but still asks for a check', () => {
    const out = { stepId: 3, at: hour(9), what: 'Glue up the box', out: 'clamps' as const }
    expect(nextMoment(facts({ checks: [out] }), hour(9), hour(9) - 10 * minute)).toMatchObject({ kind: 'check', due: false })
    expect(nextMoment(facts({ checks: [{ ...out, out: null }] }), hour(9), hour(9) - 10 * minute)).toMatchObject({ kind: 'check', due: true })
  })
})

describe('the one moment of several pieces', () => {
  const start = (at: number) => ({ kind: 'start by' as const, stepId: 1, at, what: 'Second varnish', stepKind: 'coat' as const, shutsAt: null, pieces: null })
  const begin = (at: number) => ({ kind: 'may begin' as const, stepId: 1, at, what: 'Sanding', stepKind: 'light sanding' as const, open: false, plannedAt: null })
  const check = (at: number, out: 'clamps' | null) => ({ kind: 'check' as const, stepId: 1, at, what: 'Change the blotters', out, due: false })

  it('is of last moments at one time the one whose window shuts first', () => {
    const shutting = (shutsAt: number | null) => ({ ...start(hour(11)), shutsAt })
    expect(groupMoment([shutting(null), shutting(hour(14)), shutting(hour(13))])).toEqual(shutting(hour(13)))
  })

  it('is the earliest that hands must keep, and the latest that time has to bring', () => {
    expect(groupMoment([])).toBeNull()
    expect(groupMoment([begin(hour(9)), start(hour(12)), start(hour(11))])).toEqual(start(hour(11)))
    expect(groupMoment([begin(hour(9)), begin(hour(10))])).toEqual(begin(hour(10)))
    expect(groupMoment([check(hour(10), null), check(hour(9), null)])).toEqual(check(hour(9), null))
    expect(groupMoment([check(hour(9), 'clamps'), check(hour(10), 'clamps')])).toEqual(check(hour(10), 'clamps'))
  })
})
