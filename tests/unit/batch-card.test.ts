import { describe, expect, it } from 'vitest'
import { cardRows } from '#shared/batch-card'
import type { ScheduleDetailWire, ScheduleStepWire } from '#shared/schemas/schedule'

const wait = (likelyMin: number, giveTillMin: number) => ({ likelyMin, giveTillMin, promised: true })
const step = (key: string, changes: Partial<ScheduleStepWire> = {}): ScheduleStepWire => ({
  key, name: key, kind: 'coat', hold: null, dust: 'none', perDay: 1, days: 1, untilEnough: false, setupMin: 0, pieceMin: 4, cleanMin: 0, releaseMin: 0, hands: 1,
  material: null, parts: [], on: [], checks: [], again: null, held: null, dry: null, ...changes,
})
const schedule = (steps: ScheduleStepWire[], links: ScheduleDetailWire['links']): ScheduleDetailWire => ({
  id: 1, libraryKey: null, name: 'Box', summary: '', no: 1, parts: [], stepCount: steps.length, elapsed: wait(60, 60), setupMin: 0, pieceMin: 0, solventBorne: false, cautions: [], steps, links,
})

describe('the rows of a batch card', () => {
  it('are one for every coat, every look meanwhile and the taking out, each with what to wait', () => {
    const glue = step('Glue-up', { kind: 'glue-up', hold: 'clamps', held: wait(40, 60), checks: [{ name: 'Change the blotters', afterMin: 30, minutes: 3 }] })
    const varnish = step('Varnish', { perDay: 2, again: wait(120, 180), material: { id: 3, name: 'Spirit varnish' } })
    const rows = cardRows({ schedule: schedule([varnish, glue], [{ from: 'Glue-up', to: 'Varnish', milestone: 'dry-to-sand-lightly', risk: 'p90', windowed: false, wait: wait(180, 300), windows: [] }]), stepCautions: { Varnish: ['flames', 'vapour'] } })
    // In the order of the graph: the glue-up first, though it stands second.
    expect(rows.map(row => [row.no, row.what])).toEqual([[1, 'Glue-up'], [null, 'Change the blotters'], [null, 'Take it out'], [2, 'Varnish, 1 of 2'], [null, 'Varnish, 2 of 2']])
    expect(rows[0]?.waits).toEqual(['Begins at once.'])
    expect(rows[1]?.waits).toEqual(['After 30 min: change the blotters, 3 min.'])
    expect(rows[2]?.waits).toEqual(['In clamps: likely 40 min, up to 1 h.'])
    expect(rows[3]?.waits).toEqual(['Until “Glue-up” is dry to sand lightly: likely 3 h, up to 5 h. Goes by give-it-till.', '2 times.'])
    expect(rows[4]?.waits).toEqual(['Between its coats: likely 2 h, up to 3 h.'])
  })

  it('say the cautions at each coat, deferring to the data sheet, and none where there are none', () => {
    const rows = cardRows({ schedule: schedule([step('Lacquer', { perDay: 2 }), step('Pack', { kind: 'packing' })], []), stepCautions: { Lacquer: ['vapour', 'flames'] } })
    expect(rows.map(row => row.cautions)).toEqual(['No flames, no sparks. Exhaust on. Read the data sheet.', 'No flames, no sparks. Exhaust on. Read the data sheet.', null])
  })

  it('are empty ones to fill where a batch has no schedule', () => {
    expect(cardRows({ schedule: null, stepCautions: {} })).toHaveLength(8)
  })
})
