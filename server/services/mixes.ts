import { inArray } from 'drizzle-orm'
import { material } from '~~/db/schema'
import { addEdition, newestRow, partsOfEdition, readEditions } from '~~/server/services/material-editions'
import type { MixParts } from '~~/server/services/material-editions'
import { addMaterial, standing } from '~~/server/services/material-sheets'
import type { Kept } from '~~/server/services/material-sheets'
import type { Membership } from '~~/server/services/sessions'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { impossible, malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import type { Edition } from '#shared/data-sheet/complete'
import { mixedEdition, withoutName } from '#shared/data-sheet/mix'
import type { MixBody, MixPartsBody } from '#shared/schemas/material-edit'
import { mixRefusals } from '#shared/words/mixes'

type Parts = NonNullable<MixParts>

/** Whether a material is mixed from another, itself or through its parts. */
function holds(tx: Transaction, studioId: number, materialId: number, wanted: number, seen = new Set<number>()): boolean {
  if (materialId === wanted) return true
  if (seen.has(materialId)) return false
  seen.add(materialId)
  const version = newestRow(tx, studioId, materialId)
  return version !== null && (partsOfEdition(tx, studioId, version.id)?.parts ?? []).some(part => holds(tx, studioId, part.materialId, wanted, seen))
}

/** The edition that these parts make, or why they make none. @param own the mix that they are for, when it is there already */
function editionOfParts(tx: Transaction, studioId: number, { parts }: Parts, own: number | null): Edition | Refusal {
  const ids = parts.map(part => part.materialId)
  if (new Set(ids).size < ids.length) return malformed({ parts: mixRefusals.twice }, mixRefusals.twice)
  const rows = tx.select({ id: material.id, name: material.name, archivedAt: material.archivedAt }).from(material).where(scoped(material, studioId, inArray(material.id, ids))).all()
  if (rows.length < ids.length || rows.some(row => row.archivedAt !== null)) return malformed({ parts: mixRefusals.noMaterial }, mixRefusals.noMaterial)
  const circle = own === null ? undefined : rows.find(row => holds(tx, studioId, row.id, own))
  if (circle) return impossible(mixRefusals.itself(circle.name), { parts: mixRefusals.itself(circle.name) })
  const versions = ids.flatMap(id => newestRow(tx, studioId, id) ?? [])
  const editions = readEditions(tx, studioId, versions)
  const mixed = parts.flatMap((part) => {
    const edition = editions.get(versions.find(each => each.materialId === part.materialId)?.id ?? 0)
    const name = part.private ? rows.find(each => each.id === part.materialId)?.name : undefined
    return edition ? [{ parts: part.parts, edition: name === undefined ? edition : withoutName(edition, name) }] : []
  })
  if (new Set(mixed.map(each => each.edition.film)).size > 1) return impossible(mixRefusals.films, { parts: mixRefusals.films })
  return mixedEdition(mixed)
}

/** Keeps a new mix: a material like any other, whose ladder starts from its parts. */
export function createMix(db: Database, studioId: number, who: Membership, { name, ...parts }: MixBody, now: number): Kept {
  return change<Kept>(db, studioId, 'library', (tx): Kept => {
    const edition = editionOfParts(tx, studioId, parts, null)
    if ('ok' in edition) return edition
    const row = addMaterial(tx, studioId, name)
    if ('ok' in row) return row
    const { no } = addEdition(tx, studioId, { materialId: row.id, edition, parts, memberId: who.id, note: '', now })
    return { ok: true, id: row.id, no }
  })
}

/** Gives a mix other parts, or reckons it again from the newest figures of the same: a new edition. */
export function changeParts(db: Database, studioId: number, who: Membership, materialId: number, { basedOn, ...parts }: MixPartsBody, now: number): Kept {
  return change<Kept>(db, studioId, 'library', (tx): Kept => {
    const found = standing(tx, studioId, materialId, basedOn)
    if ('ok' in found) return found
    if (!partsOfEdition(tx, studioId, found.version.id)) return impossible(mixRefusals.notMix)
    const edition = editionOfParts(tx, studioId, parts, materialId)
    if ('ok' in edition) return edition
    const { no } = addEdition(tx, studioId, { materialId, edition, parts, memberId: who.id, note: '', now })
    return { ok: true, id: materialId, no }
  })
}
