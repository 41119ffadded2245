import { asc, eq, inArray, isNull } from 'drizzle-orm'
import { airNote, coat, coatTarget, part, place, prediction, stay, touchTest } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { preparedMaterials } from '~~/server/work/materials'
import { roomClock } from '#shared/drying/clock'
import type { RoomClock } from '#shared/drying/clock'
import type { AirSpan } from '#shared/drying/ladder'
import type { CoatCase, RoomAir } from '#shared/drying/types'

export type CoatRow = typeof coat.$inferSelect
type Reader = Database | Transaction

/** All that the films of some coats need besides their own rows, read at once. */
export function readFacts(db: Reader, studioId: number, coats: readonly CoatRow[]) {
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
export type Facts = ReturnType<typeof readFacts>

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

/** A coat as the drying clock asks for it. */
export function caseOf(row: CoatRow, facts: Facts): CoatCase {
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
export function spansOf(row: CoatRow, facts: Facts, clockOf: (roomId: number | null) => RoomClock): AirSpan[] {
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

/** One clock a room, built when a film first asks for it, from `since` (ms UTC) on. */
export function clocks(airs: ReadonlyMap<number, RoomAir>, unknown: RoomAir, since: number) {
  const built = new Map<number | null, RoomClock>()
  return (roomId: number | null): RoomClock => {
    const known = built.get(roomId) ?? roomClock((roomId === null ? undefined : airs.get(roomId)) ?? unknown, since, preparedMaterials.tools)
    built.set(roomId, known)
    return known
  }
}
