import { and, asc, eq, isNull, sql } from 'drizzle-orm'
import { batch, order, piece, plan, planSession, prediction, room, coat, stay, part, reading } from '~~/db/schema'
import { readPlanFacts } from '~~/server/planning/facts'
import type { PlanFacts } from '~~/server/planning/facts'
import { handsOf } from '~~/server/planning/hands'
import { memberNames } from '~~/server/services/member-names'
import { slippingPromises } from '~~/server/services/promises'
import { peak, placeUses } from '~~/server/services/week-places'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { lateCause } from '#shared/planning/late-cause'
import type { BatchLoad, Evidence, Load, PersonLoad, PlaceLoad, WeekDay, WeekState } from '#shared/schemas/week'
import { addDays, localDate, localDay, studioZone, weekdayOf } from '#shared/time'
import type { StudioZone } from '#shared/time'

const minute = 60_000
const daysShown = 7

interface Span { from: number, to: number }

/** Load against capacity for the coming seven days, batches against their dates, and what that rests on. `now` in ms UTC; `tells`: whether the reader may know whom a slip is told to. */
export function weekLoad(db: Database, studioId: number, now: number, tells = false): WeekState | null {
  const facts = readPlanFacts(db, studioId)
  if (!facts) return null
  const zone = studioZone(facts.owner.zone)
  const days = daysOf(facts, zone, now)
  const spans = days.map(day => localDay(day.date, zone)).map(({ from, to }) => ({ from: Math.max(from, now), to }))
  const current = db.select().from(plan).where(scoped(plan, studioId, sql`${plan.current} = 1`)).get()
  return {
    at: now, planMadeAt: current?.madeAt ?? null, days,
    people: peopleLoad(db, facts, days, spans, zone), places: placeLoad(facts, spans, now),
    batches: batchLoads(db, facts, now, tells), clashes: current?.clashes ?? [], evidence: evidenceOf(db, studioId),
  }
}

function daysOf(facts: PlanFacts, zone: StudioZone, now: number): WeekDay[] {
  const today = localDate(now, zone)
  const weekdays = new Set(facts.hours.map(each => each.weekday))
  return Array.from({ length: daysShown }, (_, ahead) => {
    const date = addDays(today, ahead)
    const closure = facts.closures.find(each => each.memberId === null && each.fromDate <= date && date <= each.toDate)
    return { date, weekday: weekdayOf(date), today: ahead === 0, closed: closure ? closure.name : weekdays.has(weekdayOf(date)) ? null : '' }
  })
}

/** Minutes of some spans that lie in another, each minute once. */
function minutesIn(spans: readonly Span[], { from, to }: Span): number {
  let covered = from
  let total = 0
  for (const span of [...spans].sort((a, b) => a.from - b.from)) {
    const begins = Math.max(span.from, covered)
    const ends = Math.min(span.to, to)
    if (ends <= begins) continue
    total += ends - begins
    covered = ends
  }
  return Math.round(total / minute)
}

function peopleLoad(db: Database, facts: PlanFacts, days: readonly WeekDay[], spans: readonly Span[], zone: StudioZone): PersonLoad[] {
  const zeroAt = spans[0]?.from ?? 0
  const names = memberNames(db, facts.owner.id)
  const busy = busySpans(db, facts)
  const people = handsOf(facts, zone, zeroAt, spans[spans.length - 1]?.to ?? zeroAt).map(({ memberId, open }): PersonLoad => {
    const hours = open.map(([from, to]) => ({ from: zeroAt + from * minute, to: zeroAt + to * minute }))
    return { memberId, name: names.get(memberId) ?? '', days: spans.map((span, index) => ({ used: minutesIn(busy.get(memberId) ?? [], span), of: minutesIn(hours, span), away: isAway(facts, memberId, days[index]?.date ?? '') })) }
  })
  const more = secondHands(facts)
  const together = spans.map((span, index): Load => ({
    used: people.reduce((sum, person) => sum + (person.days[index]?.used ?? 0), 0) + more.reduce((sum, each) => sum + each.hands * minutesIn([each], span), 0),
    of: people.reduce((sum, person) => sum + (person.days[index]?.of ?? 0), 0), away: false,
  }))
  return [{ memberId: null, name: '', days: together }, ...people]
}

const isAway = (facts: PlanFacts, memberId: number, date: string) => facts.closures.some(each => each.memberId === memberId && each.fromDate <= date && date <= each.toDate)

/** When each person is taken: sessions with their set-up and clean-up, and what is done alone. */
function busySpans(db: Database, facts: PlanFacts): Map<number, Span[]> {
  const sessions = new Map(db.select().from(planSession).where(scoped(planSession, facts.owner.id)).all().map(each => [each.id, each]))
  const busy = new Map<number, Span[]>()
  for (const entry of facts.last) {
    if (entry.memberId === null) continue
    const session = sessions.get(entry.sessionId ?? 0)
    const span = session ? { from: session.startsAt, to: session.endsAt } : { from: entry.startsAt, to: entry.endsAt }
    busy.set(entry.memberId, [...busy.get(entry.memberId) ?? [], span])
  }
  return busy
}

/** Work that asks for more than one pair of hands: the plan names the first, the others count for everybody together. */
function secondHands(facts: PlanFacts): (Span & { hands: number })[] {
  const stepOf = new Map(facts.turns.map(turn => [turn.id, turn.stepId]))
  const hands = new Map(facts.steps.map(step => [step.id, step.hands]))
  return facts.last.flatMap((entry) => {
    const wanted = hands.get(stepOf.get(entry.turnId) ?? 0) ?? 1
    return wanted > 1 ? [{ from: entry.startsAt, to: entry.endsAt, hands: wanted - 1 }] : []
  })
}

function placeLoad(facts: PlanFacts, spans: readonly Span[], now: number): PlaceLoad[] {
  const uses = placeUses(facts, facts.last, now)
  const kinds = [...new Set(facts.places.map(place => place.kind))]
  return kinds.map((kind) => {
    const capacity = facts.places.filter(place => place.kind === kind).reduce((sum, place) => sum + place.capacity, 0)
    return { kind, capacity, days: spans.map(({ from, to }): Load => ({ used: peak(uses, kind, from, to), of: capacity, away: false })) }
  })
}

function batchLoads(db: Database, facts: PlanFacts, now: number, tells: boolean): BatchLoad[] {
  const rows = db.select({ id: batch.id, name: batch.name, beganAt: batch.startsAt, order: order.name, orderId: order.id, dueAt: order.dueAt }).from(batch).leftJoin(order, eq(order.id, batch.orderId))
    .where(scoped(batch, facts.owner.id, isNull(batch.closedAt))).orderBy(asc(batch.startsAt), asc(batch.id)).all()
  const batchOf = new Map(facts.pieces.map(each => [each.id, each.batchId]))
  const pieceOf = new Map(facts.steps.map(step => [step.id, step.pieceId]))
  const entries = new Map(facts.last.map(entry => [entry.turnId, entry]))
  const doubts = doubtOfFilms(db, facts.owner.id, now)
  const slipping = slippingPromises(db, facts.owner.id, tells)
  return rows.flatMap(({ orderId, ...row }) => {
    const pieces = facts.pieces.filter(each => each.batchId === row.id)
    if (pieces.length === 0) return []
    const turns = facts.turns.filter(turn => batchOf.get(pieceOf.get(turn.stepId) ?? 0) === row.id)
    const planned = turns.flatMap(turn => entries.get(turn.id) ?? [])
    const whole = turns.length > 0 && planned.length === turns.length
    const endsAt = whole ? Math.max(...planned.map(entry => entry.endsAt)) : null
    return [{ ...row, pieces: pieces.length, endsAt, latestAt: endsAt === null ? null : endsAt + (doubts.get(row.id) ?? 0), left: turns.length, without: turns.length - planned.length, slipping: slipping.get(orderId ?? 0) ?? null, late: endsAt === null || row.dueAt === null || endsAt <= row.dueAt ? null : lateCause(lastPiece(turns, entries, pieceOf), row.dueAt, now) }]
  })
}

/** What is planned of the piece of a batch that ends last. */
function lastPiece(turns: PlanFacts['turns'], entries: ReadonlyMap<number, PlanFacts['last'][number]>, pieceOf: ReadonlyMap<number, number>) {
  const planned = turns.flatMap((turn) => {
    const entry = entries.get(turn.id)
    return entry ? [{ piece: pieceOf.get(turn.stepId), entry }] : []
  })
  const last = planned.reduce<typeof planned[number] | undefined>((late, each) => (late === undefined || each.entry.endsAt > late.entry.endsAt ? each : late), undefined)
  return planned.filter(each => each.piece === last?.piece).map(each => each.entry)
}

/** By batch: how much later than nine in ten the slowest of its films may still come to the rung it is on the way to, ms. */
function doubtOfFilms(db: Database, studioId: number, now: number): Map<number, number> {
  const rows = db.select({ batchId: piece.batchId, coatId: coat.id, p90At: prediction.p90At, p98At: prediction.p98At }).from(coat)
    .innerJoin(piece, eq(piece.id, coat.pieceId)).innerJoin(prediction, eq(prediction.coatId, coat.id))
    .where(scoped(coat, studioId, isNull(coat.settledAt), isNull(coat.strippedAt), isNull(prediction.reachedAt), sql`${prediction.p90At} > ${now}`)).orderBy(asc(prediction.coatId), asc(prediction.ordinal)).all()
  const next = new Map(rows.toReversed().map(row => [row.coatId, row]))
  const doubts = new Map<number, number>()
  for (const { batchId, p90At, p98At } of next.values()) if (p90At !== null && p98At !== null) doubts.set(batchId, Math.max(doubts.get(batchId) ?? 0, p98At - p90At))
  return doubts
}

function evidenceOf(db: Database, studioId: number): Evidence {
  const seen = db.select({ standing: sql<number>`count(distinct ${part.pieceId})`, oldestSeenAt: sql<number | null>`min(${stay.seenAt})`, missing: sql<number>`count(distinct case when ${stay.missingSince} is not null then ${part.pieceId} end)` })
    .from(stay).innerJoin(part, eq(part.id, stay.partId)).innerJoin(piece, and(eq(piece.id, part.pieceId), isNull(piece.goneAt))).where(scoped(stay, studioId, isNull(stay.toAt))).get()
  const rooms = db.select({ name: room.name, readAt: sql<number | null>`max(${reading.at})` }).from(room).leftJoin(reading, eq(reading.roomId, room.id)).where(scoped(room, studioId)).groupBy(room.id).orderBy(asc(room.sort), asc(room.id)).all()
  const read = rooms.flatMap(each => each.readAt ?? [])
  return {
    standing: seen?.standing ?? 0, oldestSeenAt: seen?.oldestSeenAt ?? null, missing: seen?.missing ?? 0,
    unread: rooms.filter(each => each.readAt === null).map(each => each.name), oldestReadAt: read.length > 0 ? Math.min(...read) : null,
  }
}
