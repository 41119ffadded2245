import { describe, expect, it } from 'vitest'
import { nextMoment } from '#shared/verdict/next'
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
    const every = { verdict: handled, lastStarts: [all], mayBegins: [{ ...varnish, at: hour(11) }], checks: [{ at: hour(12), what: 'Change the blotters' }] }
    expect(nextMoment(facts(every), hour(9), null)).toMatchObject({ kind: 'may begin', at: hour(11), open: false })
    expect(nextMoment(facts({ ...every, mayBegins: [] }), hour(9), null)).toMatchObject({ kind: 'check', at: hour(12), due: false })
    expect(nextMoment(facts({ ...every, mayBegins: [], checks: [] }), hour(9), null)).toMatchObject({ kind: 'start by', at: hour(13.8), shutsAt: hour(15) })
    expect(nextMoment(facts({ verdict: handled }), hour(9), null)).toEqual({ kind: 'better', at: hour(14), what: 'may be handled', grip: null })
  })

  it('says the last moment to start once the step may begin, never the window\'s end', () => {
    const moment = nextMoment(facts({ lastStarts: [all], mayBegins: [{ ...varnish, at: hour(11) }] }), hour(12), null)
    expect(moment).toMatchObject({ kind: 'start by', at: hour(13.8) })
  })

  it('goes on to the first four when all twelve can no longer be done, and stays late after that', () => {
    const both = facts({ lastStarts: [four, all] })
    expect(nextMoment(both, hour(13.8), null)).toMatchObject({ at: hour(13.8), pieces: { some: 12 } })
    expect(nextMoment(both, hour(13.8) + 1, null)).toMatchObject({ at: hour(14.5), pieces: { some: 4 } })
    expect(nextMoment(both, hour(14.6), null)).toMatchObject({ at: hour(14.5), pieces: { some: 4 } })
    expect(nextMoment(facts({ lastStarts: [all, four] }), hour(14.6), null)).toMatchObject({ at: hour(14.5) })
  })

  it('counts what is past as now, in the order named', () => {
    const sanding = { stepId: 2, stepKind: 'light sanding' as const, what: 'Sanding', at: hour(8) }
    const due = { at: hour(7), what: 'Turn over' }
    expect(nextMoment(facts({ verdict: handled, mayBegins: [sanding], checks: [due] }), hour(9), null)).toMatchObject({ kind: 'may begin', open: true })
    expect(nextMoment(facts({ verdict: handled, checks: [due] }), hour(9), null)).toMatchObject({ kind: 'check', due: true })
    expect(nextMoment(facts({ lastStarts: [{ ...all, at: hour(8) }], mayBegins: [sanding] }), hour(9), null)).toMatchObject({ kind: 'start by' })
  })

  it('opens nothing by the clock of a page cut off', () => {
    const sanding = { stepId: 2, stepKind: 'light sanding' as const, what: 'Sanding', at: hour(9) }
    expect(nextMoment(facts({ mayBegins: [sanding] }), hour(9), hour(9) - 10 * minute)).toMatchObject({ kind: 'may begin', open: false })
  })
})
