import { and, eq, inArray, isNull } from 'drizzle-orm'
import { coat, coatTarget, face, material, materialVersion, stepTarget } from '~~/db/schema'
import type { Asked, Said } from '~~/server/services/advice/films'
import { aboutTurn } from '~~/server/services/advice/soon'
import type { SoonTurn } from '~~/server/services/advice/soon'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { systemRulesFor } from '#shared/library/systems'
import type { SystemRule } from '#shared/library/systems'
import { clockTime, studioZone } from '#shared/time'
import { startAdviceText } from '#shared/words/advice-start'
import type { StartAdvice } from '#shared/words/advice-start'

interface Beneath { key: string, endedAt: number, partId: number, faceId: number | null, layer: number }

/** Rules of one finish over another, where the film beneath has not lain as long as they ask. */
export function overAdvice({ db, owner, now }: Asked, soon: readonly SoonTurn[]): Said[] {
  const coats = soon.filter(({ turn }) => turn.step.kind === 'coat' && turn.step.materialVersionId !== null)
  if (coats.length === 0) return []
  const keyOf = libraryKeys(db, owner.id, coats.flatMap(each => each.turn.step.materialVersionId ?? []))
  const beneath = topFilms(db, owner.id, [...new Set(coats.map(each => each.pieceId))])
  const faces = facesOf(db, owner.id, coats.map(each => each.turn.step.id))
  const zone = studioZone(owner.zone)
  const said = (at: number) => clockTime(at, { now, zone })
  return coats.flatMap((each) => {
    const over = keyOf.get(each.turn.step.materialVersionId ?? 0)
    const own = faces.get(each.turn.step.id)
    const below = beneath.filter(film => each.turn.partIds.includes(film.partId) && (film.faceId === null || !own || own.size === 0 || own.has(film.faceId)))
    if (!over) return []
    const found = below.flatMap(film => systemRulesFor(film.key, over).flatMap(rule => ruleAdvice(rule, film.endedAt, each.at, said) ?? []))
    return found.slice(0, 1).map((facts): Said => ({ ...aboutTurn(each), code: facts.code, text: startAdviceText(facts, owner.units) }))
  })
}

/** What a rule says of laying something at `at` over a film that went on at `laidAt`, ms UTC; null once it has lain long enough. */
function ruleAdvice({ text, minMin, recommendedMin }: SystemRule, laidAt: number, at: number, said: (at: number) => string): StartAdvice | null {
  if (minMin === null) return { code: 'never-over', text }
  const laid = said(laidAt)
  const least = laidAt + minMin * 60_000
  if (at < least) return { code: 'over-too-early', text, laid, when: said(least) }
  const better = laidAt + (recommendedMin ?? minMin) * 60_000
  return at < better ? { code: 'over-better-later', text, laid, when: said(better) } : null
}

function libraryKeys(db: Database, studioId: number, versionIds: readonly number[]): Map<number, string | null> {
  const rows = db.select({ id: materialVersion.id, key: material.libraryKey }).from(materialVersion).innerJoin(material, eq(material.id, materialVersion.materialId))
    .where(scoped(materialVersion, studioId, inArray(materialVersion.id, [...versionIds]))).all()
  return new Map(rows.map(row => [row.id, row.key]))
}

/** The uppermost film of each face, or of each part without faces, dry or not. A glue line has no face and no layer above it. */
function topFilms(db: Database, studioId: number, pieceIds: number[]): Beneath[] {
  const rows = db.select({ key: material.libraryKey, endedAt: coat.endedAt, partId: coatTarget.partId, faceId: coatTarget.faceId, layer: coatTarget.layer }).from(coat)
    .innerJoin(coatTarget, eq(coatTarget.coatId, coat.id)).innerJoin(materialVersion, eq(materialVersion.id, coat.materialVersionId)).innerJoin(material, eq(material.id, materialVersion.materialId))
    .where(and(scoped(coat, studioId, inArray(coat.pieceId, pieceIds), isNull(coat.strippedAt), eq(coat.kind, 'coat')))).all()
  const top = new Map<string, Beneath>()
  for (const { key, ...row } of rows) {
    const place = `${row.partId} ${row.faceId}`
    const known = top.get(place)
    if (key !== null && (!known || row.layer > known.layer || (row.layer === known.layer && row.endedAt > known.endedAt))) top.set(place, { key, ...row })
  }
  return [...top.values()]
}

function facesOf(db: Database, studioId: number, stepIds: readonly number[]): Map<number, Set<number>> {
  const rows = db.select({ stepId: stepTarget.stepId, faceId: face.id }).from(stepTarget).innerJoin(face, eq(face.id, stepTarget.faceId)).where(scoped(stepTarget, studioId, inArray(stepTarget.stepId, [...new Set(stepIds)]))).all()
  const faces = new Map<number, Set<number>>()
  for (const { stepId, faceId } of rows) faces.set(stepId, (faces.get(stepId) ?? new Set()).add(faceId))
  return faces
}
