import { sql } from 'drizzle-orm'
import { check, index, integer, sqliteTable, text, unique } from 'drizzle-orm/sqlite-core'
import { belongsTo, id, instant, oneOf, studioKey, within } from './columns'
import { materialVersion } from './materials'
import { piece } from './pieces'
import { member, studioColumn } from './studio'
import { photoMoments } from '#shared/terms'
import type { PhotoMoment } from '#shared/terms'

/**
 * A photograph of a piece, before or after one of its steps; without a step it is of the piece as it is. The files hang on it as
 * attachments. `removedAt`: taken away, and for a day still to be had back.
 */
export const photo = sqliteTable('photo', {
  id: id(),
  studioId: studioColumn(),
  pieceId: integer('piece_id').notNull(),
  /** The step's key in the piece: a step that no schedule asked for may go with a correction, and the photograph stays. */
  stepKey: text('step_key'),
  moment: text('moment').$type<PhotoMoment>().notNull(),
  caption: text('caption').notNull().default(''),
  width: integer('width').notNull(),
  height: integer('height').notNull(),
  addedAt: instant('added_at').notNull(),
  memberId: integer('member_id').notNull(),
  clientKey: text('client_key').notNull(),
  removedAt: instant('removed_at'),
}, t => [
  studioKey(t), belongsTo(t, t.pieceId, piece), within(t, t.memberId, member), unique().on(t.studioId, t.clientKey), oneOf('photo_moment', t.moment, photoMoments),
  check('photo_size', sql`${t.width} > 0 and ${t.height} > 0`), index('photo_of_piece').on(t.pieceId), index('photo_removed').on(t.removedAt).where(sql`${t.removedAt} is not null`),
])

/** A file in the storage folder: a photograph in two sizes, or the data sheet of an edition of a material. */
export const attachment = sqliteTable('attachment', {
  id: id(),
  studioId: studioColumn(),
  photoId: integer('photo_id'),
  materialVersionId: integer('material_version_id'),
  kind: text('kind').$type<'photo' | 'thumbnail' | 'data sheet'>().notNull(),
  sha256: text('sha256').notNull(),
  bytes: integer('bytes').notNull(),
  name: text('name'),
  addedAt: instant('added_at'),
}, t => [
  studioKey(t), within(t, t.photoId, photo), within(t, t.materialVersionId, materialVersion), oneOf('attachment_kind', t.kind, ['photo', 'thumbnail', 'data sheet']),
  check('attachment_bytes', sql`${t.bytes} > 0`), check('attachment_of_one', sql`(${t.photoId} is null) <> (${t.materialVersionId} is null)`),
])
