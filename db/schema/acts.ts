import { sql } from 'drizzle-orm'
import { check, index, integer, sqliteTable, text, unique } from 'drizzle-orm/sqlite-core'
import { actKinds, actors } from '#shared/terms'
import type { ActKind, Actor } from '#shared/terms'
import { flag, id, instant, oneOf, studioKey, within } from './columns'
import { member, studioColumn } from './studio'

/**
 * What somebody did, when, and when they told us. Acts are the only truth for work on pieces: they are never
 * updated; a correction is a new act that replaces one (`voided` when it only takes it back). `rootActId` is the
 * first act of such a chain and names what the act made, so that a correction keeps the coat's row and its tests.
 */
export const act = sqliteTable('act', {
  id: id(),
  studioId: studioColumn(),
  clientKey: text('client_key').notNull(),
  kind: text('kind').$type<ActKind>().notNull(),
  doneAt: instant('done_at').notNull(),
  toldAt: instant('told_at').notNull(),
  actor: text('actor').$type<Actor>().notNull(),
  memberId: integer('member_id'),
  replacesActId: integer('replaces_act_id'),
  rootActId: integer('root_act_id'),
  voided: flag('voided').notNull().default(false),
  body: text('body', { mode: 'json' }).$type<Record<string, unknown>>().notNull(),
}, t => [
  studioKey(t), within(t, t.memberId, member), within(t, t.replacesActId, t), within(t, t.rootActId, t),
  unique().on(t.studioId, t.clientKey), unique().on(t.replacesActId),
  oneOf('act_kind', t.kind, actKinds), oneOf('act_actor', t.actor, actors),
  check('act_member', sql`(${t.actor} = 'member') = (${t.memberId} is not null)`),
  index('act_told').on(t.studioId, t.toldAt),
])
