import { sql } from 'drizzle-orm'
import { check, index, integer, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core'
import { exhaustAnswers, statementKinds } from '#shared/terms'
import type { ExhaustAnswer, StatementKind } from '#shared/terms'
import { flag, id, instant, oneOf, studioKey, within } from './columns'
import { material } from './materials'
import { room } from './places'
import { member, studioColumn } from './studio'
import { act } from './acts'

/** Somebody begins solvent work in a room, with the three answers given before, or was done, with what is said of it. Everybody is told. `actId` is the act that began it. */
export const vapourStart = sqliteTable('vapour_start', {
  id: id(),
  studioId: studioColumn(),
  roomId: integer('room_id').notNull(),
  actId: integer('act_id').notNull(),
  at: instant('at').notNull(),
  memberId: integer('member_id'),
  exhaust: text('exhaust').$type<ExhaustAnswer>().notNull(),
  flamesOff: flag('flames_off').notNull(),
  nobodyElse: flag('nobody_else').notNull(),
  endedAt: instant('ended_at'),
}, t => [
  studioKey(t), within(t, t.roomId, room), within(t, t.actId, act), within(t, t.memberId, member),
  oneOf('vapour_start_exhaust', t.exhaust, exhaustAnswers), index('vapour_start_of_room').on(t.studioId, t.roomId, t.at),
])

/** The limits of a material's own data sheet, as the owner read them: they win over the library's. */
export const vapourLimit = sqliteTable('vapour_limit', {
  id: id(),
  studioId: studioColumn(),
  materialId: integer('material_id').notNull(),
  solventKey: text('solvent_key'),
  limitMgM3: real('limit_mg_m3'),
  ceilingMgM3: real('ceiling_mg_m3'),
  lelGramsM3: real('lel_grams_m3'),
  vocGramsPerLitre: real('voc_grams_per_litre'),
  exemptGramsPerLitre: real('exempt_grams_per_litre'),
  spreadM2PerLitre: real('spread_m2_per_litre'),
  touchDryMinutes: real('touch_dry_minutes'),
  memberId: integer('member_id').notNull(),
  at: instant('at').notNull(),
}, t => [
  studioKey(t), within(t, t.materialId, material), within(t, t.memberId, member), uniqueIndex('vapour_limit_once').on(t.studioId, t.materialId),
  check('vapour_limit_figures', sql`coalesce(${t.limitMgM3}, 1) > 0 and coalesce(${t.ceilingMgM3}, 1) > 0 and coalesce(${t.lelGramsM3}, 1) > 0 and coalesce(${t.vocGramsPerLitre}, 0) >= 0 and coalesce(${t.exemptGramsPerLitre}, 0) >= 0`),
])

/** A rule of the studio's own beside the standing cautions. Taken back, never changed. */
export const studioRule = sqliteTable('studio_rule', {
  id: id(),
  studioId: studioColumn(),
  text: text('text').notNull(),
  memberId: integer('member_id').notNull(),
  at: instant('at').notNull(),
  withdrawnAt: instant('withdrawn_at'),
}, t => [studioKey(t), within(t, t.memberId, member), check('studio_rule_text', sql`length(${t.text}) between 1 and 400`)])

/** What an owner has stated in writing, without which some work is refused. Taken back, never changed. */
export const statement = sqliteTable('statement', {
  id: id(),
  studioId: studioColumn(),
  kind: text('kind').$type<StatementKind>().notNull(),
  text: text('text').notNull(),
  memberId: integer('member_id').notNull(),
  at: instant('at').notNull(),
  withdrawnAt: instant('withdrawn_at'),
}, t => [
  studioKey(t), within(t, t.memberId, member), oneOf('statement_kind', t.kind, statementKinds), check('statement_text', sql`length(${t.text}) between 1 and 1000`),
  uniqueIndex('statement_now').on(t.studioId, t.kind).where(sql`${t.withdrawnAt} is null`),
])
