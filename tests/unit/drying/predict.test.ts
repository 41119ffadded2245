import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { CoatCase, CoatPrediction, DryingMaterial, RoomAir, TouchTest } from '#shared/drying/types'
import { coatSizes, drivers, grounds } from '#shared/terms'
import { horizonMs } from '#shared/drying/predict'
import { at, coatAt, dayMs, hourMs, materialWith, minuteMs, predictIn, read, roomWith, rung, steadyRoom } from '../../helpers/drying'

const start = at('2026-03-10T09:00:00Z')

const someRoom: fc.Arbitrary<RoomAir> = fc.record({
  readings: fc.array(fc.record({ at: fc.integer({ min: start - 30 * hourMs, max: start + 60 * hourMs }), tempC: fc.double({ min: 4, max: 30, noNaN: true }), rh: fc.double({ min: 0.2, max: 1, noNaN: true }) }), { maxLength: 5 }),
  heated: fc.boolean(), nightDropC: fc.double({ min: 0, max: 8, noNaN: true }), zone: fc.constantFrom('UTC', 'Europe/Lisbon'), usual: fc.constant({ tempC: 18, rh: 0.55 }),
})
const names = ['set-to-touch', 'tack-free', 'dry-to-handle', 'cured']
const someMaterial: fc.Arbitrary<DryingMaterial> = fc.tuple(
  fc.array(fc.record({ driver: fc.constantFrom(...drivers), grow: fc.double({ min: 1, max: 6, noNaN: true }), early: fc.double({ min: 1, max: 3, noNaN: true }), late: fc.double({ min: 1, max: 4, noNaN: true }) }), { minLength: 1, maxLength: 4 }),
  fc.constantFrom(null, 8, 12), fc.constantFrom(null, 0.65, 0.85),
).map(([steps, minTempC, maxRh]) => {
  let typical = 20
  const milestones = steps.map(({ driver, grow, early, late }, i) => {
    typical *= grow
    return rung(names[i]!, driver, typical / early, typical, typical * late)
  })
  return materialWith({ minTempC, maxRh, milestones, windows: [[0, 30], [90, null]] })
})
const someCoat = fc.record({ size: fc.constantFrom(...coatSizes), ground: fc.constantFrom(...grounds) }).map(over => coatAt(start, over))
const someTests: fc.Arbitrary<TouchTest[]> = fc.array(fc.record({
  at: fc.integer({ min: start + minuteMs, max: start + 80 * hourMs }), milestone: fc.constantFrom(...names), reached: fc.boolean(), byRole: fc.constantFrom('maker' as const, 'helper' as const),
}), { maxLength: 4 })

const inOrder = ({ milestones }: CoatPrediction) => {
  for (const key of ['likelyAt', 'p90At', 'p98At'] as const) {
    let last = start
    for (const m of milestones) {
      const value = m[key]
      if (value !== null) expect(value).toBeGreaterThanOrEqual(last)
      last = Math.max(last, value ?? last)
    }
  }
  for (const m of milestones) {
    if (m.likelyAt !== null && m.p90At !== null) expect(m.p90At).toBeGreaterThanOrEqual(m.likelyAt)
    if (m.p90At !== null && m.p98At !== null) expect(m.p98At).toBeGreaterThanOrEqual(m.p90At)
  }
}

describe('predictions of any coat in any air', () => {
  it('keep the order of the ladder and of the chances, with tests or without', () => {
    fc.assert(fc.property(someRoom, someMaterial, someCoat, someTests, (room, material, coat, tests) => {
      inOrder(predictIn(room, material, { ...coat, tests }))
    }), { numRuns: 60 })
  }, 60_000)

  it('give no null without its reason, and no reason with a promise', () => {
    fc.assert(fc.property(someRoom, someMaterial, someCoat, someTests, (room, material, coat, tests) => {
      for (const m of predictIn(room, material, { ...coat, tests }).milestones) {
        expect(m.p90At === null).toBe(m.reason !== null)
        if (m.likelyAt === null) expect(m.reason).toBe('never')
        if (m.likelyAt !== null) expect(m.likelyAt).toBeLessThanOrEqual(start + horizonMs)
        if (m.reason === 'outside-sheet') expect(tests.some(t => !t.reached)).toBe(true)
      }
    }), { numRuns: 60 })
  }, 60_000)

  it('are never earlier for a "not yet"', () => {
    fc.assert(fc.property(someRoom, someMaterial, someCoat, fc.integer({ min: start, max: start + 90 * hourMs }), fc.constantFrom(...names), (room, material, coat, when, milestone) => {
      const before = predictIn(room, material, coat)
      const after = predictIn(room, material, { ...coat, tests: [{ at: when, milestone, reached: false }] })
      for (const [i, m] of after.milestones.entries()) {
        const was = before.milestones[i]!
        for (const key of ['likelyAt', 'p90At', 'p98At'] as const) {
          if (m[key] !== null) expect(m[key]! - (was[key] ?? Infinity)).toBeGreaterThanOrEqual(-1000)
        }
      }
    }), { numRuns: 60 })
  }, 60_000)

  it('open a window late and shut it early: 90 % and 10 % with an sd of 0.25', () => {
    const steady = roomWith({ readings: [read('2026-03-10T08:00:00Z', 20, 0.5), read('2026-09-10T08:00:00Z', 20, 0.5)] })
    // A sure sheet, so that the bench's own share stays within the 0.25.
    const sure = materialWith({ milestones: [rung('cured', 'reaction', 8000, 10_000, 12_500)], windows: [[0, 60], [2880, 5000]] })
    const { windows } = predictIn(steady, sure, coatAt(start))
    const minutes = (instant: number | null) => (instant! - start) / minuteMs
    expect(windows[0]!.opensAt).toBe(start)
    // 60 exp(-1.2816 x 0.25) = 43.5; 2880 x 1.378 = 3968; 5000/1.378 = 3629: a window whose ends are both in doubt may never be open for sure.
    expect(minutes(windows[0]!.shutsAt)).toBeCloseTo(43.5, 0)
    expect(minutes(windows[1]!.opensAt) / 3968).toBeCloseTo(1, 2)
    expect(minutes(windows[1]!.shutsAt) / 3629).toBeCloseTo(1, 2)
  })
})

describe('what widens a band', () => {
  const measured = roomWith({ readings: [read('2026-03-10T08:00:00Z', 20, 0.5), read('2026-03-20T08:00:00Z', 20, 0.5)] })
  const width = (coat: Partial<CoatCase>, room = measured, material = materialWith()) => {
    const m = predictIn(room, material, coatAt(start, coat)).milestones[0]!
    return Math.log((m.p90At! - start) / (m.likelyAt! - start))
  }

  it('moving air, sun, warm air and a mix', () => {
    expect(width({ airSpeed: 0.3 })).toBeCloseTo(width({}), 6)
    expect(width({ airSpeed: 0.8 })).toBeGreaterThan(width({}))
    expect(width({ notes: [{ kind: 'sun', fromAt: start, toAt: start + minuteMs }] })).toBeGreaterThan(width({ airSpeed: 0.8 }))
    expect(width({ notes: [{ kind: 'shade', fromAt: start, toAt: null }] })).toBeCloseTo(width({}), 9)
    expect(width({}, measured, materialWith({ mixed: true }))).toBeGreaterThan(width({}))
  })

  it('air that grows stale, and readings that were only words', () => {
    expect(width({}, steadyRoom(20, 0.5, start - 30 * hourMs))).toBeGreaterThan(width({}))
    const worded = { ...measured, readings: measured.readings.map(r => ({ ...r, doubt: 0.2 })) }
    expect(width({}, worded)).toBeGreaterThan(width({}))
  })

  it('any ground but a primed one, on the first rung', () => {
    const first = (ground: CoatCase['ground']) => {
      const m = predictIn(measured, materialWith(), coatAt(start, { ground })).milestones[0]!
      return Math.log((m.p90At! - start) / (m.likelyAt! - start))
    }
    expect(first('sealed')).toBeGreaterThan(first('primed'))
  })
})

describe('refusals to promise', () => {
  it('below the minimum before it can be handled: likely stays, the promise goes, the coat is doubtful once it has happened', () => {
    const night = roomWith({ heated: false, nightDropC: 8, readings: [read('2026-03-10T20:00:00Z', 12, 0.4)] })
    const slow = materialWith({ milestones: [rung('set-to-touch', 'water', 20, 30, 40), rung('dry-to-handle', 'coalescence', 300, 600, 900), rung('cured', 'coalescence', 5000, 10_000, 20_000)] })
    const evening = coatAt(at('2026-03-10T20:00:00Z'))
    const ahead = predictIn(night, slow, evening)
    expect(ahead.milestones.map(m => m.reason)).toEqual([null, 'below-minimum', 'below-minimum'])
    expect(ahead.milestones[1]!.likelyAt).not.toBeNull()
    expect(ahead.state).toBe('sound')
    expect(ahead.chilledAt).toBeGreaterThan(evening.appliedAt)
    expect(ahead.advice.map(a => a.code)).toContain('below-minimum-ahead')
    const morning = predictIn(night, slow, evening, at('2026-03-11T08:00:00Z'))
    expect(morning.state).toBe('doubtful')
    expect(morning.advice.map(a => a.code)).toContain('chilled')
  })

  it('a maker\'s test after the cold answers for it', () => {
    const room = roomWith({ readings: [read('2026-03-10T08:00:00Z', 9.5, 0.4), read('2026-03-10T10:00:00Z', 20, 0.4), read('2026-03-12T10:00:00Z', 20, 0.4)] })
    const tested = coatAt(start, { tests: [{ at: start + 4 * hourMs, milestone: 'dry-to-handle', reached: true, byRole: 'maker' }] })
    expect(predictIn(room, materialWith(), coatAt(at('2026-03-10T08:00:00Z'))).milestones[2]!.reason).toBe('below-minimum')
    const after = predictIn(room, materialWith(), { ...tested, appliedAt: at('2026-03-10T08:00:00Z') }, start + 5 * hourMs)
    expect(after.milestones[2]!.reason).toBeNull()
    expect(after.state).toBe('sound')
  })

  it('too damp for half an hour while water has to leave, and not after it has left', () => {
    const damp = (from: string, to: string) => roomWith({ readings: [read('2026-03-10T08:00:00Z', 20, 0.5), { ...read(from, 20, 0.5), at: at(from) - minuteMs }, read(from, 20, 0.88), read(to, 20, 0.88), { ...read(to, 20, 0.5), at: at(to) + minuteMs }] })
    const slow = materialWith({ milestones: [rung('set-to-touch', 'water', 60, 120, 200), rung('cured', 'coalescence', 5000, 10_000, 20_000)] })
    expect(predictIn(damp('2026-03-10T09:10:00Z', '2026-03-10T09:50:00Z'), slow, coatAt(start)).milestones.map(m => m.reason)).toEqual(['too-damp', 'too-damp'])
    expect(predictIn(damp('2026-03-10T09:10:00Z', '2026-03-10T09:30:00Z'), slow, coatAt(start)).milestones.map(m => m.reason)).toEqual([null, null])
    expect(predictIn(damp('2026-03-11T09:10:00Z', '2026-03-11T11:50:00Z'), slow, coatAt(start)).milestones.map(m => m.reason)).toEqual([null, null])
  })

  it('0.92 is the ceiling where the sheet has none or a higher one', () => {
    const reasons = (rh: number, maxRh: number | null) => predictIn(steadyRoom(20, rh, start), materialWith({ maxRh }), coatAt(start)).milestones[0]!.reason
    expect(reasons(0.93, null)).toBe('too-damp')
    expect(reasons(0.93, 0.95)).toBe('too-damp')
    expect(reasons(0.91, null)).toBeNull()
    // The very figure of the ceiling counts.
    expect(reasons(0.85, 0.85)).toBe('too-damp')
  })

  it('never, where nothing dries or it takes over 400 days', () => {
    const { milestones, windows } = predictIn(steadyRoom(20, 0.98, start), materialWith({ windows: [[0, 60], [90, null]] }), coatAt(start))
    expect(milestones.map(m => [m.likelyAt, m.p90At, m.p98At, m.reason])).toEqual(milestones.map(() => [null, null, null, 'never']))
    expect(windows).toEqual([{ opensAt: start, shutsAt: null }, { opensAt: null, shutsAt: null }])
    const slow = materialWith({ milestones: [rung('cured', 'reaction', 200_000, 400_000, 900_000)] })
    // 400,000 minutes are 278 days: likely is given, 90 % is past the 400th.
    const [cured] = predictIn(steadyRoom(20, 0.5, start), slow, coatAt(start)).milestones
    expect(cured!.likelyAt).not.toBeNull()
    expect(cured!.reason).toBe('never')
  })
})

describe('touch tests', () => {
  const room = roomWith({ readings: [read('2026-03-10T08:00:00Z', 20, 0.5), read('2026-03-20T08:00:00Z', 20, 0.5)] })
  const tested = (...tests: TouchTest[]) => predictIn(room, materialWith(), coatAt(start, { tests }))
  const yes = (minutes: number, milestone: string, byRole: TouchTest['byRole'] = 'maker'): TouchTest => ({ at: start + minutes * minuteMs, milestone, reached: true, byRole })
  const no = (minutes: number, milestone: string): TouchTest => ({ at: start + minutes * minuteMs, milestone, reached: false })

  it('a maker\'s "reached" sets its rung and those below to its time', () => {
    const t = start + 90 * minuteMs
    const { milestones } = tested(yes(90, 'dry-to-handle'))
    for (const m of milestones.slice(0, 2)) expect(m).toMatchObject({ likelyAt: t, p90At: t, p98At: t, reachedAt: t, reason: null })
    expect(milestones[2]!.reachedAt).toBeNull()
  })

  it('a helper\'s sets nothing', () => {
    expect(tested(yes(90, 'dry-to-handle', 'helper'))).toEqual(tested())
  })

  it('a later "not yet" undoes it, for its rung and those above, not for those below', () => {
    const { milestones } = tested(yes(90, 'dry-to-handle'), no(100, 'dry-to-handle'))
    expect(milestones[0]!.reachedAt).toBe(start + 90 * minuteMs)
    expect(milestones[1]!.reachedAt).toBeNull()
    expect(milestones[1]!.likelyAt).toBeGreaterThan(start + 100 * minuteMs)
    expect(tested(no(80, 'dry-to-handle'), yes(90, 'dry-to-handle')).milestones[1]!.reachedAt).toBe(start + 90 * minuteMs)
  })

  it('a "not yet" far out promises no minutes, and past three times the sheet\'s longest no time at all', () => {
    // High is 240 min: at 300 the next times are hours away, not minutes; at 900 (over 3 x 240) something is wrong with this coat.
    const late = tested(no(300, 'dry-to-handle')).milestones[1]!
    expect(late.likelyAt! - (start + 300 * minuteMs)).toBeGreaterThan(30 * minuteMs)
    const far = tested(no(900, 'dry-to-handle'))
    expect(far.milestones[1]!.reason).toBe('outside-sheet')
    expect(far.milestones[1]!.likelyAt).toBeGreaterThan(start + 900 * minuteMs)
    expect(far.advice.map(a => a.code)).toContain('outside-sheet')
  })

  it('an early "not yet" changes next to nothing', () => {
    const early = tested(no(5, 'dry-to-handle')).milestones[1]!
    const plain = tested().milestones[1]!
    for (const key of ['likelyAt', 'p90At', 'p98At'] as const) expect((early[key]! - start) / (plain[key]! - start)).toBeCloseTo(1, 1)
  })
})

describe('a fixed log speed', () => {
  it('divides the middle by its factor and leaves no bench to doubt', () => {
    const room = roomWith({ readings: [read('2026-03-10T08:00:00Z', 20, 0.5), read('2026-03-20T08:00:00Z', 20, 0.5)] })
    const single = materialWith({ milestones: [rung('dry-to-handle', 'reaction', 50, 100, 200)] })
    const { milestones, speed } = predictIn(room, single, coatAt(start), start, { kind: 'fixed', theta: 0.25 })
    expect((milestones[0]!.likelyAt! - start) / minuteMs).toBeCloseTo(100 * Math.exp(-0.25), 1)
    expect(speed).toEqual({ median: Math.exp(-0.25), p10: Math.exp(-0.25), p90: Math.exp(-0.25) })
  })

  it('on the sheet\'s own, the bench\'s spread is said', () => {
    const { speed } = predictIn(steadyRoom(20, 0.5, start), materialWith(), coatAt(start))
    expect(speed.median).toBe(1)
    expect(speed.p10 * speed.p90).toBeCloseTo(1, 12)
    expect(speed.p90).toBeGreaterThan(1.1)
  })

  it('days later the prediction is the same: now changes only what is said', () => {
    const room = steadyRoom(20, 0.5, start)
    const a = predictIn(room, materialWith(), coatAt(start))
    const b = predictIn(room, materialWith(), coatAt(start), start + 3 * dayMs)
    expect(b.milestones).toEqual(a.milestones)
  })
})
