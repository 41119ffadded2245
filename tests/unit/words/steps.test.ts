import { describe, expect, it } from 'vitest'
import { actKinds, doubtCauses, holds, milestoneNames, stepKinds, stepStatuses } from '#shared/terms'
import { studioZone } from '#shared/time'
import { stepStates } from '#shared/verdict/begin'
import { aboutText, beginReason, lateWhy, momentReason, momentText, stepStateText } from '#shared/words/moments'
import { stepKindWords } from '#shared/words/step-kinds'
import { actKeys, actText, lowerFirst, milestoneText, nameless, stepAct, stepLabel, stepNoun, takenBack, timeKeys, titled } from '#shared/words/steps'
import type { BeginReason } from '#shared/verdict/begin'
import type { NextMoment } from '#shared/verdict/next'
import { hour, minute } from '../verdict/facts'

const zone = studioZone('UTC')
const clock = { now: hour(13.5), zone }
const start = (some: number, all: number, at = hour(14) + 35 * minute): NextMoment => ({ kind: 'start by', stepId: 1, at, what: 'Second varnish', stepKind: 'coat', shutsAt: hour(15) + 5 * minute, pieces: { some, all } })

describe('next moments in words', () => {
  it('says the last moment to start, and the window only as its reason', () => {
    expect(momentText(start(2, 2), clock)).toBe('start “Second varnish” by 14:35 to do both')
    expect(momentText(start(12, 12), clock)).toBe('start “Second varnish” by 14:35 to do all 12')
    expect(momentText(start(4, 12), clock)).toBe('start “Second varnish” by 14:35 to do 4 of 12')
    expect(momentText(start(1, 2), clock)).toBe('start “Second varnish” by 14:35 to do one of 2')
    expect(momentText(start(1, 1), clock)).toBe('start “Second varnish” by 14:35')
    expect(momentText(start(2, 2), { ...clock, now: hour(15) })).toBe('late: “Second varnish” was to start by 14:35 to do both')
    expect(momentReason(start(1, 1), clock)).toBe('the window shuts at 15:05')
    expect(momentReason(start(1, 1), { ...clock, now: hour(16) })).toBe('the window shut at 15:05')
  })

  it('says whose window it names where several are started together', () => {
    const at = hour(15) + 5 * minute
    expect(momentReason(start(12, 12), clock)).toBe('this one’s window shuts at 15:05')
    expect(momentReason(start(12, 12), clock, [at, at, at])).toBe('the window shuts at 15:05')
    expect(momentReason(start(12, 12), clock, [at, at + 25 * minute])).toBe('the first window shuts at 15:05')
    expect(momentReason(start(4, 12), { ...clock, now: hour(15.25) }, [at, at + 25 * minute])).toBe('the first window shut at 15:05')
  })

  it('says what may begin, now or from when', () => {
    const sanding = { kind: 'may begin' as const, stepId: 1, at: hour(13) + 55 * minute, what: 'Sanding', stepKind: 'light sanding' as const, plannedAt: null }
    expect(momentText({ ...sanding, open: false }, clock)).toBe('sand lightly from 13:55')
    expect(momentText({ ...sanding, open: true }, clock)).toBe('sand lightly')
    // What the plan has for later is told beside what may begin already; within five minutes it is now.
    expect(momentText({ ...sanding, open: true, plannedAt: hour(14) + 42 * minute }, clock)).toBe('sand lightly from now, planned 14:40')
    expect(momentText({ ...sanding, open: true, plannedAt: hour(13.5) + 4 * minute }, clock)).toBe('sand lightly')
    expect([aboutText({ ...sanding, open: false }, clock), aboutText({ ...sanding, open: true }, clock), aboutText(start(2, 2), clock)]).toEqual(['from 13:55', 'from now', 'start by 14:35 to do both'])
    expect(momentReason({ ...sanding, open: true }, clock)).toBeNull()
  })

  it('says what the verdict gets better to, and checks', () => {
    expect(momentText({ kind: 'better', at: hour(14), what: 'hold by', grip: 'back' }, clock)).toBe('hold by the back from 14:00')
    expect(momentText({ kind: 'check', stepId: 1, at: hour(14), what: 'Change the blotters', out: null, due: false }, clock)).toBe('change the blotters at 14:00')
    expect(momentText({ kind: 'check', stepId: 1, at: hour(12), what: 'Change the blotters', out: null, due: true }, clock)).toBe('change the blotters now')
    // A taking out is never told too early: 13:02 reads as 13:05 where a check would read as 13:00.
    expect(momentText({ kind: 'check', stepId: 1, at: hour(13) + 2 * minute, what: 'Glue up', out: 'clamps', due: false }, clock)).toBe('take out of clamps from 13:05')
    expect(momentText({ kind: 'check', stepId: 1, at: hour(12), what: 'Glue up', out: 'weight', due: true }, clock)).toBe('take out from under the weight')
  })
})

const step = 'Gesso'
const reasons: BeginReason[] = [
  { code: 'may begin' }, { code: 'waits for', step }, { code: 'unknown film', step }, { code: 'window to come', step }, { code: 'window shut', step }, { code: 'keep out', room: 'Spray room' },
  { code: 'no promise', step, reason: null }, { code: 'no promise', step, reason: 'too-damp' },
  ...stepStatuses.map(status => ({ code: 'not waiting' as const, status })), ...doubtCauses.map(cause => ({ code: 'doubt' as const, cause })),
  ...holds.map(hold => ({ code: 'held' as const, step, hold })), ...milestoneNames.map(milestone => ({ code: 'drying' as const, step, milestone })),
  ...stepKinds.map(kind => ({ code: 'role' as const, kind })),
]

describe('steps in words', () => {
  it('says what a step waits for', () => {
    expect(beginReason({ code: 'drying', step, milestone: 'dry-to-sand-lightly' })).toBe('waits until “Gesso” is dry to sand lightly')
    expect(beginReason({ code: 'no promise', step, reason: 'too-damp' })).toBe('too damp to promise: only after a touch test')
    expect(stepStateText('waits for', { code: 'waits for', step })).toBe('waits for “Gesso”')
    expect(stepStateText('set aside', null, 'cracked')).toBe('set aside: cracked')
    expect(stepStateText('late', { code: 'window shut', step })).toBe('late: the window after “Gesso” has shut')
    expect(stepStateText('late', { code: 'may begin' })).toBe('late')
    expect(lateWhy(hour(15) + 5 * minute, clock)).toBe('late: the window shuts at 15:05')
  })

  it('keeps a name that is shouted', () => {
    expect([lowerFirst('PVA on the spine'), lowerFirst('Second varnish'), lowerFirst('')]).toEqual(['PVA on the spine', 'second varnish', ''])
    expect([stepAct('light sanding', 'x'), stepNoun('light sanding', 'x'), stepAct('coat', 'Gesso'), stepNoun('bench work', 'Sewing'), stepLabel('bench work', 'Sewing'), titled(''), titled(nameless)]).toEqual(['sand lightly', 'light sanding', 'gesso', '“Sewing”', 'sewing', nameless, nameless])
  })

  it('tells what was done', () => {
    expect(actText('coat on', { step: 'Second varnish' })).toBe('coat on: second varnish')
    expect(actText('coat on', { material: 'Casein paint' })).toBe('coat on: casein paint')
    expect(actText('touch test', { milestone: 'dry-to-handle', reached: false })).toBe('tested: not yet dry to handle')
    expect(actText('touch test', { reached: true })).toBe('tested: dry enough')
    expect(actText('it is out', { hold: 'clamps' })).toBe('out of the clamps')
    expect(actText('moved', { place: 'Shelf B' })).toBe('moved to Shelf B')
    expect(actText('air', { air: 'warm air' })).toBe('warm air on it')
    expect(actText('rags answered', { answer: 'in water can' })).toBe('rags: in the water can')
  })

  it('has words for everything and grants nothing', () => {
    const said = [
      ...reasons.map(beginReason), ...stepStates.map(state => stepStateText(state)), ...milestoneNames.map(milestoneText), takenBack,
      ...actKinds.map(kind => actText(kind)), ...actKinds.map(kind => actText(kind, { step, place: 'Shelf B', reason: 'a run', answer: 'none', hold: 'press', air: 'sun' })),
      ...Object.values(stepKindWords).map(kind => kind.done), ...Object.values(actKeys), ...timeKeys.map(key => key.label),
    ]
    for (const text of said) {
      expect(text).toMatch(/^[^\s].*[^\s.!]$/)
      expect(text).not.toMatch(/safe|!|\bnull\b|undefined|NaN/i)
    }
  })

  it('offers a key for now and for another time', () => {
    expect(timeKeys.map(key => key.minutesAgo)).toEqual([0, 10, 20, 30, 60, null])
    expect(new Set(Object.values(actKeys)).size).toBe(Object.values(actKeys).length)
  })
})
