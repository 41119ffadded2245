import { sql } from 'drizzle-orm'
import { check, index, integer, primaryKey, real, sqliteTable, text, unique, uniqueIndex } from 'drizzle-orm/sqlite-core'
import { intakeQuestions } from '#shared/terms'
import type { GoneWay, IntakeQuestion } from '#shared/terms'
import { act } from './acts'
import { id, instant, oneOf, studioKey, within } from './columns'
import { carrier, place } from './places'
import { scheduleVersion } from './schedules'
import { studioColumn } from './studio'

export const order = sqliteTable('order', {
  id: id(),
  studioId: studioColumn(),
  name: text('name').notNull(),
  dueAt: instant('due_at'),
  promisedAt: instant('promised_at'),
  /** Who is to hear of it when its date slips, and how; null: whoever ordered it. */
  tell: text('tell'),
  weight: integer('weight').notNull().default(1),
  closedAt: instant('closed_at'),
}, t => [studioKey(t), check('order_weight', sql`${t.weight} between 1 and 5`)])

/** What was promised, when, and on what grounds. Append only. */
export const promise = sqliteTable('promise', {
  id: id(),
  studioId: studioColumn(),
  orderId: integer('order_id').notNull(),
  madeAt: instant('made_at').notNull(),
  likelyAt: instant('likely_at').notNull(),
  dateAt: instant('date_at').notNull(),
  causes: text('causes', { mode: 'json' }).$type<Record<string, number>>().notNull(),
}, t => [studioKey(t), within(t, t.orderId, order)])

export const batch = sqliteTable('batch', {
  id: id(),
  studioId: studioColumn(),
  orderId: integer('order_id'),
  scheduleVersionId: integer('schedule_version_id'),
  name: text('name').notNull(),
  actId: integer('act_id').notNull(),
  startsAt: instant('starts_at').notNull(),
  closedAt: instant('closed_at'),
}, t => [studioKey(t), within(t, t.orderId, order), within(t, t.scheduleVersionId, scheduleVersion), within(t, t.actId, act), index('batch_open').on(t.studioId).where(sql`${t.closedAt} is null`)])

/** A way of its own for pieces that dropped out of their batch, for a run to be levelled, say. */
export const branch = sqliteTable('branch', {
  id: id(),
  studioId: studioColumn(),
  batchId: integer('batch_id').notNull(),
  fromStepKey: text('from_step_key').notNull(),
  actId: integer('act_id').notNull(),
  rejoinedActId: integer('rejoined_act_id'),
}, t => [studioKey(t), within(t, t.batchId, batch), within(t, t.actId, act), within(t, t.rejoinedActId, act), unique().on(t.actId)])

/** `version` is sent with each act, so that two people at once end in one winner. */
export const piece = sqliteTable('piece', {
  id: id(),
  studioId: studioColumn(),
  batchId: integer('batch_id').notNull(),
  branchId: integer('branch_id'),
  name: text('name').notNull(),
  ordinal: integer('ordinal').notNull(),
  sizeUnits: integer('size_units').notNull().default(1),
  /** Surface that one coat all over covers, m2; null when nobody said. */
  areaM2: real('area_m2'),
  version: integer('version').notNull().default(1),
  goneAt: instant('gone_at'),
  goneHow: text('gone_how').$type<GoneWay>(),
  stepsDone: integer('steps_done').notNull().default(0),
  stepsOf: integer('steps_of').notNull().default(0),
}, t => [
  studioKey(t), within(t, t.batchId, batch), within(t, t.branchId, branch), unique().on(t.batchId, t.ordinal),
  check('piece_size', sql`${t.sizeUnits} > 0`), index('piece_here').on(t.studioId, t.batchId).where(sql`${t.goneAt} is null`),
  index('piece_gone').on(t.studioId, t.goneAt).where(sql`${t.goneAt} is not null`),
])

/** A simple piece has one part, 'whole'. Joining ends a part's own stay, it never deletes the part. */
export const part = sqliteTable('part', {
  id: id(),
  studioId: studioColumn(),
  pieceId: integer('piece_id').notNull(),
  key: text('key').notNull(),
  name: text('name').notNull(),
  grip: text('grip'),
  intoPartId: integer('into_part_id'),
  joinedActId: integer('joined_act_id'),
}, t => [
  studioKey(t), within(t, t.pieceId, piece), within(t, t.intoPartId, t), within(t, t.joinedActId, act), unique().on(t.pieceId, t.key),
  check('part_joined', sql`(${t.intoPartId} is null) = (${t.joinedActId} is null)`),
])

export const face = sqliteTable('face', {
  id: id(),
  studioId: studioColumn(),
  partId: integer('part_id').notNull(),
  key: text('key').notNull(),
  name: text('name').notNull(),
}, t => [studioKey(t), within(t, t.partId, part), unique().on(t.partId, t.key)])

export const actSubject = sqliteTable('act_subject', {
  studioId: studioColumn(),
  actId: integer('act_id').notNull(),
  partId: integer('part_id').notNull(),
  doneAt: instant('done_at').notNull(),
}, t => [primaryKey({ columns: [t.actId, t.partId] }), within(t, t.actId, act), within(t, t.partId, part), index('act_of_part').on(t.partId, t.actId)])

/** Where a part stands and since when. Places hold parts: a spine may be in clamps while its cover is on a shelf. */
export const stay = sqliteTable('stay', {
  id: id(),
  studioId: studioColumn(),
  partId: integer('part_id').notNull(),
  placeId: integer('place_id').notNull(),
  carrierId: integer('carrier_id'),
  fromActId: integer('from_act_id').notNull(),
  fromAt: instant('from_at').notNull(),
  toAt: instant('to_at'),
  seenAt: instant('seen_at').notNull(),
  missingSince: instant('missing_since'),
}, t => [
  studioKey(t), within(t, t.partId, part), within(t, t.placeId, place), within(t, t.carrierId, carrier), within(t, t.fromActId, act),
  unique().on(t.partId, t.fromActId),
  uniqueIndex('stay_now').on(t.partId).where(sql`${t.toAt} is null`),
  index('stay_in_place_now').on(t.placeId).where(sql`${t.toAt} is null`),
  index('stay_on_carrier').on(t.carrierId).where(sql`${t.carrierId} is not null`),
  check('stay_span', sql`${t.toAt} is null or ${t.toAt} >= ${t.fromAt}`),
])

/** Asked once of an old object: lead, arsenic-green, mould. Not tested is treated as there. */
export const intake = sqliteTable('intake', {
  id: id(),
  studioId: studioColumn(),
  pieceId: integer('piece_id').notNull(),
  question: text('question').$type<IntakeQuestion>().notNull(),
  answer: text('answer').$type<'open' | 'not tested' | 'tested, none' | 'tested, found'>().notNull().default('open'),
}, t => [
  studioKey(t), within(t, t.pieceId, piece), unique().on(t.pieceId, t.question),
  oneOf('intake_question', t.question, intakeQuestions), oneOf('intake_answer', t.answer, ['open', 'not tested', 'tested, none', 'tested, found']),
])
