import { and, eq, inArray, isNull } from 'drizzle-orm'
import { coat, coatTarget, material, materialVersion, part, place, prediction, stay, studio } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { airOf, roomAirs } from '~~/server/work/air'
import { dryingMaterials, preparedMaterials } from '~~/server/work/materials'
import { airAt } from '#shared/air/room'
import { driverRate, explainRate } from '#shared/drying/rates'
import { trackRoom } from '#shared/drying/tools'
import type { DryingMaterial, RoomAir } from '#shared/drying/types'
import type { RateWire } from '#shared/schemas/rate'
import { milestoneNames } from '#shared/terms'

/** Why some films dry as fast as they do at `now` (ms UTC), in the air of the room they stand in. Films that have settled, or have no material, are left out. */
export function ratesOf(db: Database, studioId: number, coatIds: readonly number[], now: number): RateWire[] {
  const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()
  const coats = db.select({ id: coat.id, versionId: materialVersion.id, material: material.name }).from(coat)
    .innerJoin(materialVersion, eq(materialVersion.id, coat.materialVersionId)).innerJoin(material, eq(material.id, materialVersion.materialId))
    .where(scoped(coat, studioId, inArray(coat.id, [...coatIds]), isNull(coat.settledAt), isNull(coat.strippedAt))).all()
  if (!owner || coats.length === 0) return []
  const sheets = dryingMaterials(db, studioId, coats.map(each => each.versionId))
  const airs = roomAirs(db, owner, now)
  const roomOf = roomsOf(db, studioId, coats.map(each => each.id))
  const pending = rungsAhead(db, studioId, coats.map(each => each.id), now)
  return coats.flatMap((row) => {
    const sheet = sheets.get(row.versionId)
    const rung = sheet?.milestones.find(each => pending.get(row.id)?.has(each.name))
    return sheet && rung ? [{ coatId: row.id, material: row.material, ...rateAt(sheet, rung, airs.get(roomOf.get(row.id) ?? 0) ?? airOf(owner), now) }] : []
  })
}

function rateAt(sheet: DryingMaterial, rung: DryingMaterial['milestones'][number], room: RoomAir, now: number): Omit<RateWire, 'coatId' | 'material'> {
  const { tempC, rh, assumed } = airAt(trackRoom(preparedMaterials.tools, room, now), now)
  const { reference, minTempC } = sheet
  return {
    towards: milestoneNames.find(name => name === rung.name) ?? 'dry-to-handle',
    factor: explainRate(rung.driver, { tempC, rh }, reference, minTempC).factor,
    warmth: driverRate(rung.driver, { tempC, rh: reference.rh }, reference, minTempC),
    damp: driverRate(rung.driver, { tempC: reference.tempC, rh }, reference, minTempC),
    tempC, rh, assumed, sheetTempC: reference.tempC, sheetRh: reference.rh,
  }
}

/** The room each film stands in now, by coat. A joined part stands where its fellow stands. */
function roomsOf(db: Database, studioId: number, coatIds: number[]): Map<number, number> {
  const rows = db.select({ coatId: coatTarget.coatId, roomId: place.roomId }).from(coatTarget).innerJoin(part, eq(part.id, coatTarget.partId))
    .innerJoin(stay, and(isNull(stay.toAt), eq(stay.partId, part.id))).innerJoin(place, eq(place.id, stay.placeId))
    .where(scoped(coatTarget, studioId, inArray(coatTarget.coatId, coatIds))).all()
  return new Map(rows.map(row => [row.coatId, row.roomId]))
}

/** The rungs each film has not come to yet, by coat. */
function rungsAhead(db: Database, studioId: number, coatIds: number[], now: number): Map<number, Set<string>> {
  const rows = db.select({ coatId: prediction.coatId, name: prediction.milestone, likelyAt: prediction.likelyAt, reachedAt: prediction.reachedAt }).from(prediction)
    .where(scoped(prediction, studioId, inArray(prediction.coatId, coatIds))).all()
  const ahead = new Map<number, Set<string>>()
  for (const { coatId, name, likelyAt, reachedAt } of rows) {
    if (reachedAt !== null || (likelyAt !== null && likelyAt <= now)) continue
    ahead.set(coatId, (ahead.get(coatId) ?? new Set()).add(name))
  }
  return ahead
}
