import { sql } from 'drizzle-orm'
import { check, index, integer, primaryKey, real, sqliteTable, text, unique } from 'drizzle-orm/sqlite-core'
import { milestoneNames, risks, stepOrigins, stepStatuses, turnKinds, turnStatuses } from '#shared/terms'
import type { MilestoneName, Risk, StepOrigin, StepStatus, TurnKind, TurnStatus } from '#shared/terms'
import { act } from './acts'
import { belongsTo, flag, id, instant, oneOf, studioKey, within } from './columns'
import { materialVersion } from './materials'
import { face, part, piece } from './pieces'
import { scheduleStep } from './schedules'
import { howDone, howDoneWords } from './step-columns'
import { member, studioColumn } from './studio'

/** A step of one piece, copied from the schedule at the start so that a recovery or a branch can be spliced in. `key` is unique in the piece and survives a refold. */
export const pieceStep = sqliteTable('piece_step', {
  id: id(),
  studioId: studioColumn(),
  pieceId: integer('piece_id').notNull(),
  key: text('key').notNull(),
  ordinal: real('ordinal').notNull(),
  name: text('name').notNull(),
  origin: text('origin').$type<StepOrigin>().notNull(),
  scheduleStepId: integer('schedule_step_id'),
  insertedByActId: integer('inserted_by_act_id'),
  materialVersionId: integer('material_version_id'),
  status: text('status').$type<StepStatus>().notNull().default('waiting'),
  asideReason: text('aside_reason'),
  ...howDone(),
  /** Nothing but drying stands before it, and something of it is left to do: the steps that screens read. */
  atFront: flag('at_front').notNull().default(false),
}, t => [
  studioKey(t), within(t, t.pieceId, piece), within(t, t.scheduleStepId, scheduleStep), within(t, t.insertedByActId, act), within(t, t.materialVersionId, materialVersion),
  unique().on(t.pieceId, t.key),
  ...howDoneWords('piece_step', t), oneOf('piece_step_origin', t.origin, stepOrigins), oneOf('piece_step_status', t.status, stepStatuses),
  check('piece_step_aside', sql`(${t.status} = 'set aside') = (${t.asideReason} is not null)`),
  index('piece_step_front').on(t.studioId, t.pieceId).where(sql`${t.atFront} = 1`),
  index('piece_step_open').on(t.studioId, t.pieceId).where(sql`${t.status} in ('waiting', 'doing', 'resting', 'set aside')`),
])

export const stepTarget = sqliteTable('step_target', {
  id: id(),
  studioId: studioColumn(),
  stepId: integer('step_id').notNull(),
  partId: integer('part_id').notNull(),
  faceId: integer('face_id'),
}, t => [studioKey(t), belongsTo(t, t.stepId, pieceStep), within(t, t.partId, part), within(t, t.faceId, face), index('step_target_of_step').on(t.stepId)])

export const stepLink = sqliteTable('step_link', {
  studioId: studioColumn(),
  fromStepId: integer('from_step_id').notNull(),
  toStepId: integer('to_step_id').notNull(),
  milestone: text('milestone').$type<MilestoneName>(),
  risk: text('risk').$type<Risk>().notNull(),
  windowed: flag('windowed').notNull().default(false),
}, t => [
  primaryKey({ columns: [t.fromStepId, t.toStepId] }), belongsTo(t, t.fromStepId, pieceStep), belongsTo(t, t.toStepId, pieceStep),
  oneOf('step_link_milestone', t.milestone, milestoneNames), oneOf('step_link_risk', t.risk, risks), index('step_link_to').on(t.toStepId),
])

/** One time of doing: a coat of a round, a check inside a rest, the taking out of clamps. Coats, pins, plan entries and calls hang on turns. */
export const turn = sqliteTable('turn', {
  id: id(),
  studioId: studioColumn(),
  stepId: integer('step_id').notNull(),
  ordinal: integer('ordinal').notNull(),
  day: integer('day').notNull().default(0),
  kind: text('kind').$type<TurnKind>().notNull(),
  name: text('name').notNull().default(''),
  checkAfterMin: integer('check_after_min'),
  minutes: integer('minutes').notNull(),
  status: text('status').$type<TurnStatus>().notNull().default('waiting'),
  doneAt: instant('done_at'),
  beganAt: instant('began_at'),
  doingMemberId: integer('doing_member_id'),
  notOnAt: instant('not_on_at'),
}, t => [
  studioKey(t), belongsTo(t, t.stepId, pieceStep), within(t, t.doingMemberId, member), unique().on(t.stepId, t.ordinal),
  oneOf('turn_kind', t.kind, turnKinds), oneOf('turn_status', t.status, turnStatuses),
  check('turn_check', sql`(${t.kind} = 'check') = (${t.checkAfterMin} is not null)`),
  check('turn_done', sql`(${t.status} = 'done') = (${t.doneAt} is not null)`),
])
