import { describe, expect, it } from 'vitest'
import type { AdviceFacts } from '#shared/words/advice'
import { adviceText, rateText, whenText } from '#shared/words/advice'
import type { CoatCase, RoomAir } from '#shared/drying/types'
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

describe('its sentences', () => {
  const all: AdviceFacts[] = [
    { code: 'air-assumed' }, { code: 'dew-margin', when: null }, { code: 'dew-margin', when: '03:10' }, { code: 'below-minimum-ahead', minTempC: 10, when: '03:10' },
    { code: 'chilled', minTempC: 8.3, when: 'Tue 03:10' }, { code: 'too-damp', ceiling: 0.85 }, { code: 'dry-air', floor: 0.006 }, { code: 'blush', gapC: 8.37 },
    { code: 'outside-measured', slowness: 4.5 }, { code: 'outside-sheet' }, { code: 'fan-early', when: null }, { code: 'fan-early', when: '10:20' }, { code: 'forced-drying' },
  ]

  it('are one plain sentence or two, each its own', () => {
    const texts = all.map(adviceText)
    expect(new Set(texts).size).toBe(all.length)
    for (const text of texts) {
      expect(text).toMatch(/^[A-Z].*\.$/)
      expect(text).not.toMatch(/!|undefined|NaN|s.?afe/i)
    }
  })

  it('carry their numbers', () => {
    expect(adviceText({ code: 'chilled', minTempC: 8.3, when: 'Tue 03:10' })).toContain('8.3 °C from Tue 03:10')
    expect(adviceText({ code: 'dry-air', floor: 0.006 })).toContain('6 g')
    expect(adviceText({ code: 'blush', gapC: 8.37 })).toContain('8.4 °C')
    expect(rateText({ factor: 0.4123, tempC: -1.04, rh: 0.78 })).toBe('0.41 of sheet speed: 78 % humidity, −1 °C')
  })

  it('name the weekday of another day: day 0 was a Thursday', () => {
    expect(whenText(0, 190, 0)).toBe('03:10')
    expect(whenText(1, 190, 0)).toBe('Fri 03:10')
  })
})
