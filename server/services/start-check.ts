import { eq, isNull } from 'drizzle-orm'
import { batch, order } from '~~/db/schema'
import { readPlanFacts } from '~~/server/planning/facts'
import type { PlanFacts } from '~~/server/planning/facts'
import { batchToCome, factsWithBatch } from '~~/server/planning/facts-with-batch'
import type { BatchToCome } from '~~/server/planning/facts-with-batch'
import { activityId } from '~~/server/planning/ids'
import { studioProblem, zeroOf } from '~~/server/planning/problem'
import type { StudioProblem } from '~~/server/planning/problem'
import type { Search } from '~~/server/planning/search'
import { WaitsToCome } from '~~/server/planning/waits'
import type { Database } from '~~/server/utils/database'
import { absent, conflict, malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import { grouped } from '#shared/grouped'
import { openSpans } from '#shared/open-hours'
import type { Plan } from '#shared/planning/types'
import type { BatchToComeRequest, PushedBatch, StartPlan } from '#shared/schemas/promise'
import { startInstants } from '#shared/start-times'
import { studioZone } from '#shared/time'
import { fields, promiseRefusals } from '#shared/words/promise'

const minute = 60_000
/** Each way to start is searched for so long, ms: four of them and what is around them stay under two seconds. */
const searchMs = 160
/** A batch that ends so little later is not pushed, minutes (planning value). */
const pushedMin = 30

interface Asked { start: StartPlan['start'], at: number, pinned: boolean }

/**
 * What it would mean to start a batch now, this afternoon, at the next opening, or when it suits best: planned on a copy, nothing is stored.
 * Now, the afternoon and the opening begin the first step at that hour, come what may; the best leaves it to the plan.
 */
export async function checkStart(db: Database, studioId: number, request: BatchToComeRequest, now: number, search: Search): Promise<{ plans: StartPlan[] } | Refusal> {
  const facts = readPlanFacts(db, studioId)
  if (!facts) return absent()
  if (!facts.places.some(place => place.id === request.placeId)) return malformed({ placeId: promiseRefusals.noPlace })
  const given: Omit<BatchToCome, 'startsAt'> = { ...request, dueAt: request.dueAt === null ? null : Date.parse(request.dueAt) }
  const plans: StartPlan[] = []
  const batches = batchesOf(db, studioId)
  let waits: WaitsToCome | null = null
  for (const asked of startsToAsk(facts, now)) {
    const added = factsWithBatch(db, facts, { ...given, startsAt: asked.at }, asked.pinned ? asked.at : null)
    if (!added) return malformed({ scheduleId: fields.schedule })
    // What is to be put on is the same whenever it starts.
    waits ??= new WaitsToCome(db, added, now)
    const problem = studioProblem(added, waits, now)
    const solved = await search(`start ${asked.start}`, problem.problem, { millis: searchMs })
    if (!solved.ok) return conflict(promiseRefusals.newer)
    plans.push(startPlan(asked, solved.plan, problem, added, batches))
  }
  return { plans: bestFirst(plans) }
}

function startsToAsk(facts: PlanFacts, now: number): Asked[] {
  const { afternoon, opening } = startInstants(studioHours(facts), { now, zone: studioZone(facts.owner.zone) })
  const from = zeroOf(now)
  return [
    { start: 'now' as const, at: from, pinned: true },
    ...afternoon === null || afternoon <= from ? [] : [{ start: 'afternoon' as const, at: afternoon, pinned: true }],
    ...opening === null ? [] : [{ start: 'opening' as const, at: opening, pinned: true }],
    { start: 'best' as const, at: from, pinned: false },
  ]
}

function studioHours(facts: PlanFacts) {
  const own = <Row extends { memberId: number | null }>(rows: readonly Row[]) => rows.filter(row => row.memberId === null)
  return { open: own(facts.hours), closed: own(facts.closures) }
}

type Batches = ReadonlyMap<number, { name: string, promisedAt: number | null, dueAt: number | null }>

function batchesOf(db: Database, studioId: number): Batches {
  const rows = db.select({ id: batch.id, name: batch.name, promisedAt: order.promisedAt, dueAt: order.dueAt }).from(batch).leftJoin(order, eq(order.id, batch.orderId)).where(scoped(batch, studioId, isNull(batch.closedAt))).all()
  return new Map(rows.map(({ id, ...row }) => [id, row]))
}

/** Which batch each activity of a problem belongs to. */
function batchOfActivity(given: StudioProblem, facts: PlanFacts): Map<string, number> {
  const pieces = new Map(facts.pieces.map(piece => [piece.id, piece.batchId]))
  return new Map<string, number>(given.works.flatMap(({ step, turns }) => turns.map(turn => [activityId(turn.id), pieces.get(step.pieceId) ?? 0] as const)))
}

/** Reads off a plan what starting so would mean. */
function startPlan(asked: Asked, plan: Plan, given: StudioProblem, facts: PlanFacts, batches: Batches): StartPlan {
  const batchOf = batchOfActivity(given, facts)
  const own = plan.entries.filter(entry => batchOf.get(entry.activity) === batchToCome)
  const at = (minutes: number) => given.zeroAt + minutes * minute
  const startsAt = asked.pinned ? asked.at : own.length === 0 ? asked.at : at(Math.min(...own.map(entry => (entry.session === null ? null : plan.sessions[entry.session]?.start) ?? entry.start)))
  const pieceIds = new Set(facts.pieces.filter(piece => piece.batchId === batchToCome).map(piece => piece.id))
  const stepIds = new Set(facts.steps.filter(step => pieceIds.has(step.pieceId)).map(step => step.id))
  const turns = facts.turns.filter(turn => stepIds.has(turn.stepId)).length
  const spans = openSpans(studioHours(facts), studioZone(facts.owner.zone), startsAt, startsAt + minute)
  return {
    start: asked.start, startsAt, endsAt: own.length === 0 ? null : at(Math.max(...own.map(entry => entry.end))), missed: missedIn(plan, given, own.map(entry => entry.activity)),
    hands: handsIn(plan, given, new Set(own.map(entry => entry.activity))), pushes: pushedBy(plan, given, facts, batchOf, batches), without: turns - own.length, closed: spans.length === 0,
  }
}

/** Windows of the batch that shut with nobody at them, one for each step. */
function missedIn(plan: Plan, given: StudioProblem, own: readonly string[]): StartPlan['missed'] {
  const entries = new Map(plan.entries.map(entry => [entry.activity, entry]))
  const names = new Map<string, string>(given.works.flatMap(({ step, turns }) => turns.map(turn => [activityId(turn.id), step.name] as const)))
  const lags = grouped(given.problem.lags, lag => lag.to)
  const found = new Map<string, StartPlan['missed'][number]>()
  for (const id of own) {
    const entry = entries.get(id)
    if (!entry?.afterRecovery) continue
    for (const lag of lags.get(id) ?? []) {
      const origin = lag.from === null ? 0 : entries.get(lag.from)?.end
      const last = lag.windows[lag.windows.length - 1]
      if (origin === undefined || !last || last[1] === null || entry.start <= origin + last[1]) continue
      const step = names.get(id) ?? ''
      if (!found.has(step)) found.set(step, { step, opensAt: given.zeroAt + (origin + last[0]) * minute, shutsAt: given.zeroAt + (origin + last[1]) * minute })
    }
  }
  return [...found.values()]
}

/** The most people the batch keeps busy at once, and their minutes in all; set-up and clean-up count with the session they are for. */
function handsIn(plan: Plan, given: StudioProblem, own: ReadonlySet<string>): StartPlan['hands'] {
  const edges: [at: number, people: number][] = []
  let minutes = 0
  const take = (from: number, to: number, people: number) => {
    minutes += (to - from) * people
    edges.push([from, people], [to, -people])
  }
  for (const entry of plan.entries) if (own.has(entry.activity) && entry.session === null) take(entry.start, entry.end, entry.resources.length)
  const entryOf = new Map(plan.entries.map(entry => [entry.activity, entry]))
  for (const session of plan.sessions) {
    const entries = session.activities.flatMap(id => (own.has(id) ? entryOf.get(id) ?? [] : []))
    if (entries.length === 0) continue
    const family = given.problem.families.find(each => each.id === session.family)
    const from = Math.min(...entries.map(entry => entry.start)) - (family?.setup ?? 0)
    take(from, Math.max(...entries.map(entry => entry.end)) + (family?.cleanup ?? 0), session.resources.length)
  }
  let now = 0
  let most = 0
  for (const [, people] of edges.sort((a, b) => a[0] - b[0] || a[1] - b[1])) most = Math.max(most, now += people)
  return { most, minutes }
}

/** Batches that end later than in the plan that stands, the furthest first. */
function pushedBy(plan: Plan, given: StudioProblem, facts: PlanFacts, batchOf: ReadonlyMap<string, number>, batches: Batches): PushedBatch[] {
  const was = new Map<number, number>()
  const is = new Map<number, number>()
  for (const entry of facts.last) {
    const id = batchOf.get(activityId(entry.turnId))
    if (id !== undefined) was.set(id, Math.max(was.get(id) ?? -Infinity, entry.endsAt))
  }
  for (const entry of plan.entries) {
    const id = batchOf.get(entry.activity) ?? batchToCome
    is.set(id, Math.max(is.get(id) ?? -Infinity, given.zeroAt + entry.end * minute))
  }
  return [...is].flatMap(([id, end]): PushedBatch[] => {
    const before = was.get(id)
    const row = batches.get(id)
    const minutes = before === undefined ? 0 : Math.round((end - before) / minute)
    if (!row || before === undefined || minutes < pushedMin) return []
    const passes = (limit: number | null) => limit !== null && before <= limit && end > limit
    const wasPast = [row.promisedAt, row.dueAt].some(limit => limit !== null && before > limit)
    return [{ id, name: row.name, minutes, past: passes(row.promisedAt) ? 'promise' : passes(row.dueAt) ? 'date' : wasPast ? 'late already' : null }]
  }).sort((a, b) => b.minutes - a.minutes)
}

/**
 * The best is a start at an hour of work, with the fewest windows missed, then the fewest dates broken or late ones made later, then the earliest end, which what
 * others end later counts against: where one of the set hours is as good as the plan's own choice, that hour is it.
 */
export function bestFirst(plans: readonly StartPlan[]): StartPlan[] {
  const free = plans.find(plan => plan.start === 'best')
  const rank = (plan: StartPlan) => [Number(plan.closed), plan.without, plan.missed.length, plan.pushes.filter(push => push.past !== null).length, (plan.endsAt ?? Infinity) + plan.pushes.reduce((sum, push) => sum + push.minutes, 0) * minute] as const
  const better = (a: StartPlan, b: StartPlan) => {
    const [x, y] = [rank(a), rank(b)]
    const at = x.findIndex((value, i) => value !== y[i])
    return at >= 0 && x[at]! < y[at]!
  }
  const set = plans.filter(plan => plan.start !== 'best')
  const best = free && set.reduce((found, plan) => (better(plan, found) ? plan : found), free)
  return best ? [...set, { ...best, start: 'best' }] : [...set]
}
