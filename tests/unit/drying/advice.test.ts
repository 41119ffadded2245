import { describe, expect, it } from 'vitest'
import type { AdviceFacts } from '#shared/words/advice'
import { adviceText, beforeText, presses, whenText } from '#shared/words/advice'
import { startAdviceText } from '#shared/words/advice-start'
import type { CoatCase, RoomAir } from '#shared/drying/types'
import { potLifeAt } from '#shared/drying/pot-life'
import { at, coatAt, hourMs, materialWith, predictIn, read, roomWith, rung, steadyRoom } from '../../helpers/drying'

const start = at('2026-03-10T09:00:00Z')
const codes = (room: RoomAir, over: Partial<CoatCase> = {}, material = materialWith(), now = start) => predictIn(room, material, coatAt(start, over), now).advice.map(a => a.code)

describe('advice from the air', () => {
  it('is silent in good air', () => {
    expect(codes(steadyRoom(20, 0.5, start))).toEqual([])
  })

  it('says when nobody has read the air', () => {
    expect(codes(roomWith())).toEqual(['air-assumed'])
    expect(codes(roomWith({ readings: [read('2026-03-10T12:00:00Z', 20, 0.5)] }))).toEqual(['air-assumed'])
    expect(codes(roomWith({ readings: [read('2026-03-10T12:00:00Z', 20, 0.5)] }), {}, materialWith(), at('2026-03-10T13:00:00Z'))).toEqual([])
  })

  it('holds under 3 degrees from the dew point, now or by a time, and only while it is wet', () => {
    expect(codes(steadyRoom(20, 0.84, start), {}, materialWith({ maxRh: null }))).toContain('dew-margin')
    expect(codes(steadyRoom(20, 0.84, start), {}, materialWith({ maxRh: null }), start + 48 * hourMs)).not.toContain('dew-margin')
    const night = roomWith({ heated: false, nightDropC: 6, readings: [read('2026-03-10T08:00:00Z', 18, 0.7)] })
    const slow = materialWith({ minTempC: null, milestones: [rung('dry-to-handle', 'reaction', 1000, 2000, 4000)] })
    const text = predictIn(night, slow, coatAt(start)).advice.find(a => a.code === 'dew-margin')!.text
    expect(text).toMatch(/^Less than 3 °C above the dew point from (Tue|Wed )?\d\d:\d\d/)
  })

  it('keeps the fan off until tack-free, and not after', () => {
    const ladder = materialWith({ milestones: [rung('tack-free', 'water', 20, 30, 45), rung('dry-to-handle', 'coalescence', 200, 300, 600)] })
    expect(codes(steadyRoom(20, 0.5, start), { airSpeed: 1 }, ladder)).toContain('fan-early')
    expect(codes(steadyRoom(20, 0.5, start), { notes: [{ kind: 'moving', fromAt: start, toAt: null }] }, ladder)).toContain('fan-early')
    expect(codes(steadyRoom(20, 0.5, start), { airSpeed: 1 }, ladder, start + hourMs)).not.toContain('fan-early')
  })

  it('says when a coat is outside what anybody has measured: flood on metal is 2.5 x 1.8', () => {
    expect(codes(steadyRoom(20, 0.5, start), { size: 'flood', ground: 'non-absorbent' })).toContain('outside-measured')
    expect(codes(steadyRoom(20, 0.5, start), { size: 'full', ground: 'non-absorbent' })).not.toContain('outside-measured')
  })

  it('says that sun is on it, and that damp takes the promise away', () => {
    expect(codes(steadyRoom(20, 0.5, start), { notes: [{ kind: 'sun', fromAt: start, toAt: null }] })).toEqual(['forced-drying'])
    expect(codes(steadyRoom(25, 0.86, start))).toContain('too-damp')
  })
})

describe('the night ahead', () => {
  const glue = materialWith({ minTempC: 8.3, milestones: [rung('out-of-clamps', 'joint', 30, 45, 60), rung('full-strength', 'joint', 1440, 1440, 2160)] })
  const atFive = at('2026-03-10T17:00:00Z')
  const advised = (readings: RoomAir['readings'], over: Partial<RoomAir> = {}) => predictIn(roomWith({ heated: false, readings, ...over }), glue, coatAt(atFive), atFive).advice

  it('C16: a clamp put on at five in an unheated shed is told that the night passes the glue\'s minimum', () => {
    // 11 C at five, a drop of 4 by six in the morning: 8.3 C is passed where (1 - cos(pi h / 12)) / 2 = 2.7 / 4, h = 7.4 hours after 18:00.
    const told = advised([read('2026-03-10T17:00:00Z', 11, 0.5)]).find(a => a.code === 'cold-before-strength')
    expect(told?.text).toMatch(/^The room falls under 8.3 °C at Wed 01:2\d, before the joint has its strength/)
    expect(advised([read('2026-03-10T17:00:00Z', 11, 0.5)], { heated: true, nightDropC: 0 }).map(a => a.code)).toEqual([])
    expect(advised([read('2026-03-10T17:00:00Z', 14, 0.5)]).map(a => a.code)).toEqual([])
  })

  it('follows the room\'s own pattern once it has been read on three days', () => {
    // Three nights of 6 degrees below the evening: now 14 C at five is not enough.
    const days = [7, 8, 9].flatMap(day => [['06', 8], ['12', 16], ['17', 14]].map(([hour, tempC]) => read(`2026-03-0${day}T${hour}:00:00Z`, Number(tempC), 0.5)))
    expect(advised([...days, read('2026-03-10T17:00:00Z', 14, 0.5)]).map(a => a.code)).toContain('cold-before-strength')
  })

  it('does not forget the night of a shed that was read on many days, but never at night', () => {
    const byDay = [7, 8, 9].flatMap(day => [['11', 12], ['17', 11]].map(([hour, tempC]) => read(`2026-03-0${day}T${hour}:00:00Z`, Number(tempC), 0.5)))
    expect(advised([...byDay, read('2026-03-10T17:00:00Z', 11, 0.5)]).map(a => a.code)).toContain('cold-before-strength')
    expect(advised([...byDay, read('2026-03-10T17:00:00Z', 11, 0.5)], { heated: true, nightDropC: 0 }).map(a => a.code)).not.toContain('cold-before-strength')
  })

  it('a panel in the yard is to be brought in by a time', () => {
    const slow = materialWith({ minTempC: null, milestones: [rung('dry-to-handle', 'oxidation', 1000, 2000, 4000)] })
    // 14 C at 75 % has its dew point at 9.6 C: 3 degrees above it is 12.6, which a night drop of 6 passes in the evening.
    const yard = roomWith({ heated: false, nightDropC: 6, readings: [read('2026-03-10T17:00:00Z', 14, 0.75)] })
    expect(predictIn(yard, slow, coatAt(atFive), atFive).advice.find(a => a.code === 'dew-margin')?.text).toMatch(/bring it in by then/)
  })
})

describe('what a room would need', () => {
  it('names the warmth that brings the same air under the ceiling, or only drying where no warmth would', () => {
    // 20 C at 88 % holds es(20) x 0.88 = 20.6 hPa; under 85 % it needs es = 24.5 hPa: 21 C.
    const text = (tempC: number, rh: number) => predictIn(steadyRoom(tempC, rh, start), materialWith(), coatAt(start)).advice.find(a => a.code === 'too-damp')?.text
    expect(text(20, 0.88)).toMatch(/warm it to 21 °C/)
    expect(text(27, 0.95)).not.toMatch(/warm it/)
  })

  it('C22: an oil that is covered within two days is told so, and water paint is not', () => {
    const oil = materialWith({ milestones: [rung('dry-to-handle', 'oxidation', 1000, 2000, 4000)] })
    const covered = { notes: [{ kind: 'covered' as const, fromAt: start, toAt: null }] }
    expect(codes(steadyRoom(20, 0.5, start), covered, oil)).toContain('covered-early')
    expect(codes(steadyRoom(20, 0.5, start), covered, oil, start + 49 * hourMs)).not.toContain('covered-early')
    expect(codes(steadyRoom(20, 0.5, start), covered)).not.toContain('covered-early')
  })
})

describe('pot life', () => {
  it('C18: 10.5 min at 22 C is about 5 at 32 C and about 20 at 12 C', () => {
    expect(potLifeAt(10.5, 22, 22)).toBe(10.5)
    expect(potLifeAt(10.5, 22, 32)).toBeCloseTo(5, 0)
    expect(potLifeAt(10.5, 22, 12)).toBeGreaterThan(18)
    expect(potLifeAt(10.5, 22, 12)).toBeLessThan(24.5)
    expect(() => potLifeAt(10, 22, Number.NaN)).toThrow(/tempC/)
  })
})

describe('its sentences', () => {
  const all: AdviceFacts[] = [
    { code: 'air-assumed' }, { code: 'dew-margin', when: null }, { code: 'dew-margin', when: '03:10' }, { code: 'below-minimum-ahead', minTempC: 10, when: '03:10' },
    { code: 'chilled', minTempC: 8.3, when: 'Tue 03:10' }, { code: 'too-damp', ceiling: 0.85, warmC: 23 }, { code: 'cold-before-strength', minTempC: 8.3, when: '23:40' }, { code: 'covered-early', when: 'Thu 09:00' }, { code: 'dry-air', floor: 0.006 }, { code: 'blush', gapC: 8.37, limitC: 11.1, seenHere: false }, { code: 'blush', gapC: 8.37, limitC: 12.6, seenHere: true },
    { code: 'outside-measured', slowness: 4.5 }, { code: 'outside-sheet' }, { code: 'fan-early', when: null }, { code: 'fan-early', when: '10:20' }, { code: 'forced-drying' },
  ]

  it('are one plain sentence or two, each its own', () => {
    const texts = [...all.map(facts => adviceText(facts)), ...all.flatMap(facts => beforeText(facts) ?? [])]
    // The last five that only a film on the piece can have have no sentence before it is on.
    expect(texts).toHaveLength(2 * all.length - 5)
    expect(new Set(texts).size).toBe(texts.length)
    for (const text of texts) {
      expect(text).toMatch(/^[A-Z].*\.$/)
      expect(text).not.toMatch(/!|undefined|NaN|s.?afe/i)
    }
  })

  it('press where the work takes harm, and only there', () => {
    expect(['dew-margin', 'chilled', 'below-minimum-ahead', 'cold-before-strength', 'too-damp', 'over-too-early'].every(presses)).toBe(true)
    expect(['air-assumed', 'blush', 'fan-early', 'pot-life', 'over-better-later'].some(presses)).toBe(false)
  })

  it('carry their numbers', () => {
    expect(adviceText({ code: 'chilled', minTempC: 8.3, when: 'Tue 03:10' })).toContain('8.3 °C from Tue 03:10')
    expect(adviceText({ code: 'dry-air', floor: 0.006 })).toContain('6 g')
    expect(adviceText({ code: 'blush', gapC: 8.37, limitC: 11.1, seenHere: false })).toContain('8.4 °C above its dew point; under 11.1 °C such a film may haze')
    // 8.3 C is 46.94 F, a gap of 3 K is 5.4 F.
    expect(adviceText({ code: 'chilled', minTempC: 8.3, when: 'Tue 03:10' }, 'us')).toContain('47 °F')
    expect(beforeText({ code: 'dew-margin', when: null }, 'us')).toContain('less than 5 °F')
    expect(startAdviceText({ code: 'acclimatise', moisture: 11.84, rest: 7.93, when: 'Mon 09:00' })).toContain('rest at 7.9 % moisture; these are near 11.8 %')
  })

  it('name the weekday of another day: day 0 was a Thursday', () => {
    expect(whenText(0, 190, 0)).toBe('03:10')
    expect(whenText(1, 190, 0)).toBe('Fri 03:10')
  })
})
