import { and, desc, eq, gt, inArray, isNull } from 'drizzle-orm'
import { batch, face, finishingSchedule, materialVersion, part, piece, pieceStep, scheduleStep, scheduleVersion } from '~~/db/schema'
import type { studio } from '~~/db/schema'
import { scheduleMaterials } from '~~/server/services/schedule-materials'
import type { Database } from '~~/server/utils/database'
import { absent, impossible } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { foldPieces } from '~~/server/work/refold'
import type { FoldedPiece } from '~~/server/work/refold'
import { grouped } from '#shared/grouped'
import type { ScheduleOfferWire } from '#shared/schemas/schedule'
import type { DraftPart, ScheduleDraft } from '#shared/schemas/schedule-draft'
import { draftFromDone, filmsOf, likeness, longestRound } from '#shared/schedules/history'
import type { Done } from '#shared/schedules/history'
import { localDate, studioZone } from '#shared/time'
import type { StudioZone } from '#shared/time'
import { leavesFilm } from '#shared/step-kinds'
import type { Target } from '#shared/work/types'
import { scheduleRefusals } from '#shared/words/schedule-refusals'
import { keptName, onePart } from '#shared/words/schedule-names'

type StudioRow = typeof studio.$inferSelect

/** How often something is done alike before it is offered as a schedule. */
const alikeTimes = 3
/** How far back pieces without a schedule are looked at. */
const reach = 120 * 24 * 60 * 60_000

/** What was done to a piece and still stands, in the order it was done. `wanted` picks the steps. */
function doneTo({ parts, folded }: FoldedPiece, materials: ReadonlyMap<number, number>, zone: StudioZone, wanted: (origin: string) => boolean): Done[] {
  const spot = ({ partId, faceId }: Target) => {
    const on = parts.find(each => each.id === partId)
    return { part: on?.key ?? '', face: on?.faces.find(face => face.id === faceId)?.key ?? null }
  }
  const films = folded.coats.filter(coat => coat.strippedAt === null).flatMap((coat): Done[] => {
    const step = folded.steps.find(each => each.key === coat.turn?.step)
    if (!step || !wanted(step.origin)) return []
    const materialId = coat.materialVersionId === null ? null : materials.get(coat.materialVersionId) ?? null
    return [{ kind: coat.kind, name: step.origin === 'schedule' ? step.name : '', materialId, targets: coat.targets.map(spot), size: coat.size, ground: coat.ground, hold: coat.hold, minutes: (coat.endedAt - coat.beganAt) / 60_000, endedAt: coat.endedAt, day: localDate(coat.endedAt, zone) }]
  })
  const work = folded.steps.filter(step => !leavesFilm(step.kind) && step.status === 'done' && wanted(step.origin)).flatMap((step): Done[] => {
    const endedAt = step.turns.reduce((at, turn) => Math.max(at, turn.doneAt ?? 0), 0)
    return [{ kind: step.kind, name: step.name, materialId: null, targets: step.targets.map(spot), size: step.coatSize, ground: step.ground, hold: null, minutes: step.pieceMin, endedAt, day: localDate(endedAt, zone) }]
  })
  return [...films, ...work].sort((a, b) => a.endedAt - b.endedAt)
}

/** The material of each edition of a material. */
const materialsByVersion = (db: Database, studioId: number) => new Map(db.select({ id: materialVersion.id, materialId: materialVersion.materialId }).from(materialVersion).where(scoped(materialVersion, studioId)).all().map(row => [row.id, row.materialId]))

/** A schedule to be looked over, made of all that was done to one piece; nothing is kept by asking. */
export function draftOfPiece(db: Database, owner: StudioRow, pieceId: number): { draft: ScheduleDraft } | Refusal {
  const row = db.select({ name: piece.name, batch: batch.name }).from(piece).innerJoin(batch, eq(batch.id, piece.batchId)).where(owned(piece, owner.id, pieceId)).get()
  const [folded] = foldPieces(db, owner.id, [pieceId])
  if (!row || !folded) return absent()
  const done = doneTo(folded, materialsByVersion(db, owner.id), studioZone(owner.zone), () => true)
  if (done.length === 0) return impossible(scheduleRefusals.nothingDone)
  const grips = new Map(db.select({ id: part.id, grip: part.grip }).from(part).where(scoped(part, owner.id, eq(part.pieceId, pieceId))).all().map(each => [each.id, each.grip]))
  const names = new Map(Object.entries(faceNames(db, owner.id, pieceId)))
  const parts = folded.parts.filter(each => folded.parts.length === 1 || done.some(one => one.targets.some(target => target.part === each.key)))
    .map((each): DraftPart => ({ key: each.key, name: folded.parts.length === 1 && each.name === 'whole' ? onePart : each.name, grip: grips.get(each.id) ?? null, faces: each.faces.map(face => ({ key: face.key, name: names.get(String(face.id)) ?? face.key })) }))
  const sheets = new Map(scheduleMaterials(db, owner).materials.map(each => [each.id, each]))
  return { draft: draftFromDone(keptName(row.batch), parts, done, sheets) }
}

function faceNames(db: Database, studioId: number, pieceId: number): Record<string, string> {
  const rows = db.select({ id: face.id, name: face.name }).from(face).innerJoin(part, eq(part.id, face.partId)).where(scoped(face, studioId, eq(part.pieceId, pieceId))).all()
  return Object.fromEntries(rows.map(row => [row.id, row.name]))
}

/** The films of every schedule as it stands, to know again what has been kept already. */
function keptFilms(db: Database, studioId: number): Set<string> {
  const versions = db.select({ id: scheduleVersion.id, scheduleId: scheduleVersion.scheduleId }).from(scheduleVersion).innerJoin(finishingSchedule, eq(finishingSchedule.id, scheduleVersion.scheduleId))
    .where(scoped(scheduleVersion, studioId, isNull(finishingSchedule.archivedAt))).orderBy(desc(scheduleVersion.no)).all()
  const newest = versions.filter((row, at) => versions.findIndex(each => each.scheduleId === row.scheduleId) === at)
  const steps = db.select({ versionId: scheduleStep.versionId, kind: scheduleStep.kind, materialId: scheduleStep.materialId, perDay: scheduleStep.perDay, days: scheduleStep.days }).from(scheduleStep)
    .where(scoped(scheduleStep, studioId, inArray(scheduleStep.versionId, newest.map(row => row.id)))).orderBy(scheduleStep.ordinal).all()
  return new Set(newest.map(row => filmsOf(steps.filter(step => step.versionId === row.id))))
}

/**
 * What was put on outside any schedule often enough alike to be worth keeping: one coat three times in a row on a piece,
 * or a row of them on pieces at three different goings. The last piece of each, the commonest first.
 */
export function scheduleOffers(db: Database, owner: StudioRow, now: number): ScheduleOfferWire[] {
  const rows = db.selectDistinct({ id: piece.id, name: piece.name }).from(pieceStep).innerJoin(piece, eq(piece.id, pieceStep.pieceId)).innerJoin(batch, eq(batch.id, piece.batchId))
    .where(scoped(pieceStep, owner.id, and(eq(pieceStep.origin, 'unplanned'), gt(batch.startsAt, now - reach)))).orderBy(desc(piece.id)).limit(150).all()
  if (rows.length === 0) return []
  const materials = materialsByVersion(db, owner.id)
  const zone = studioZone(owner.zone)
  const found = foldPieces(db, owner.id, rows.map(row => row.id)).map((folded) => {
    const done = doneTo(folded, materials, zone, origin => origin === 'unplanned')
    return { id: folded.piece.id, name: folded.piece.name, done, going: folded.folded.coats.find(coat => coat.strippedAt === null)?.actId ?? 0 }
  }).filter(each => each.done.length > 0 && each.done.every(one => one.materialId !== null))
  const kept = keptFilms(db, owner.id)
  const groups = [...grouped(found, each => likeness(each.done)).values()].map((own) => {
    const last = own.reduce((newest, each) => (each.id > newest.id ? each : newest))
    return { last, times: Math.max(new Set(own.map(each => each.going)).size, longestRound(last.done)) }
  })
  return groups.filter(({ last, times }) => times >= alikeTimes && !kept.has(filmsOf(draftFromDone('', [], last.done, new Map()).steps)))
    .sort((a, b) => b.times - a.times || b.last.id - a.last.id)
    .map(({ last, times }) => ({ pieceId: last.id, pieceName: last.name, times, steps: last.done.length }))
}
