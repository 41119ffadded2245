import { and, desc, eq, isNotNull, like, or, sql } from 'drizzle-orm'
import { batch, order, piece } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { GonePieces, PieceMarks } from '#shared/schemas/piece-list'

/** Rows of a page of those that are gone. */
const page = 60

/**
 * What a search looks for beside names: every material that is on a piece, settled or not, and the codes of what it
 * stands on; and the edition it goes by. One row for each piece that is here, in one query.
 */
export function pieceMarks(db: Database, studioId: number): PieceMarks[] {
  const rows = db.all<{ id: number, edition: number | null, materials: string, codes: string }>(sql`
    select piece.id, batch.schedule_version_id as edition,
      (select json_group_array(distinct material.name) from coat join material_version version on version.id = coat.material_version_id join material on material.id = version.material_id
        where coat.piece_id = piece.id and coat.stripped_at is null) as materials,
      (select json_group_array(distinct carrier.code) from part join stay on stay.part_id = part.id and stay.to_at is null join carrier on carrier.id = stay.carrier_id where part.piece_id = piece.id) as codes
    from piece join batch on batch.id = piece.batch_id where piece.studio_id = ${studioId} and piece.gone_at is null order by piece.id`)
  return rows.map(row => ({ ...row, materials: JSON.parse(row.materials) as string[], codes: JSON.parse(row.codes) as string[] }))
}

/** LIKE's own signs in what was typed stand for themselves. */
const anywhere = (typed: string) => `%${typed.replace(/[\\%_]/g, sign => `\\${sign}`)}%`

/** Pieces that have left the studio, the last that went first. */
export function gonePieces(db: Database, studioId: number, find: string, after: number): GonePieces {
  const wanted = anywhere(find)
  const found = find === '' ? undefined : or(...[piece.name, batch.name, order.name].map(column => sql`${like(column, wanted)} escape '\\'`))
  const rows = db.select({ id: piece.id, name: piece.name, version: piece.version, batch: { id: batch.id, name: batch.name }, order: order.name, goneAt: piece.goneAt, how: piece.goneHow }).from(piece)
    .innerJoin(batch, eq(batch.id, piece.batchId)).leftJoin(order, eq(order.id, batch.orderId))
    .where(and(scoped(piece, studioId, isNotNull(piece.goneAt)), found)).orderBy(desc(piece.goneAt), desc(piece.id)).limit(page + 1).offset(after).all()
  return { pieces: rows.slice(0, page).flatMap(row => (row.goneAt === null ? [] : [{ ...row, goneAt: row.goneAt }])), more: rows.length > page }
}
