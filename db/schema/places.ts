import { sql } from 'drizzle-orm'
import { check, index, integer, real, sqliteTable, text, unique, uniqueIndex } from 'drizzle-orm/sqlite-core'
import { belongsTo, flag, id, instant, oneOf, studioKey, within } from './columns'
import { member, studioColumn } from './studio'
import { placeKinds, readingSources } from '#shared/terms'
import type { AirMove, PlaceKind, ReadingSource } from '#shared/terms'

/** A room with air of its own. Unknown volume or exhaust is null and never lowers a caution. */
export const room = sqliteTable('room', {
  id: id(),
  studioId: studioColumn(),
  name: text('name').notNull(),
  sort: integer('sort').notNull().default(0),
  heated: flag('heated').notNull(),
  outdoor: flag('outdoor').notNull().default(false),
  sprayArea: flag('spray_area').notNull().default(false),
  volumeM3: real('volume_m3'),
  exhaustM3H: real('exhaust_m3_h'),
  /** Air changes an hour without the exhaust, and how that air is moved. */
  airChangesPerHour: real('air_changes_per_hour'),
  airMoves: text('air_moves').$type<AirMove>(),
  sleptIn: flag('slept_in').notNull().default(false),
  nightDropC: real('night_drop_c').notNull(),
}, t => [
  studioKey(t), unique().on(t.studioId, t.name),
  check('room_volume', sql`${t.volumeM3} is null or ${t.volumeM3} > 0`),
  check('room_exhaust', sql`${t.exhaustM3H} is null or ${t.exhaustM3H} >= 0`),
  check('room_night_drop', sql`${t.nightDropC} between 0 and 30`),
])

/** Somewhere a part can stand, hang or be held. `capacity` counts size units. */
export const place = sqliteTable('place', {
  id: id(),
  studioId: studioColumn(),
  roomId: integer('room_id').notNull(),
  name: text('name').notNull(),
  kind: text('kind').$type<PlaceKind>().notNull(),
  capacity: integer('capacity').notNull(),
  sort: integer('sort').notNull().default(0),
  /** What its tag says; null until it has one. No carrier of the studio has the same. */
  code: text('code'),
}, t => [
  studioKey(t), within(t, t.roomId, room), unique().on(t.roomId, t.name), unique().on(t.studioId, t.code), oneOf('place_kind', t.kind, placeKinds),
  check('place_capacity', sql`${t.capacity} > 0`), index('place_of_studio').on(t.studioId, t.sort),
])

/** A board or tray that pieces stand on; it carries the tag, since a wet cover cannot. */
export const carrier = sqliteTable('carrier', {
  id: id(),
  studioId: studioColumn(),
  code: text('code').notNull(),
  name: text('name').notNull(),
}, t => [studioKey(t), unique().on(t.studioId, t.code), unique().on(t.studioId, t.name)])

/** A logger's file that was brought in: its readings come together and are taken back together. `lines` counts the readings it added. */
export const readingImport = sqliteTable('reading_import', {
  id: id(),
  studioId: studioColumn(),
  roomId: integer('room_id').notNull(),
  fileName: text('file_name').notNull(),
  fromAt: instant('from_at').notNull(),
  toAt: instant('to_at').notNull(),
  lines: integer('lines').notNull(),
  /** Readings of the file that the room had already. */
  known: integer('known').notNull().default(0),
  toldAt: instant('told_at').notNull(),
  memberId: integer('member_id'),
  clientKey: text('client_key').notNull(),
}, t => [
  studioKey(t), belongsTo(t, t.roomId, room), within(t, t.memberId, member), unique().on(t.studioId, t.clientKey),
  check('reading_import_lines', sql`${t.lines} > 0`), check('reading_import_order', sql`${t.fromAt} <= ${t.toAt}`),
])

/** A note of the air in a room. `doubt` is the extra log standard deviation of its source. */
/** A secret address at which a sensor tells the air of one room. What it sent last that could not be read is kept, so that it can be mended. */
export const sensorAddress = sqliteTable('sensor_address', {
  studioId: studioColumn(),
  roomId: integer('room_id').primaryKey(),
  tokenHash: text('token_hash').notNull().unique(),
  madeAt: instant('made_at').notNull(),
  heardAt: instant('heard_at'),
  refusedAt: instant('refused_at'),
  refusal: text('refusal'),
}, t => [belongsTo(t, t.roomId, room)])

export const reading = sqliteTable('reading', {
  id: id(),
  studioId: studioColumn(),
  roomId: integer('room_id').notNull(),
  at: instant('at').notNull(),
  toldAt: instant('told_at').notNull(),
  tempC: real('temp_c'),
  rh: real('rh').notNull(),
  source: text('source').$type<ReadingSource>().notNull(),
  doubt: real('doubt').notNull().default(0),
  memberId: integer('member_id'),
  clientKey: text('client_key'),
  /** The file it came with. */
  importId: integer('import_id'),
}, t => [
  studioKey(t), within(t, t.roomId, room), within(t, t.memberId, member), belongsTo(t, t.importId, readingImport),
  index('reading_of_import').on(t.importId).where(sql`${t.importId} is not null`),
  uniqueIndex('reading_once').on(t.roomId, t.at, t.source),
  uniqueIndex('reading_client_key').on(t.studioId, t.clientKey),
  oneOf('reading_source', t.source, readingSources),
  check('reading_rh', sql`${t.rh} between 0 and 1`),
  check('reading_temp', sql`${t.tempC} is null or ${t.tempC} between -40 and 60`),
  check('reading_doubt', sql`${t.doubt} >= 0`),
])
