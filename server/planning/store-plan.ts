import { eq, sql } from 'drizzle-orm'
import { plan as planTable, planChange, planEntry, planHold, planMate, planSession } from '~~/db/schema'
import type { PlannedHours } from '~~/db/schema'
import { clashSentences } from '~~/server/planning/clashes'
import type { PlanFacts } from '~~/server/planning/facts'
import { familyOf } from '~~/server/planning/problem'
import type { StudioProblem } from '~~/server/planning/problem'
import { holdsOf } from '~~/server/planning/holds'
import { memberIdOf, turnIdOf } from '~~/server/planning/ids'
import type { LastStarts } from '~~/server/planning/last-starts'
import type { Moves } from '~~/server/planning/moves'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { Plan } from '#shared/planning/types'

const minute = 60_000
const rowsAtOnce = 400

/** What goes with a plan into the database. */
export interface PlanNotes { lastStarts: ReadonlyMap<string, LastStarts>, moves: Moves }

/** Puts a plan in place of the last one. Only the one in force is kept; a silent start is carried on as due. */
export function storePlan(tx: Transaction, facts: PlanFacts, given: StudioProblem, made: Plan, { lastStarts, moves }: PlanNotes, now: number) {
  const studioId = facts.owner.id
  tx.delete(planTable).where(scoped(planTable, studioId)).run()
  const at = (minutes: number | null) => (minutes === null ? null : given.zeroAt + minutes * minute)
  const planId = tx.insert(planTable).values({
    studioId, madeAt: now, revision: sql<number>`(select revision from studio where id = ${studioId})`, seed: made.seed, status: made.status, objective: { ...made.objective },
    clashes: clashSentences(made, given), hours: hoursOf(facts), current: true,
  }).returning({ id: planTable.id }).get().id
  const roomOf = new Map(given.works.map(work => [familyOf(work), work.roomId]))
  const setupOf = new Map(given.problem.families.map(family => [family.id, family.setup]))
  const sessions = made.sessions.map(session => ({
    studioId, planId, family: session.family, roomId: roomOf.get(session.family) ?? null, startsAt: given.zeroAt + session.start * minute, endsAt: given.zeroAt + session.end * minute,
    setupMin: setupOf.get(session.family) ?? 0,
  }))
  // Numbers rise with the rows, whatever order the answer has.
  const sessionIds = partsOf(sessions).flatMap(part => tx.insert(planSession).values(part).returning({ id: planSession.id }).all()).map(row => row.id).sort((a, b) => a - b)
  const due = silentStarts(facts, now)
  const rows = made.entries.map((entry): typeof planEntry.$inferInsert => {
    const turnId = turnIdOf(entry.activity)
    const startsAt = given.zeroAt + entry.start * minute
    const last = lastStarts.get(entry.activity)
    return {
      studioId, planId, turnId, sessionId: entry.session === null ? null : sessionIds[entry.session] ?? null, memberId: membersOf(entry)[0] ?? null,
      startsAt, endsAt: given.zeroAt + entry.end * minute, dueAt: due.get(turnId) ?? startsAt,
      lastStartAt: at(last?.lastStart ?? null), firstFew: last?.firstFew ?? null, lastStartFewAt: at(last?.lastStartFew ?? null), afterTest: given.untested.has(turnId),
      readyAt: moves.readyAt.get(turnId) ?? null, toldAt: moves.toldAt.get(turnId) ?? null,
    }
  })
  for (const part of partsOf(rows)) tx.insert(planEntry).values(part).run()
  const mates = made.entries.flatMap(entry => membersOf(entry).slice(1).map(memberId => ({ studioId, planId, turnId: turnIdOf(entry.activity), memberId })))
  for (const part of partsOf(mates)) tx.insert(planMate).values(part).run()
  for (const part of partsOf(moves.moves)) tx.insert(planChange).values(part.map(move => ({ studioId, planId, ...move }))).run()
  for (const part of partsOf(holdsOf(facts, rows, now))) tx.insert(planHold).values(part.map(hold => ({ studioId, planId, ...hold }))).run()
  return planId
}

/** The hours that a plan was made for. */
const hoursOf = ({ hours, closures }: PlanFacts): PlannedHours => ({
  open: hours.map(({ memberId, weekday, fromMin, toMin }) => ({ memberId, weekday, fromMin, toMin })), closed: closures.map(({ memberId, fromDate, toDate }) => ({ memberId, fromDate, toDate })),
})

/** Whose hands an entry takes. */
const membersOf = (entry: Plan['entries'][number]) => entry.resources.map(memberIdOf)

const partsOf = <Row>(rows: readonly Row[]): Row[][] => Array.from({ length: Math.ceil(rows.length / rowsAtOnce) }, (_, part) => rows.slice(part * rowsAtOnce, (part + 1) * rowsAtOnce))

/** Planned starts that have passed with nobody saying whether it went on: they stay due until somebody does. */
function silentStarts(facts: PlanFacts, now: number): Map<number, number> {
  const turns = new Map(facts.turns.map(turn => [turn.id, turn]))
  return new Map(facts.last.flatMap((entry) => {
    const turn = turns.get(entry.turnId)
    const silent = turn?.status === 'waiting' && entry.dueAt <= now && (turn.notOnAt === null || turn.notOnAt < entry.dueAt)
    return silent ? [[entry.turnId, entry.dueAt] as const] : []
  }))
}

/** How often the studio has been changed. */
export function revisionOf(tx: Transaction | Database, studioId: number): number {
  return tx.get<{ revision: number }>(sql`select revision from studio where id = ${studioId}`)?.revision ?? 0
}

/** Whether a plan is still for the studio that it was made from. */
export const isCurrent = (tx: Transaction, facts: PlanFacts): boolean => revisionOf(tx, facts.owner.id) === facts.owner.revision

/** Puts the plan of a studio away that has nothing left to plan. */
export function clearPlan(tx: Transaction, studioId: number) {
  tx.delete(planTable).where(eq(planTable.studioId, studioId)).run()
}
