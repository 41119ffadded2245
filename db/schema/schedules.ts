import { sql } from 'drizzle-orm'
import { check, integer, primaryKey, sqliteTable, text, unique } from 'drizzle-orm/sqlite-core'
import { flag, id, instant, oneOf, studioKey, within } from './columns'
import { material } from './materials'
import { howDone, howDoneWords } from './step-columns'
import { studioColumn } from './studio'
import { milestoneNames, risks } from '#shared/terms'
import type { MilestoneName, Risk } from '#shared/terms'

export const finishingSchedule = sqliteTable('finishing_schedule', {
  id: id(),
  studioId: studioColumn(),
  libraryKey: text('library_key'),
  name: text('name').notNull(),
  archivedAt: instant('archived_at'),
}, t => [studioKey(t), unique().on(t.studioId, t.libraryKey), unique().on(t.studioId, t.name)])

/** One edition of a schedule. A piece keeps the edition it started with, so a used one is frozen. */
export const scheduleVersion = sqliteTable('schedule_version', {
  id: id(),
  studioId: studioColumn(),
  scheduleId: integer('schedule_id').notNull(),
  no: integer('no').notNull(),
  frozen: flag('frozen').notNull().default(false),
  summary: text('summary').notNull().default(''),
}, t => [studioKey(t), within(t, t.scheduleId, finishingSchedule), unique().on(t.scheduleId, t.no)])

/** A part of the thing: `intoKey` names the part that this one is joined to. */
export const schedulePart = sqliteTable('schedule_part', {
  id: id(),
  studioId: studioColumn(),
  versionId: integer('version_id').notNull(),
  key: text('key').notNull(),
  name: text('name').notNull(),
  grip: text('grip'),
}, t => [studioKey(t), within(t, t.versionId, scheduleVersion), unique().on(t.versionId, t.key)])

export const scheduleFace = sqliteTable('schedule_face', {
  id: id(),
  studioId: studioColumn(),
  partId: integer('part_id').notNull(),
  key: text('key').notNull(),
  name: text('name').notNull(),
}, t => [studioKey(t), within(t, t.partId, schedulePart), unique().on(t.partId, t.key)])

export const scheduleStep = sqliteTable('schedule_step', {
  id: id(),
  studioId: studioColumn(),
  versionId: integer('version_id').notNull(),
  key: text('key').notNull(),
  ordinal: integer('ordinal').notNull(),
  name: text('name').notNull(),
  materialId: integer('material_id'),
  perDay: integer('per_day').notNull().default(1),
  days: integer('days').notNull().default(1),
  ...howDone(),
}, t => [
  studioKey(t), within(t, t.versionId, scheduleVersion), within(t, t.materialId, material), unique().on(t.versionId, t.key),
  ...howDoneWords('schedule_step', t),
  check('schedule_step_counts', sql`${t.perDay} > 0 and ${t.days} > 0 and ${t.hands} >= 0`),
  check('schedule_step_minutes', sql`${t.setupMin} >= 0 and ${t.pieceMin} >= 0 and ${t.cleanMin} >= 0 and ${t.releaseMin} >= 0`),
])

export const scheduleStepTarget = sqliteTable('schedule_step_target', {
  id: id(),
  studioId: studioColumn(),
  stepId: integer('step_id').notNull(),
  partId: integer('part_id').notNull(),
  faceId: integer('face_id'),
}, t => [studioKey(t), within(t, t.stepId, scheduleStep), within(t, t.partId, schedulePart), within(t, t.faceId, scheduleFace)])

/**
 * `to` may begin when `from` has reached `milestone` at `risk` (no milestone: when its work is done), inside the window if
 * one is named. `recovery` is what a missed window asks for here; null: what the material's sheet says.
 */
export const scheduleLink = sqliteTable('schedule_link', {
  studioId: studioColumn(),
  fromStepId: integer('from_step_id').notNull(),
  toStepId: integer('to_step_id').notNull(),
  milestone: text('milestone').$type<MilestoneName>(),
  risk: text('risk').$type<Risk>().notNull().default('p90'),
  windowed: flag('windowed').notNull().default(false),
  recovery: text('recovery'),
  recoveryMin: integer('recovery_min'),
}, t => [
  primaryKey({ columns: [t.fromStepId, t.toStepId] }), within(t, t.fromStepId, scheduleStep), within(t, t.toStepId, scheduleStep),
  oneOf('schedule_link_milestone', t.milestone, milestoneNames), oneOf('schedule_link_risk', t.risk, risks),
  check('schedule_link_ends', sql`${t.fromStepId} <> ${t.toStepId}`),
])

/** An attended look inside a rest: change the blotters, turn the bowl. */
export const scheduleCheck = sqliteTable('schedule_check', {
  studioId: studioColumn(),
  stepId: integer('step_id').notNull(),
  ordinal: integer('ordinal').notNull(),
  name: text('name').notNull(),
  afterMin: integer('after_min').notNull(),
  minutes: integer('minutes').notNull(),
}, t => [primaryKey({ columns: [t.stepId, t.ordinal] }), within(t, t.stepId, scheduleStep), check('schedule_check_minutes', sql`${t.afterMin} > 0 and ${t.minutes} > 0`)])
