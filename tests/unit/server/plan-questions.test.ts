import { and, eq, sql } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { openHours, order, place, plan, planEntry, reading, studio as studioTable } from '~~/db/schema'
import { withOnePlace } from '~~/server/planning/bottleneck'
import { changedProblem } from '~~/server/planning/changed-facts'
import { baseOf, copyFrom } from '~~/server/planning/questions'
import type { Ask } from '~~/server/planning/questions'
import { atOnce, replan } from '~~/server/planning/replan'
import { solve } from '~~/server/planner/solve'
import { askWhatIf, bottleneck } from '~~/server/services/plan-questions'
import type { KeptBases } from '~~/server/services/plan-questions'
import { isRefusal } from '~~/server/utils/errors'
import { standardWeights } from '#shared/planning/types'
import { anewText } from '#shared/words/plan-anew'
import { bottleneckEvidence, bottleneckSentence, differenceText } from '#shared/words/what-if'
import { plannedStudio } from '../../helpers/planned-studio'
import { hour, minute } from '../../helpers/studio'

// A Tuesday.
const now = Date.parse('2026-04-07T10:00:00Z')
const ask: Ask = problem => Promise.resolve(solve(problem, { schedules: 40 }))

/** Six boards to be laminated on a bench with room for two at a time, each lying there under weight for a day, due in two days. */
async function oneBench() {
  const studio = plannedStudio(now, 'laminated-boards', 6)
  studio.db.insert(place).values({ studioId: studio.studioId, roomId: studio.rooms.bench, name: 'Bench end', kind: 'bench', capacity: 2 }).run()
  studio.db.update(order).set({ dueAt: now + 48 * hour }).run()
  expect(await replan(studio.db, studio.studioId, now, atOnce)).toMatchObject({ ok: true })
  return studio
}

describe('the bottleneck', () => {
  it('is the bench, and what the sentence claims of one more is what solving with one more gives', async () => {
    const { db, studioId } = await oneBench()
    const state = await bottleneck(db, studioId, now, ask)
    if (isRefusal(state)) throw new Error(state.message)
    expect(state.more[0]?.kind).toBe('bench')
    const benches = state.waited.find(each => each.for === 'bench')
    expect(benches?.minutes.reduce((sum, each) => sum + each, 0)).toBeGreaterThan(60)
    // Solved again here, with one place more and from the same plan.
    const base = await baseOf(db, studioId, now, ask)
    if (isRefusal(base)) throw new Error(base.message)
    const { problem, zeroAt } = base.changed.given
    const again = solve(copyFrom(withOnePlace(problem, 'bench'), base.from), { schedules: 40 })
    const ends = again.entries.reduce((end, entry) => Math.max(end, entry.end), 0)
    const claimed = state.more[0]?.difference
    expect(claimed?.latenessAfter).toBe(again.objective.lateness)
    expect(claimed?.batches[0]?.afterAt).toBe(zeroAt + ends * minute)
    expect(claimed?.latenessBefore).toBeGreaterThan(claimed?.latenessAfter ?? Infinity)
    const { head, rest } = bottleneckSentence(state)
    expect(head).toBe('Benches hold the plan back.')
    expect(rest).toMatch(/^Pieces that are ready wait .* in all for them.*\. One more place on a bench would finish Boxs .* sooner and take .* off the lateness of all batches together\.$/)
  })
  it('says that no single shortage holds it back where one more of anything changes nothing', async () => {
    const studio = plannedStudio(now, 'oiled-bowl', 1)
    await replan(studio.db, studio.studioId, now, atOnce)
    const state = await bottleneck(studio.db, studio.studioId, now, ask)
    if (isRefusal(state)) throw new Error(state.message)
    expect(bottleneckSentence(state).head).toBe('No single shortage holds the plan back.')
  })
})

describe('what if', () => {
  it('is measured from the moment that the plan without it was reckoned from, and the age of the evidence counts from there', async () => {
    const { db, studioId } = await oneBench()
    const kept: KeptBases = new Map()
    // Instants of a problem count from its beginning: the same date at two of them is two beginnings.
    const dueIn = new Set<number | null>()
    const noting: Ask = (problem) => {
      dueIn.add(problem.jobs[0]?.due ?? null)
      return ask(problem)
    }
    const asked = now + 14 * minute
    const state = await bottleneck(db, studioId, asked, noting, kept)
    if (isRefusal(state)) throw new Error(state.message)
    expect(bottleneckEvidence(state, asked + 2 * minute)[0]).toBe('Reckoned from the studio as it stood 2 min ago, by planning copies with one more of each.')
    const change = { kind: 'places', placeKind: 'bench', more: 1 } as const
    expect(await askWhatIf(db, studioId, change, asked + 14 * minute, noting, kept)).toMatchObject({ ok: true })
    expect([...dueIn]).toHaveLength(1)
    // After a quarter of an hour the day has moved on, and both are reckoned anew.
    expect(await askWhatIf(db, studioId, change, asked + 15 * minute, noting, kept)).toMatchObject({ ok: true })
    expect(await bottleneck(db, studioId, asked + 16 * minute, noting, kept)).toMatchObject({ reckonedAt: asked + 15 * minute })
    expect([...dueIn]).toHaveLength(2)
  })

  it('keeps nothing of what it tries', async () => {
    const { db, studioId, rooms } = await oneBench()
    const all = () => JSON.stringify([db.select().from(studioTable).all(), db.select().from(place).all(), db.select().from(openHours).all(), db.select().from(reading).all(), db.select().from(order).all(), db.select().from(planEntry).all()])
    db.insert(reading).values({ studioId, roomId: rooms.bench, at: now - hour, toldAt: now, tempC: 18, rh: 0.6, source: 'note' }).run()
    const before = all()
    for (const change of [{ kind: 'places', placeKind: 'bench', more: 5 }, { kind: 'humidity', roomId: rooms.bench, rh: 0.4 }, { kind: 'heat', roomId: rooms.bench, tempC: 24 }, { kind: 'open day', weekday: 6, fromMin: 540, toMin: 900 }] as const) {
      expect(await askWhatIf(db, studioId, change, now, ask), change.kind).toMatchObject({ ok: true })
      expect(all()).toBe(before)
    }
  })
  it('finds that five more places end it sooner, and that a later date is less late by so much', async () => {
    const { db, studioId } = await oneBench()
    const more = await askWhatIf(db, studioId, { kind: 'places', placeKind: 'bench', more: 5 }, now, ask)
    if (isRefusal(more)) throw new Error(more.message)
    const [fare] = more.difference.batches
    expect(fare?.afterAt).toBeLessThan(fare?.beforeAt ?? 0)
    // A date that lies after every end: nothing is late.
    const due = await askWhatIf(db, studioId, { kind: 'due', batchId: fare?.batchId ?? 0, dueAt: new Date(now + 80 * 24 * hour).toISOString() }, now, ask)
    expect(isRefusal(due) ? null : due.difference.latenessAfter).toBe(0)
  })
  it.each([
    { kind: 'places', placeKind: 'bench', more: 5 },
    { kind: 'open day', weekday: 6, fromMin: 540, toMin: 1020 },
  ] as const)('says of $kind what solving the changed studio gives, batch by batch and in words', async (change) => {
    const { db, studioId } = await oneBench()
    const told = await askWhatIf(db, studioId, change, now, ask)
    const base = await baseOf(db, studioId, now, ask)
    const changed = changedProblem(db, studioId, change, now)
    if (isRefusal(told) || isRefusal(base) || isRefusal(changed)) throw new Error('A studio with a plan is answered.')
    const { problem, zeroAt } = changed.given
    const again = solve(copyFrom(problem, base.from), { schedules: 40 })
    const ends = new Map(again.entries.map(entry => [entry.activity, entry.end]))
    const endOf = (batchId: number) => zeroAt + minute * Math.max(...problem.jobs.find(job => job.id === `batch ${batchId}`)?.activities.map(id => ends.get(id) ?? NaN) ?? [])
    expect(told.difference.batches.map(each => each.afterAt)).toEqual(told.difference.batches.map(each => endOf(each.batchId)))
    expect(told.difference).toMatchObject({ latenessBefore: base.plan.objective.lateness, latenessAfter: again.objective.lateness, windowsAfter: again.objective.windowsMissed })
    const less = (base.plan.objective.lateness - again.objective.lateness) / 60
    expect(differenceText(told.difference)).toContain(less < 0.5 ? 'ateness stays as it is' : again.objective.lateness === 0 ? 'none is late any more' : 'less late')
  })
  it('finds in two plans what more places buy, though it begins from the last one', async () => {
    const { db, studioId } = await oneBench()
    const told = await askWhatIf(db, studioId, { kind: 'places', placeKind: 'bench', more: 5 }, now, problem => Promise.resolve(solve(problem, { schedules: 2 })))
    if (isRefusal(told)) throw new Error(told.message)
    expect(told.difference.latenessAfter).toBeLessThan(told.difference.latenessBefore - 60)
    expect(told.difference.batches[0]?.afterAt).toBeLessThan(told.difference.batches[0]?.beforeAt ?? 0)
  })
  it('makes nothing worse that takes nothing away, however poor the search was', async () => {
    const { db, studioId } = await oneBench()
    let asked = 0
    // Begun five days later, and not searched further.
    const poor: Ask = problem => Promise.resolve(++asked < 3 ? solve(problem, { schedules: 40 }) : solve({ ...problem, previous: Object.fromEntries(Object.entries(problem.previous).map(([id, start]) => [id, start + 5 * 1440])) }, { schedules: 1 }))
    const told = await askWhatIf(db, studioId, { kind: 'open day', weekday: 6, fromMin: 540, toMin: 900 }, now, poor)
    if (isRefusal(told)) throw new Error(told.message)
    expect(asked).toBe(3)
    expect(differenceText(told.difference)).toBe('Lateness stays as it is. No batch ends noticeably otherwise.')
  })
  it('lengthens the waits in a damp room and shortens them in a dry one', async () => {
    const { db, studioId, rooms } = await oneBench()
    db.insert(reading).values({ studioId, roomId: rooms.bench, at: now - hour, toldAt: now, tempC: 18, rh: 0.6, source: 'note' }).run()
    const waits = (rh: number) => {
      const changed = changedProblem(db, studioId, { kind: 'humidity', roomId: rooms.bench, rh }, now)
      return isRefusal(changed) ? NaN : changed.given.problem.lags.reduce((sum, lag) => sum + (lag.windows[0]?.[0] ?? 0), 0)
    }
    expect(waits(0.85)).toBeGreaterThan(waits(0.6))
    expect(waits(0.35)).toBeLessThan(waits(0.6))
  })
  it('refuses heat and drier air where solvent is wet or planned, and another studio’s room', async () => {
    const { db, studioId, rooms, batch } = plannedStudio(now, 'painted-waxed-box', 1)
    batch('Case', 1, 'lacquered-instrument')
    await replan(db, studioId, now, atOnce)
    for (const change of [{ kind: 'heat', roomId: rooms.bench, tempC: 25 }, { kind: 'humidity', roomId: rooms.bench, rh: 0.4 }] as const) {
      expect(await askWhatIf(db, studioId, change, now, ask)).toMatchObject({ ok: false, reason: 'impossible', message: expect.stringMatching(/^(Solvent work is planned|A solvent film is drying|Nobody has noted)/) })
    }
    expect(await askWhatIf(db, studioId, { kind: 'heat', roomId: 9999, tempC: 20 }, now, ask)).toMatchObject({ ok: false, reason: 'absent' })
  })
})

describe('a plan made anew', () => {
  it('is offered where the last one costs much, is as good as it was said to be, and moves what it said', async () => {
    const { db, studioId } = await oneBench()
    // Everything stands five hours later than it need: of six boards through one bench none can come sooner alone.
    db.update(planEntry).set({ startsAt: sql`${planEntry.startsAt} + ${5 * hour}`, endsAt: sql`${planEntry.endsAt} + ${5 * hour}` }).run()
    const state = await bottleneck(db, studioId, now, ask)
    if (isRefusal(state) || !state.anew) throw new Error('Nothing is offered.')
    const { moves, difference } = state.anew
    expect(anewText(state.anew)).toMatch(new RegExp(`^The plan moves as little as it must. Made anew it would finish Boxs .* sooner and take .* off the lateness of all batches together; ${moves} steps would get another time. What is pinned or in hand stays.$`))
    const stood = new Map(db.select().from(planEntry).all().map(entry => [entry.turnId, entry.startsAt]))
    expect(await replan(db, studioId, now, (_key, problem) => Promise.resolve({ ok: true, plan: solve(problem, { schedules: 40 }), broken: [] }), true)).toMatchObject({ ok: true })
    const stands = db.select().from(planEntry).innerJoin(plan, and(eq(plan.id, planEntry.planId), eq(plan.current, true))).all().map(row => row.plan_entry)
    expect(stands.filter(entry => entry.startsAt !== stood.get(entry.turnId))).toHaveLength(moves)
    expect(Math.max(...stands.map(entry => entry.endsAt))).toBe(difference.batches[0]?.afterAt)
    // What it was offered for is had, so nothing is offered any more.
    expect(await bottleneck(db, studioId, now, ask)).toMatchObject({ anew: null })
  })
  it('is not offered for a gain that is not worth the moves', async () => {
    const { db, studioId } = await oneBench()
    expect(await bottleneck(db, studioId, now, ask)).toMatchObject({ anew: null })
  })
  it('holds to times that somebody has heard of, and not to those that nobody has', async () => {
    const { db, studioId } = await oneBench()
    const weightAt = () => {
      const changed = changedProblem(db, studioId, null, now)
      return isRefusal(changed) ? null : changed.given.problem.weights.moves
    }
    expect(weightAt()).toBe(standardWeights.moves)
    db.update(planEntry).set({ toldAt: null }).run()
    expect(weightAt()).toBe(1)
  })
  it('is never worse than the last one repaired to the new facts', async () => {
    const studio = await oneBench()
    studio.batch('Lid', 3)
    const changed = changedProblem(studio.db, studio.studioId, null, now + 10 * minute)
    if (isRefusal(changed)) throw new Error(changed.message)
    // With a plan before it, the first that the search makes is that plan on the facts of now.
    let repaired: { cost: number, unplaced: readonly string[] } | null = null
    const plan = solve(changed.given.problem, { schedules: 40, onFirst: (first) => { repaired = first } })
    const first = repaired as { cost: number, unplaced: readonly string[] } | null
    expect(plan.unplaced.length).toBeLessThanOrEqual(first?.unplaced.length ?? -1)
    expect(plan.cost).toBeLessThanOrEqual(first?.cost ?? -1)
  })
})
