import { sql } from 'drizzle-orm'
import { check, index, integer, primaryKey, real, sqliteTable, text, unique, uniqueIndex } from 'drizzle-orm/sqlite-core'
import { belongsTo, flag, id, instant, oneOf, studioKey, within } from './columns'
import { fireCallKinds, roles, stepKinds } from '#shared/terms'
import type { Role, StepKind } from '#shared/terms'

/** A studio: the boundary that no row may cross. `revision` grows by one with every committed change. */
export const studio = sqliteTable('studio', {
  id: id(),
  name: text('name').notNull(),
  zone: text('zone').notNull(),
  units: text('units').$type<'metric' | 'us'>().notNull().default('metric'),
  usualTempC: real('usual_temp_c').notNull().default(19),
  usualRh: real('usual_rh').notNull().default(0.5),
  revision: integer('revision').notNull().default(1),
  demo: flag('demo').notNull().default(false),
  madeAt: instant('made_at').notNull(),
}, t => [
  oneOf('studio_units', t.units, ['metric', 'us']),
  check('studio_usual_rh', sql`${t.usualRh} between 0 and 1`),
  check('studio_usual_temp', sql`${t.usualTempC} between -40 and 60`),
])

/** Says whose a row is; it goes with its studio. */
export const studioColumn = () => integer('studio_id').notNull().references(() => studio.id, { onDelete: 'cascade' })

/** Somebody who can sign in. One person may belong to several studios. */
export const person = sqliteTable('person', {
  id: id(),
  email: text('email').notNull().unique(),
  name: text('name').notNull(),
  passwordHash: text('password_hash').notNull(),
  demo: flag('demo').notNull().default(false),
}, t => [check('person_email_lower', sql`${t.email} = lower(${t.email})`)])

/** A person's place in a studio. `pinHash` is for acting as oneself at a bench tablet; `pinWrong` counts wrong PINs since the last right one. */
export const member = sqliteTable('member', {
  id: id(),
  studioId: studioColumn(),
  personId: integer('person_id').notNull().references(() => person.id, { onDelete: 'cascade' }),
  role: text('role').$type<Role>().notNull(),
  pinHash: text('pin_hash'),
  pinWrong: integer('pin_wrong').notNull().default(0),
  pinLockedTill: instant('pin_locked_till'),
  leftAt: instant('left_at'),
}, t => [studioKey(t), unique().on(t.studioId, t.personId), oneOf('member_role', t.role, roles), index('member_of_person').on(t.personId)])

/** The kinds of step the owner lets this helper do. */
export const memberStepKind = sqliteTable('member_step_kind', {
  studioId: studioColumn(),
  memberId: integer('member_id').notNull(),
  kind: text('kind').$type<StepKind>().notNull(),
}, t => [primaryKey({ columns: [t.memberId, t.kind] }), within(t, t.memberId, member), oneOf('member_step_kind_word', t.kind, stepKinds)])

/** A signed-in browser. The cookie holds a random id; only its hash is kept, and the row can be revoked. */
export const session = sqliteTable('session', {
  idHash: text('id_hash').primaryKey(),
  personId: integer('person_id').notNull().references(() => person.id, { onDelete: 'cascade' }),
  studioId: integer('studio_id').references(() => studio.id, { onDelete: 'set null' }),
  madeAt: instant('made_at').notNull(),
  seenAt: instant('seen_at').notNull(),
  expiresAt: instant('expires_at').notNull(),
  revokedAt: instant('revoked_at'),
}, t => [index('session_of_person').on(t.personId)])

export const invitation = sqliteTable('invitation', {
  id: id(),
  studioId: studioColumn(),
  tokenHash: text('token_hash').notNull().unique(),
  role: text('role').$type<Role>().notNull(),
  email: text('email'),
  madeByMemberId: integer('made_by_member_id').notNull(),
  expiresAt: instant('expires_at').notNull(),
  usedAt: instant('used_at'),
}, t => [studioKey(t), within(t, t.madeByMemberId, member), oneOf('invitation_role', t.role, roles)])

export const passwordReset = sqliteTable('password_reset', {
  tokenHash: text('token_hash').primaryKey(),
  personId: integer('person_id').notNull().references(() => person.id, { onDelete: 'cascade' }),
  expiresAt: instant('expires_at').notNull(),
  usedAt: instant('used_at'),
})

/** A secret address that shows the handling sheet and nothing else. */
export const wallLink = sqliteTable('wall_link', {
  id: id(),
  studioId: studioColumn(),
  name: text('name').notNull(),
  tokenHash: text('token_hash').notNull().unique(),
  madeAt: instant('made_at').notNull(),
  revokedAt: instant('revoked_at'),
}, t => [studioKey(t)])

/** A secret address at which a calendar reads somebody's planned work. One at a time; with them it goes. */
export const calendarLink = sqliteTable('calendar_link', {
  id: id(),
  studioId: studioColumn(),
  memberId: integer('member_id').notNull(),
  tokenHash: text('token_hash').notNull().unique(),
  everybody: flag('everybody').notNull(),
  madeAt: instant('made_at').notNull(),
}, t => [studioKey(t), belongsTo(t, t.memberId, member), unique().on(t.memberId)])

/** Working hours in local wall time, of the studio (member null) or of one person. Minutes since midnight. */
export const openHours = sqliteTable('open_hours', {
  id: id(),
  studioId: studioColumn(),
  memberId: integer('member_id'),
  weekday: integer('weekday').notNull(),
  fromMin: integer('from_min').notNull(),
  toMin: integer('to_min').notNull(),
}, t => [
  studioKey(t), within(t, t.memberId, member),
  check('open_hours_weekday', sql`${t.weekday} between 1 and 7`),
  check('open_hours_span', sql`0 <= ${t.fromMin} and ${t.fromMin} < ${t.toMin} and ${t.toMin} <= 1440`),
  index('open_hours_of_studio').on(t.studioId),
])

/** Days without work, of the studio (a closure) or of one person (an absence). Local dates, both ends included. */
export const closure = sqliteTable('closure', {
  id: id(),
  studioId: studioColumn(),
  memberId: integer('member_id'),
  name: text('name').notNull().default(''),
  fromDate: text('from_date').notNull(),
  toDate: text('to_date').notNull(),
}, t => [
  studioKey(t), within(t, t.memberId, member),
  check('closure_dates', sql`${t.fromDate} <= ${t.toDate} and ${t.fromDate} glob '[0-9][0-9][0-9][0-9]-[0-9][0-9]-[0-9][0-9]' and ${t.toDate} glob '[0-9][0-9][0-9][0-9]-[0-9][0-9]-[0-9][0-9]'`),
  index('closure_of_studio').on(t.studioId),
])

/** Keys of the installation that are made on first run, such as the push key pair. */
export const serverKey = sqliteTable('server_key', {
  name: text('name').primaryKey(),
  value: text('value').notNull(),
})

/** Who changed a row that is not a fold of acts, and how. */
export const audit = sqliteTable('audit', {
  id: id(),
  studioId: studioColumn(),
  tableName: text('table_name').notNull(),
  rowId: integer('row_id').notNull(),
  memberId: integer('member_id'),
  at: instant('at').notNull(),
  before: text('before', { mode: 'json' }).$type<unknown>(),
  after: text('after', { mode: 'json' }).$type<unknown>(),
}, t => [studioKey(t), within(t, t.memberId, member), index('audit_of_row').on(t.studioId, t.tableName, t.rowId)])

/** Which optional calls a member has turned on or off; no row means the default of the kind. */
export const callChoice = sqliteTable('call_choice', {
  studioId: studioColumn(),
  memberId: integer('member_id').notNull(),
  kind: text('kind').notNull(),
  wanted: flag('wanted').notNull(),
}, t => [
  uniqueIndex('call_choice_once').on(t.memberId, t.kind), within(t, t.memberId, member),
  // A fire call cannot be switched off, not even by a row written by hand.
  check('call_choice_not_fire', sql`${t.kind} not in (${sql.raw(fireCallKinds.map(kind => `'${kind}'`).join(', '))})`),
])
