import { sql } from 'drizzle-orm'
import { check, index, integer, real, sqliteTable, text, unique, uniqueIndex } from 'drizzle-orm/sqlite-core'
import { flag, id, instant, oneOf, studioKey, within } from './columns'
import { member, studio } from './studio'
import { placeKinds, readingSources } from '#shared/terms'
import type { AirMove, PlaceKind, ReadingSource } from '#shared/terms'

/** A room with air of its own. Unknown volume or exhaust is null and never lowers a caution. */
export const room = sqliteTable('room', {
  id: id(),
  studioId: integer('studio_id').notNull().references(() => studio.id, { onDelete: 'cascade' }),
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
  studioId: integer('studio_id').notNull().references(() => studio.id, { onDelete: 'cascade' }),
  roomId: integer('room_id').notNull(),
  name: text('name').notNull(),
  kind: text('kind').$type<PlaceKind>().notNull(),
  capacity: integer('capacity').notNull(),
  sort: integer('sort').notNull().default(0),
}, t => [
  studioKey(t), within(t, t.roomId, room), unique().on(t.roomId, t.name), oneOf('place_kind', t.kind, placeKinds),
  check('place_capacity', sql`${t.capacity} > 0`), index('place_of_studio').on(t.studioId, t.sort),
])

/** A board or tray that pieces stand on; it carries the tag, since a wet cover cannot. */
export const carrier = sqliteTable('carrier', {
  id: id(),
  studioId: integer('studio_id').notNull().references(() => studio.id, { onDelete: 'cascade' }),
  code: text('code').notNull(),
  name: text('name').notNull(),
}, t => [studioKey(t), unique().on(t.studioId, t.code)])

/** A note of the air in a room. `doubt` is the extra log standard deviation of its source. */
export const reading = sqliteTable('reading', {
  id: id(),
  studioId: integer('studio_id').notNull().references(() => studio.id, { onDelete: 'cascade' }),
  roomId: integer('room_id').notNull(),
  at: instant('at').notNull(),
  toldAt: instant('told_at').notNull(),
  tempC: real('temp_c'),
  rh: real('rh').notNull(),
  source: text('source').$type<ReadingSource>().notNull(),
  doubt: real('doubt').notNull().default(0),
  memberId: integer('member_id'),
  clientKey: text('client_key'),
}, t => [
  studioKey(t), within(t, t.roomId, room), within(t, t.memberId, member),
  uniqueIndex('reading_once').on(t.roomId, t.at, t.source),
  uniqueIndex('reading_client_key').on(t.studioId, t.clientKey),
  oneOf('reading_source', t.source, readingSources),
  check('reading_rh', sql`${t.rh} between 0 and 1`),
  check('reading_temp', sql`${t.tempC} is null or ${t.tempC} between -40 and 60`),
  check('reading_doubt', sql`${t.doubt} >= 0`),
])
