import { and, eq, isNull, max } from 'drizzle-orm'
import { batch, member, openHours, order, reading, room } from '~~/db/schema'
import { readPlanFacts } from '~~/server/planning/facts'
import type { PlanFacts } from '~~/server/planning/facts'
import { studioProblem } from '~~/server/planning/problem'
import type { StudioProblem } from '~~/server/planning/problem'
import { WaitsToCome } from '~~/server/planning/waits'
import { wetCoats } from '~~/server/services/vapour-facts'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, impossible } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { predictPieces } from '~~/server/work/predict'
import type { WhatIf } from '#shared/schemas/what-if'
import { isSolventBorne } from '#shared/vapour/facts'
import { whatIfWords } from '#shared/words/what-if'

class Undone extends Error {}

/** What a piece of work makes of the studio, read and then undone: nothing of it is ever committed, and nobody else reads meanwhile. */
function undone<T>(db: Database, work: (tx: Transaction) => T): T {
  const kept: { result?: T } = {}
  try {
    db.transaction((tx) => {
      kept.result = work(tx)
      throw new Undone()
    }, { behavior: 'immediate' })
  }
  catch (error) {
    if (!(error instanceof Undone)) throw error
  }
  return kept.result as T
}

/** `caution`: what must be done before the change may last. */
export interface Changed { facts: PlanFacts, given: StudioProblem, caution: string | null }

const aDay = 24 * 60 * 60_000

/** When the plan in force first puts solvent on in a room, ms UTC; 0 where it is to come and nobody knows when. */
function firstSolvent(facts: PlanFacts, given: StudioProblem, roomId: number): number | null {
  const starts = new Map(facts.last.map(entry => [entry.turnId, entry.startsAt]))
  const turns = given.works.filter(work => work.roomId === roomId && facts.vapour.solventVersions.has(work.step.materialVersionId ?? 0)).flatMap(work => work.turns.filter(turn => turn.kind === 'work'))
  return turns.length === 0 ? null : Math.min(...turns.map(turn => starts.get(turn.id) ?? 0))
}

/**
 * The planner's problem as it would be after one change, from the same rows and reckoning as ever: the change is made,
 * read and undone in one transaction. Refused where a caution forbids the change, with its sentence.
 * @param change null: as things are
 * @param now ms UTC
 */
export function changedProblem(db: Database, studioId: number, change: WhatIf | null, now: number): Changed | Refusal {
  return undone(db, (tx): Changed | Refusal => {
    const refusal = change && make(tx, studioId, change, now)
    if (refusal) return refusal
    const read = readPlanFacts(db, studioId)
    if (!read) return absent()
    const facts = change?.kind === 'places' ? withPlaces(read, change) : read
    if (!facts) return absent(whatIfWords.noSuchPlace)
    const given = studioProblem(facts, new WaitsToCome(db, facts, now), now)
    const airRoom = change?.kind === 'heat' || change?.kind === 'humidity' ? change.roomId : null
    const planned = airRoom === null ? null : firstSolvent(facts, given, airRoom)
    const name = facts.vapour.rooms.get(airRoom ?? 0)?.name ?? ''
    if (planned !== null && planned < now + aDay) return impossible(whatIfWords.solventPlanned(name))
    return { facts, given, caution: planned === null ? null : whatIfWords.solventLater(name) }
  })
}

function withPlaces(facts: PlanFacts, { placeKind, more }: Extract<WhatIf, { kind: 'places' }>): PlanFacts | null {
  const place = facts.places.find(each => each.kind === placeKind)
  return place ? { ...facts, places: facts.places.map(each => each === place ? { ...each, capacity: each.capacity + more } : each) } : null
}

function make(tx: Transaction, studioId: number, change: WhatIf, now: number): Refusal | null {
  switch (change.kind) {
    case 'places': return null
    case 'humidity':
    case 'heat': return setAir(tx, studioId, change, now)
    case 'open day': return open(tx, studioId, null, change)
    case 'hours of': return open(tx, studioId, change.memberId, change)
    case 'due': return setDue(tx, studioId, change)
  }
}

/** The room's air held at one figure from now on. Never where solvent is drying: a heater or a motor there is not to be thought of. */
function setAir(tx: Transaction, studioId: number, change: Extract<WhatIf, { kind: 'humidity' | 'heat' }>, now: number): Refusal | null {
  const row = tx.select({ id: room.id, name: room.name }).from(room).where(owned(room, studioId, change.roomId)).get()
  if (!row) return absent()
  if ((wetCoats(tx, studioId, now).get(row.id) ?? []).some(coat => isSolventBorne(coat.solvent))) return impossible(whatIfWords.solventWet(row.name))
  const at = tx.select({ at: max(reading.at) }).from(reading).where(scoped(reading, studioId, eq(reading.roomId, row.id))).get()?.at ?? null
  const last = at === null ? null : tx.select().from(reading).where(scoped(reading, studioId, eq(reading.roomId, row.id), eq(reading.at, at))).get()
  const rh = change.kind === 'humidity' ? change.rh : last?.rh ?? null
  const tempC = change.kind === 'heat' ? change.tempC : last?.tempC ?? null
  if (rh === null) return impossible(whatIfWords.noAir(row.name))
  tx.insert(reading).values({ studioId, roomId: row.id, at: Math.max(now, (at ?? 0) + 1), toldAt: now, tempC, rh, source: 'note' }).run()
  // A heater or a dehumidifier works through the night.
  tx.update(room).set({ nightDropC: 0 }).where(owned(room, studioId, row.id)).run()
  predictPieces(tx, studioId, null, now)
  return null
}

/** Longer hours on one weekday, of the studio or of one person, who keeps the studio's other days. */
function open(tx: Transaction, studioId: number, memberId: number | null, { weekday, fromMin, toMin }: Extract<WhatIf, { kind: 'open day' | 'hours of' }>): Refusal | null {
  if (memberId !== null && !tx.select({ id: member.id }).from(member).where(scoped(member, studioId, eq(member.id, memberId), isNull(member.leftAt))).get()) return absent()
  const rows = tx.select().from(openHours).where(scoped(openHours, studioId)).all()
  const own = rows.filter(each => each.memberId === memberId)
  if (memberId !== null && own.length === 0) tx.insert(openHours).values(rows.filter(each => each.memberId === null && each.weekday !== weekday).map(({ weekday: other, fromMin: from, toMin: to }) => ({ studioId, memberId, weekday: other, fromMin: from, toMin: to }))).run()
  tx.delete(openHours).where(and(scoped(openHours, studioId, eq(openHours.weekday, weekday), memberId === null ? isNull(openHours.memberId) : eq(openHours.memberId, memberId)))).run()
  tx.insert(openHours).values({ studioId, memberId, weekday, fromMin, toMin }).run()
  return null
}

function setDue(tx: Transaction, studioId: number, { batchId, dueAt }: Extract<WhatIf, { kind: 'due' }>): Refusal | null {
  const row = tx.select({ orderId: batch.orderId }).from(batch).where(owned(batch, studioId, batchId)).get()
  if (!row) return absent()
  if (row.orderId === null) return impossible(whatIfWords.noOrder)
  tx.update(order).set({ dueAt: Date.parse(dueAt) }).where(owned(order, studioId, row.orderId)).run()
  return null
}
