import { asc, eq, inArray, isNull } from 'drizzle-orm'
import { airNote, coat, coatTarget, part, place, prediction, stay, studio, touchTest } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { airOf, roomAirs } from '~~/server/work/air'
import { dryingMaterials, preparedMaterials } from '~~/server/work/materials'
import { storePredictions } from '~~/server/work/store-predictions'
import { roomClock } from '#shared/drying/clock'
import type { RoomClock } from '#shared/drying/clock'
import type { AirSpan } from '#shared/drying/ladder'
import { predictCoat } from '#shared/drying/predict'
import type { CoatCase, CoatPrediction, RoomAir } from '#shared/drying/types'

type CoatRow = typeof coat.$inferSelect
type Reader = Database | Transaction

export interface PredictedCoat { coat: CoatRow, prediction: CoatPrediction }

/**
 * Foretells every film that can still change an answer and writes the difference: times, windows, chills, and which
 * films are settled. Runs inside the transaction of the change that asked for it, so no reader ever sees a coat
 * whose times are those of before.
 * @param pieceIds only these pieces; null means the whole studio, after a reading say
 */
export function predictPieces(tx: Transaction, studioId: number, pieceIds: readonly number[] | null, now: number) {
  storePredictions(tx, studioId, predictFilms(tx, studioId, pieceIds, now), now)
}

/** The same without writing: what the films of some pieces would do. */
export function predictFilms(db: Reader, studioId: number, pieceIds: readonly number[] | null, now: number): PredictedCoat[] {
  const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()
  const coats = db.select().from(coat).where(scoped(coat, studioId, isNull(coat.settledAt), isNull(coat.strippedAt), pieceIds ? inArray(coat.pieceId, [...pieceIds]) : undefined)).orderBy(asc(coat.endedAt)).all()
  if (!owner || coats.length === 0) return []
  const facts = readFacts(db, studioId, coats)
  const materials = dryingMaterials(db, studioId, coats.flatMap(each => each.materialVersionId ?? []))
  const since = coats.reduce((first, each) => Math.min(first, each.endedAt), now)
  const clockOf = clocks(roomAirs(db, owner, since), airOf(owner), since)
  return coats.flatMap((row) => {
    const material = row.materialVersionId === null ? undefined : materials.get(row.materialVersionId)
    if (!material) return []
    return [{ coat: row, prediction: predictCoat(preparedMaterials.prepare(material), caseOf(row, facts), spansOf(row, facts, clockOf), { now }) }]
  })
}

function readFacts(db: Reader, studioId: number, coats: readonly CoatRow[]) {
  const coatIds = coats.map(each => each.id)
  const pieceIds = [...new Set(coats.map(each => each.pieceId))]
  const targets = db.select().from(coatTarget).where(scoped(coatTarget, studioId, inArray(coatTarget.coatId, coatIds))).all()
  const parts = db.select({ id: part.id, into: part.intoPartId }).from(part).where(scoped(part, studioId, inArray(part.pieceId, pieceIds))).all()
  const partIds = parts.map(each => each.id)
  return {
    targets: group(targets, each => each.coatId),
    into: new Map(parts.map(each => [each.id, each.into])),
    stays: group(db.select({ partId: stay.partId, fromAt: stay.fromAt, toAt: stay.toAt, roomId: place.roomId }).from(stay).innerJoin(place, eq(place.id, stay.placeId))
      .where(scoped(stay, studioId, inArray(stay.partId, partIds))).orderBy(asc(stay.fromAt)).all(), each => each.partId),
    notes: group(db.select().from(airNote).where(scoped(airNote, studioId, inArray(airNote.partId, partIds))).all(), each => each.partId ?? 0),
    tests: group(db.select().from(touchTest).where(scoped(touchTest, studioId, inArray(touchTest.coatId, coatIds))).orderBy(asc(touchTest.at)).all(), each => each.coatId),
    beneath: curesBeneath(db, studioId, pieceIds),
  }
}
type Facts = ReturnType<typeof readFacts>

function group<Row>(rows: readonly Row[], key: (row: Row) => number): Map<number, Row[]> {
  const groups = new Map<number, Row[]>()
  for (const row of rows) groups.set(key(row), [...groups.get(key(row)) ?? [], row])
  return groups
}

/** For each coat of a piece, when it was last foretold to be cured: coats on top of it wait for that. */
function curesBeneath(db: Reader, studioId: number, pieceIds: readonly number[]) {
  const rows = db.select({ partId: coatTarget.partId, faceId: coatTarget.faceId, layer: coatTarget.layer, curedAt: prediction.likelyAt })
    .from(coat).innerJoin(coatTarget, eq(coatTarget.coatId, coat.id)).innerJoin(prediction, eq(prediction.coatId, coat.id))
    .where(scoped(coat, studioId, inArray(coat.pieceId, [...pieceIds]), isNull(coat.strippedAt), eq(prediction.milestone, 'cured'))).all()
  return group(rows, row => row.faceId ?? -row.partId)
}

function caseOf(row: CoatRow, facts: Facts): CoatCase {
  const on = facts.targets.get(row.id) ?? []
  const uncuredBeneath = Math.max(0, ...on.map(target => (facts.beneath.get(target.faceId ?? -target.partId) ?? [])
    .filter(each => each.layer < target.layer && (each.curedAt ?? Infinity) > row.endedAt).length))
  return {
    appliedAt: row.endedAt, size: row.size, ground: row.ground, uncuredBeneath,
    notes: on.flatMap(target => facts.notes.get(target.partId) ?? []).map(({ kind, fromAt, toAt }) => ({ kind, fromAt, toAt })),
    tests: (facts.tests.get(row.id) ?? []).map(({ at, milestone, reached, byRole }) => ({ at, milestone, reached, byRole })),
  }
}

/** The rooms a film has been in since it went on. A joined part has stood where its fellow stood. */
function spansOf(row: CoatRow, facts: Facts, clockOf: (roomId: number | null) => RoomClock): AirSpan[] {
  const first = facts.targets.get(row.id)?.[0]?.partId
  let partId = first ?? 0
  for (let depth = 0; depth < 20; depth++) partId = facts.into.get(partId) ?? partId
  const stays = [...facts.stays.get(partId) ?? [], ...(first === partId ? [] : facts.stays.get(first ?? 0) ?? [])].sort((a, b) => a.fromAt - b.fromAt)
  const since = stays.filter(each => each.toAt === null || each.toAt > row.endedAt)
  if (since.length === 0) return [{ clock: clockOf(stays[stays.length - 1]?.roomId ?? null), fromAt: row.endedAt, toAt: null }]
  return since.map((each, index) => ({
    clock: clockOf(each.roomId),
    fromAt: index === 0 ? row.endedAt : each.fromAt,
    toAt: since[index + 1]?.fromAt ?? null,
  }))
}

function clocks(airs: ReadonlyMap<number, RoomAir>, unknown: RoomAir, since: number) {
  const built = new Map<number | null, RoomClock>()
  return (roomId: number | null): RoomClock => {
    const known = built.get(roomId) ?? roomClock((roomId === null ? undefined : airs.get(roomId)) ?? unknown, since, preparedMaterials.tools)
    built.set(roomId, known)
    return known
  }
}
