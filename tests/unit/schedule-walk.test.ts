import { describe, expect, it } from 'vitest'
import { inGraphOrder, walkSchedule } from '#shared/schedule-walk'
import type { ScheduleLinkWire, ScheduleStepWire } from '#shared/schemas/schedule'

const step = (key: string, over: Partial<ScheduleStepWire> = {}): ScheduleStepWire => ({
  key, name: key, kind: 'coat', material: null, hold: null, dust: 'none', parts: [], on: [], perDay: 1, days: 1, untilEnough: false, setupMin: 5, pieceMin: 10, cleanMin: 5, releaseMin: 0, hands: 1, checks: [], again: null, held: null, dry: null, ...over,
})
const wait = (likelyMin: number | null, giveTillMin = likelyMin) => ({ likelyMin, giveTillMin, promised: true })
const link = (from: string, to: string, over: Partial<ScheduleLinkWire> = {}): ScheduleLinkWire => ({ from, to, milestone: 'ready-to-recoat', risk: 'p90', windowed: false, wait: wait(60, 90), windows: [], ...over })
const round = (minute: number) => minute
const asked = { by: 'likelyMin', pieces: 1, start: 0, opens: round } as const

describe('walking a schedule', () => {
  it('adds work and waits along the longest way', () => {
    // a: 20 min work, 60 wait; b 20, 60; c joins a and b. a -> b -> c: 20 + 60 + 20 + 60 + 20 = 180.
    const steps = [step('a'), step('b'), step('c')]
    const links = [link('a', 'b'), link('b', 'c'), link('a', 'c')]
    expect(walkSchedule({ steps, links }, asked).end).toBe(180)
    // The cautious waits are 90: 20 + 90 + 20 + 90 + 20.
    expect(walkSchedule({ steps, links }, { ...asked, by: 'giveTillMin' }).end).toBe(240)
  })

  it('counts each piece and the drying of the last film', () => {
    // Set-up 5, three pieces 30, clean-up 5, then 45 to be dry to handle.
    expect(walkSchedule({ steps: [step('a', { dry: wait(45) })], links: [] }, { ...asked, pieces: 3 }).end).toBe(85)
  })

  it('waits out a round: between coats of a day by the film, between days at least a night', () => {
    // Two a day on two days, 20 min each: 20 +60 +20 +720 +20 +60 +20.
    expect(walkSchedule({ steps: [step('a', { perDay: 2, days: 2, again: wait(60) })], links: [] }, asked).end).toBe(920)
  })

  it('lets nothing follow clamps before they are off, nor a rest before its last look', () => {
    const glue = step('a', { hold: 'clamps', held: wait(100), releaseMin: 5, checks: [{ name: 'look', afterMin: 30, minutes: 2 }] })
    expect(walkSchedule({ steps: [glue, step('b')], links: [link('a', 'b', { wait: null, milestone: null })] }, asked).starts.get('b')).toBe(125)
  })

  it('has no end where a wait has none', () => {
    const walk = walkSchedule({ steps: [step('a'), step('b')], links: [link('a', 'b', { wait: wait(null) })] }, asked)
    expect(walk).toMatchObject({ end: null })
    expect([...walk.starts.keys()]).toEqual(['a'])
  })

  it('begins inside a window, and notes one that meets no open hours', () => {
    // Open 0..100, then from 1000 on. Work ends at 20; the window is 100..200 after that: 120..220, when nobody is there.
    const opens = (minute: number) => (minute <= 100 || minute >= 1000 ? minute : 1000)
    const links = [link('a', 'b', { windowed: true, windows: [{ opensMin: 100, shutsMin: 200 }] })]
    const walk = walkSchedule({ steps: [step('a'), step('b')], links }, { ...asked, opens })
    expect(walk.missed).toEqual([{ step: 'b', after: 'a', opens: 120, shuts: 220 }])
    expect(walk.starts.get('b')).toBe(1000)
    expect(walkSchedule({ steps: [step('a'), step('b')], links }, asked).missed).toEqual([])
  })

  it('uses a window open from the start before the rung others wait for', () => {
    const links = [link('a', 'b', { windowed: true, windows: [{ opensMin: 0, shutsMin: 30 }, { opensMin: 300, shutsMin: null }] })]
    expect(walkSchedule({ steps: [step('a'), step('b')], links }, asked).starts.get('b')).toBe(20)
    // With hands back only at 60 the early window (20..50) is past and the later one begins at 320.
    expect(walkSchedule({ steps: [step('a'), step('b')], links }, { ...asked, opens: minute => (minute > 0 && minute < 60 ? 60 : minute) }).starts.get('b')).toBe(320)
  })
})

describe('the order of a graph', () => {
  it('puts every step after what it waits for and keeps the rest as given', () => {
    expect(inGraphOrder([{ key: 'c' }, { key: 'a' }, { key: 'b' }], [{ from: 'a', to: 'c' }]).map(each => each.key)).toEqual(['a', 'c', 'b'])
  })
  it('loses no step of a circle', () => {
    expect(inGraphOrder([{ key: 'a' }, { key: 'b' }], [{ from: 'a', to: 'b' }, { from: 'b', to: 'a' }]).map(each => each.key)).toEqual(['a', 'b'])
  })
})
