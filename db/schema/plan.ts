import { sql } from 'drizzle-orm'
import { check, index, integer, primaryKey, sqliteTable, text, unique, uniqueIndex } from 'drizzle-orm/sqlite-core'
import { milestoneNames, planStatuses } from '#shared/terms'
import type { MilestoneName } from '#shared/terms'
import type { MoveCause } from '#shared/plan-moves'
import { belongsTo, flag, id, instant, oneOf, studioKey, within } from './columns'
import { place, room } from './places'
import { member, studioColumn } from './studio'
import { act } from './acts'
import { coat } from './films'
import { part } from './pieces'
import { turn } from './steps'

/** When a film will have come so far: the middle, the 90 % and the 98 % time. Null with a reason, never a sentinel. */
export const prediction = sqliteTable('prediction', {
  studioId: studioColumn(),
  coatId: integer('coat_id').notNull(),
  ordinal: integer('ordinal').notNull(),
  milestone: text('milestone').$type<MilestoneName>().notNull(),
  likelyAt: instant('likely_at'),
  p90At: instant('p90_at'),
  p98At: instant('p98_at'),
  reachedAt: instant('reached_at'),
  reason: text('reason').$type<'below-minimum' | 'too-damp' | 'never' | 'outside-sheet'>(),
}, t => [
  primaryKey({ columns: [t.coatId, t.milestone] }), belongsTo(t, t.coatId, coat), oneOf('prediction_milestone', t.milestone, milestoneNames),
  oneOf('prediction_reason', t.reason, ['below-minimum', 'too-damp', 'never', 'outside-sheet']),
  // Holds all that the board reads of a rung, so that thousands of them are read from the index alone.
  index('prediction_read').on(t.coatId, t.ordinal, t.milestone, t.likelyAt, t.p90At, t.p98At, t.reachedAt, t.reason),
])

export const windowPrediction = sqliteTable('window_prediction', {
  studioId: studioColumn(),
  coatId: integer('coat_id').notNull(),
  ordinal: integer('ordinal').notNull(),
  opensAt: instant('opens_at'),
  shutsAt: instant('shuts_at'),
}, t => [primaryKey({ columns: [t.coatId, t.ordinal] }), belongsTo(t, t.coatId, coat)])

/** Somebody fixed this turn's time: when, who said so, and whose hands. Pins outlive plans; those of one moment belong together. */
export const pin = sqliteTable('pin', {
  id: id(),
  studioId: studioColumn(),
  turnId: integer('turn_id').notNull().unique(),
  startsAt: instant('starts_at').notNull(),
  memberId: integer('member_id'),
  actId: integer('act_id'),
  madeAt: instant('made_at'),
  madeByMemberId: integer('made_by_member_id'),
}, t => [studioKey(t), belongsTo(t, t.turnId, turn), within(t, t.memberId, member), within(t, t.actId, act), within(t, t.madeByMemberId, member)])

/** Working hours in local wall time, of the studio (`memberId` null) and of people, and days without work. */
export interface PlannedHours { open: { memberId: number | null, weekday: number, fromMin: number, toMin: number }[], closed: { memberId: number | null, fromDate: string, toDate: string }[] }

export const plan = sqliteTable('plan', {
  id: id(),
  studioId: studioColumn(),
  madeAt: instant('made_at').notNull(),
  revision: integer('revision').notNull(),
  seed: integer('seed').notNull(),
  status: text('status').$type<'optimal' | 'feasible' | 'infeasible'>().notNull(),
  objective: text('objective', { mode: 'json' }).$type<Record<string, number>>().notNull(),
  clashes: text('clashes', { mode: 'json' }).$type<string[]>().notNull(),
  /** The hours and days without work that it was made for; null for a plan of before they were kept. */
  hours: text('hours', { mode: 'json' }).$type<PlannedHours>(),
  current: flag('current').notNull(),
}, t => [studioKey(t), oneOf('plan_status', t.status, planStatuses), uniqueIndex('plan_now').on(t.studioId).where(sql`${t.current} = 1`)])

/** Like work done together: one set-up, one clean-up. */
export const planSession = sqliteTable('plan_session', {
  id: id(),
  studioId: studioColumn(),
  planId: integer('plan_id').notNull(),
  family: text('family').notNull(),
  roomId: integer('room_id'),
  startsAt: instant('starts_at').notNull(),
  endsAt: instant('ends_at').notNull(),
  setupMin: integer('setup_min').notNull(),
}, t => [studioKey(t), belongsTo(t, t.planId, plan), within(t, t.roomId, room)])

/** `dueAt` is the first planned start that nobody has spoken to: re-planning carries it on, so that silence stays visible. `lastStartAt` is counted back from a window's early end by set-up and minutes per piece; of the session as many as `firstFew` can still be done until `lastStartFewAt`. `readyAt` is when what it waits for lets it begin; `toldAt` the start that people last heard of. */
export const planEntry = sqliteTable('plan_entry', {
  studioId: studioColumn(),
  planId: integer('plan_id').notNull(),
  turnId: integer('turn_id').notNull(),
  sessionId: integer('session_id'),
  memberId: integer('member_id'),
  startsAt: instant('starts_at').notNull(),
  endsAt: instant('ends_at').notNull(),
  dueAt: instant('due_at').notNull(),
  lastStartAt: instant('last_start_at'),
  firstFew: integer('first_few'),
  lastStartFewAt: instant('last_start_few_at'),
  afterTest: flag('after_test').notNull().default(false),
  readyAt: instant('ready_at'),
  toldAt: instant('told_at'),
}, t => [
  primaryKey({ columns: [t.planId, t.turnId] }), belongsTo(t, t.planId, plan), belongsTo(t, t.turnId, turn), within(t, t.sessionId, planSession), within(t, t.memberId, member),
  check('plan_entry_span', sql`${t.startsAt} <= ${t.endsAt}`), index('plan_entry_when').on(t.planId, t.startsAt),
])

/** Whose hands a planned turn takes beside those of its entry's member: it wants several at once. */
export const planMate = sqliteTable('plan_mate', {
  studioId: studioColumn(),
  planId: integer('plan_id').notNull(),
  turnId: integer('turn_id').notNull(),
  memberId: integer('member_id').notNull(),
}, t => [primaryKey({ columns: [t.planId, t.turnId, t.memberId] }), belongsTo(t, t.planId, plan), belongsTo(t, t.turnId, turn), belongsTo(t, t.memberId, member)])

/** Where the plan lets a part lie, and for how long; what finds no single place has no row. */
export const planHold = sqliteTable('plan_hold', {
  id: id(),
  studioId: studioColumn(),
  planId: integer('plan_id').notNull(),
  partId: integer('part_id').notNull(),
  placeId: integer('place_id').notNull(),
  fromAt: instant('from_at').notNull(),
  toAt: instant('to_at'),
}, t => [studioKey(t), belongsTo(t, t.planId, plan), within(t, t.partId, part), within(t, t.placeId, place)])

/** A turn that lies noticeably elsewhere than people last heard; carried from plan to plan while it is fresh. */
export const planChange = sqliteTable('plan_change', {
  id: id(),
  studioId: studioColumn(),
  planId: integer('plan_id').notNull(),
  turnId: integer('turn_id').notNull(),
  wasAt: instant('was_at'),
  isAt: instant('is_at'),
  why: text('why', { mode: 'json' }).$type<MoveCause>().notNull(),
  movedAt: instant('moved_at'),
}, t => [studioKey(t), belongsTo(t, t.planId, plan), belongsTo(t, t.turnId, turn), unique().on(t.planId, t.turnId)])
