import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { pieceStep, plan, planEntry, turn } from '~~/db/schema'
import type { StepWork } from '~~/server/planning/lags'
import { withMixing } from '~~/server/planning/mixes'
import { readPlanFacts } from '~~/server/planning/facts'
import { studioProblem } from '~~/server/planning/problem'
import { replan } from '~~/server/planning/replan'
import { WaitsToCome } from '~~/server/planning/waits'
import { solve } from '~~/server/planner/solve'
import { check } from '#shared/planning/check'
import type { PlanProblem } from '#shared/planning/types'
import { atWork, now } from '../../../helpers/advice-work'
import { minute } from '../../../helpers/studio'
import { plannedStudio } from '../../../helpers/planned-studio'

/** So many trays about to be sealed with resin: 6 minutes each, and what is mixed lasts 9 at the least at 22 °C. */
function trays(count: number, tempC: number) {
  const studio = atWork()
  studio.read(tempC, 0.4)
  for (let each = 0; each < count; each++) studio.leaveAllBut('resin-tray', studio.start('resin-tray'), ['seal'])
  return studio
}

/** The minutes that each tray is planned to take. */
function planned({ db, studioId }: ReturnType<typeof trays>) {
  const facts = readPlanFacts(db, studioId)
  if (!facts) throw new Error('The studio is missing.')
  const work = new Set(db.select().from(turn).all().filter(each => each.kind === 'work' && each.status === 'waiting').map(each => `t${each.id}`))
  return studioProblem(facts, new WaitsToCome(db, facts, now), now).problem.activities.filter(each => work.has(each.id)).map(each => each.minutes)
}

const solved = (_key: string, problem: PlanProblem) => {
  const plan = solve(problem, { schedules: 50 })
  return Promise.resolve({ ok: true as const, plan, broken: check(problem, plan) })
}

describe('what goes off in its pot', () => {
  it('is mixed anew for each tray where a pot is enough for one: five minutes more', () => {
    expect(planned(trays(3, 22))).toEqual([11, 11, 11])
  })

  it('is mixed once for one tray, and shared out where a pot is enough for several', () => {
    expect(planned(trays(1, 22))).toEqual([6])
    // At 12 °C a pot lasts 18 minutes and more: enough for three trays, not for four. Five minutes over three trays are two each.
    expect(planned(trays(3, 12))).toEqual([6, 6, 6])
    expect(planned(trays(4, 12))).toEqual([8, 8, 8, 8])
  })

  it('is not mixed in one go for the coats of one piece, which lie hours apart', () => {
    const coats = (stepId: number) => Array.from({ length: 3 }, (_, at) => ({ id: stepId * 10 + at, kind: 'work', status: 'waiting', minutes: 6 }))
    const work = (id: number) => ({ step: { id, pieceId: id }, turns: coats(id), roomId: null }) as unknown as StepWork
    const pot = () => ({ minutes: 10, least: 9, sheetMinutes: 10, tempC: null })
    const minutes = (works: StepWork[]) => withMixing(works, { pot }, () => 'alike').map(each => each.turns.map(turn => turn.minutes))
    expect(minutes([work(1)])).toEqual([[6, 6, 6]])
    expect(minutes([work(1), work(2)])).toEqual([[11, 11, 11], [11, 11, 11]])
  })

  it('leaves a tray alone that no pot is enough for: its own minutes know of that', () => {
    expect(planned(trays(3, 35))).toEqual([6, 6, 6])
  })

  it('takes its time in the plan: trays follow each other by work and mixing, and each is flooded while its seal is tacky', async () => {
    const { db, studioId } = plannedStudio(now, 'resin-tray', 3)
    expect(await replan(db, studioId, now, solved)).toMatchObject({ ok: true })
    expect(db.select().from(plan).where(eq(plan.current, true)).get()?.clashes).toEqual([])
    const entries = db.select({ at: planEntry.startsAt, key: pieceStep.key }).from(planEntry).innerJoin(turn, eq(turn.id, planEntry.turnId)).innerJoin(pieceStep, eq(pieceStep.id, turn.stepId)).where(eq(turn.kind, 'work')).all()
    const apart = (key: string) => entries.filter(each => each.key === key).map(each => each.at).sort((a, b) => a - b).map((at, k, all) => k === 0 ? 0 : (at - all[k - 1]!) / minute)
    expect([apart('seal'), apart('flood')]).toEqual([[0, 11, 11], [0, 10, 10]])
  })
})
