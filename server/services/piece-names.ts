import { eq, inArray } from 'drizzle-orm'
import { batch, carrier, material, materialVersion, place } from '~~/db/schema'
import type { act } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { FoldedPiece } from '~~/server/work/refold'
import { airNoteKinds, goneWays, holds, milestoneNames } from '#shared/terms'
import type { ActDetail } from '#shared/words/steps'

type ActRow = typeof act.$inferSelect

/** The names of some editions of materials, those of hidden ones left out. Of a mix its name alone: what is in it is nobody's business here. */
export function materialNames(db: Database, studioId: number, versionIds: readonly number[], hidden: ReadonlySet<number> = new Set()): Map<number, string> {
  if (versionIds.length === 0) return new Map()
  const rows = db.select({ id: materialVersion.id, materialId: material.id, name: material.name }).from(materialVersion).innerJoin(material, eq(material.id, materialVersion.materialId))
    .where(scoped(materialVersion, studioId, inArray(materialVersion.id, [...new Set(versionIds)]))).all()
  return new Map(rows.filter(row => !hidden.has(row.materialId)).map(row => [row.id, row.name]))
}

const text = (value: unknown) => (typeof value === 'string' && value !== '' ? value : null)
const number = (value: unknown) => (typeof value === 'number' ? value : null)

/**
 * What each act was about, in the names the studio knows: its step, material, place, rung, reason.
 * @param hidden materials whose names are not for the reader: one of them told by mistake and taken back is still in the history
 */
export function actDetails(db: Database, studioId: number, { folded }: FoldedPiece, acts: readonly ActRow[], hidden: ReadonlySet<number>): (row: ActRow) => ActDetail {
  const materials = materialNames(db, studioId, acts.flatMap(row => number(row.body.materialVersionId) ?? []), hidden)
  const places = new Map(db.select({ id: place.id, name: place.name }).from(place).where(scoped(place, studioId)).all().map(row => [row.id, row.name]))
  const carriers = new Map(db.select({ id: carrier.id, name: carrier.name }).from(carrier).where(scoped(carrier, studioId)).all().map(row => [row.id, row.name]))
  const batches = new Map(acts.some(row => row.kind === 'regrouped') ? db.select({ id: batch.id, name: batch.name }).from(batch).where(scoped(batch, studioId)).all().map(row => [row.id, row.name]) : [])
  const steps = new Map(folded.steps.map(step => [step.key, step]))
  return ({ kind, body }) => {
    const step = steps.get(text(body.step) ?? text(body.to) ?? '')
    const where = places.get(number(body.placeId) ?? 0) ?? null
    const carried = carriers.get(number(body.carrierId) ?? 0) ?? null
    const versionId = number(body.materialVersionId)
    const named = versionId === null || materials.has(versionId)
    return {
      step: step?.name ?? (named ? text(body.name) : null), material: materials.get(versionId ?? 0) ?? null,
      milestone: milestoneNames.find(name => name === body.milestone) ?? null, reached: body.reached === true,
      hold: holds.find(hold => hold === body.hold) ?? (kind === 'it is out' ? null : step?.hold ?? null),
      place: carried && where ? `${where}, ${carried}` : where, reason: text(body.reason) ?? text(body.recovery),
      air: airNoteKinds.find(each => each === body.kind) ?? null, gone: goneWays.find(way => way === body.how) ?? null, batch: kind === 'regrouped' ? text(body.name) ?? batches.get(number(body.batchId) ?? 0) ?? null : null, answer: text(body.question) && text(body.answer) ? `${text(body.question)}, ${text(body.answer)}` : text(body.answer),
    }
  }
}
