import { sql } from 'drizzle-orm'
import { check, integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import { id, instant, studioKey, within } from './columns'
import { room } from './places'
import { member, studioColumn } from './studio'

/**
 * A device that is signed in as the studio. `tokenHash` is of the pairing code until a device has given it, and of that
 * device's own secret from then on. Locked whenever `openTill` has passed; whoever gave a PIN acts at it until `asTill`.
 */
export const benchTablet = sqliteTable('bench_tablet', {
  id: id(),
  studioId: studioColumn(),
  name: text('name').notNull(),
  /** The room it stands in; null shows all rooms. */
  roomId: integer('room_id'),
  tokenHash: text('token_hash').notNull().unique(),
  /** Minutes without a touch until it locks. */
  lockMin: integer('lock_min').notNull().default(5),
  madeAt: instant('made_at').notNull(),
  pairsTill: instant('pairs_till'),
  pairedAt: instant('paired_at'),
  openTill: instant('open_till'),
  asMemberId: integer('as_member_id'),
  asTill: instant('as_till'),
  revokedAt: instant('revoked_at'),
}, t => [
  studioKey(t), within(t, t.roomId, room), within(t, t.asMemberId, member),
  check('bench_tablet_lock', sql`${t.lockMin} between 1 and 60`),
])
