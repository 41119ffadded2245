import { describe, expect, it } from 'vitest'
import { batch, openHours, planEntry } from '~~/db/schema'
import { replan } from '~~/server/planning/replan'
import { solve } from '~~/server/planner/solve'
import { check } from '#shared/planning/check'
import type { PlanProblem } from '#shared/planning/types'
import { atWork, day, now } from '../../../helpers/advice-work'
import { hour } from '../../../helpers/studio'

/** Long enough to find that a start put off past the weekend saves waits between the coats. */
const searched = (_key: string, problem: PlanProblem) => {
  const plan = solve(problem, { schedules: 200 })
  return Promise.resolve({ ok: true as const, plan, broken: check(problem, plan) })
}

/** The first start of a box without a date, begun on a Tuesday at ten; the studio is open on weekdays from nine to five. */
async function firstStart(startsAt: number) {
  const studio = atWork()
  for (let weekday = 1; weekday <= 5; weekday++) studio.db.insert(openHours).values({ studioId: studio.studioId, weekday, fromMin: 9 * 60, toMin: 17 * 60 }).run()
  studio.start('painted-waxed-box')
  studio.db.update(batch).set({ startsAt }).run()
  expect(await replan(studio.db, studio.studioId, now, searched)).toMatchObject({ ok: true })
  return Math.min(...studio.db.select().from(planEntry).all().map(each => each.startsAt))
}

describe('a batch without a date', () => {
  it('is begun when it was said to, though a later start would save waits between its coats', async () => {
    expect(await firstStart(now)).toBeLessThan(now + hour)
  })

  it('is not begun before', async () => {
    const started = await firstStart(now + day)
    expect(started).toBeGreaterThanOrEqual(now + day)
    expect(started).toBeLessThan(now + day + hour)
  })
})
