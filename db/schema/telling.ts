import { sql } from 'drizzle-orm'
import { check, index, integer, primaryKey, sqliteTable, text, unique } from 'drizzle-orm/sqlite-core'
import { channels, deliveryStatuses, reminderStatuses } from '#shared/terms'
import type { CallKind, Channel } from '#shared/terms'
import { belongsTo, id, instant, oneOf, studioKey, within } from './columns'
import { member, studioColumn } from './studio'
import { act } from './acts'

/** When a member is not to be called, in local wall time: minutes since midnight, perhaps over midnight. Fire calls are made all the same. */
export const quietHours = sqliteTable('quiet_hours', {
  studioId: studioColumn(),
  memberId: integer('member_id').primaryKey(),
  fromMin: integer('from_min').notNull(),
  toMin: integer('to_min').notNull(),
}, t => [
  belongsTo(t, t.memberId, member),
  check('quiet_hours_span', sql`${t.fromMin} between 0 and 1439 and ${t.toMin} between 0 and 1439 and ${t.fromMin} <> ${t.toMin}`),
])

/** Why anybody is called at all. `groupKey` keeps twelve covers of one row to one call. */
export const cause = sqliteTable('cause', {
  id: id(),
  studioId: studioColumn(),
  kind: text('kind').$type<CallKind>().notNull(),
  subjectType: text('subject_type').notNull(),
  subjectId: integer('subject_id').notNull(),
  groupKey: text('group_key').notNull(),
  madeAt: instant('made_at').notNull(),
}, t => [studioKey(t), unique().on(t.studioId, t.kind, t.subjectType, t.subjectId, t.groupKey)])

/** A call to make. It moves with the prediction, is made once, and is withdrawn when answered. */
export const reminder = sqliteTable('reminder', {
  id: id(),
  studioId: studioColumn(),
  causeId: integer('cause_id').notNull(),
  stage: text('stage').notNull(),
  repeat: integer('repeat').notNull().default(0),
  dueAt: instant('due_at').notNull(),
  status: text('status').$type<'due' | 'claimed' | 'sent' | 'answered' | 'withdrawn'>().notNull().default('due'),
  leaseUntil: instant('lease_until'),
  sentAt: instant('sent_at'),
  answeredActId: integer('answered_act_id'),
  title: text('title').notNull(),
  body: text('body').notNull(),
  path: text('path').notNull(),
}, t => [
  studioKey(t), within(t, t.causeId, cause), within(t, t.answeredActId, act), unique().on(t.causeId, t.stage, t.repeat),
  oneOf('reminder_status', t.status, reminderStatuses), index('reminder_due').on(t.status, t.dueAt),
])

/** A browser that asked to be called. */
export const subscription = sqliteTable('subscription', {
  id: id(),
  studioId: studioColumn(),
  memberId: integer('member_id').notNull(),
  endpoint: text('endpoint').notNull(),
  p256dh: text('p256dh').notNull(),
  auth: text('auth').notNull(),
  device: text('device').notNull().default(''),
  madeAt: instant('made_at').notNull(),
  goneAt: instant('gone_at'),
}, t => [studioKey(t), within(t, t.memberId, member), unique().on(t.studioId, t.endpoint)])

/** One sending of one reminder to one endpoint. `stableId` is committed before the send and used again on a retry. */
export const delivery = sqliteTable('delivery', {
  id: id(),
  studioId: studioColumn(),
  reminderId: integer('reminder_id').notNull(),
  channel: text('channel').$type<Channel>().notNull(),
  endpointId: integer('endpoint_id').notNull(),
  memberId: integer('member_id').notNull(),
  status: text('status').$type<'queued' | 'sending' | 'accepted' | 'unknown' | 'gone' | 'failed'>().notNull(),
  stableId: text('stable_id').notNull().unique(),
  tries: integer('tries').notNull().default(0),
  nextTryAt: instant('next_try_at'),
  changedAt: instant('changed_at').notNull(),
  problem: text('problem'),
}, t => [
  studioKey(t), within(t, t.reminderId, reminder), within(t, t.memberId, member), unique().on(t.reminderId, t.channel, t.endpointId),
  oneOf('delivery_channel', t.channel, channels), oneOf('delivery_status', t.status, deliveryStatuses), index('delivery_open').on(t.status, t.nextTryAt),
])

export const seen = sqliteTable('seen', {
  studioId: studioColumn(),
  reminderId: integer('reminder_id').notNull(),
  memberId: integer('member_id').notNull(),
  at: instant('at').notNull(),
}, t => [primaryKey({ columns: [t.reminderId, t.memberId] }), within(t, t.reminderId, reminder), within(t, t.memberId, member)])
