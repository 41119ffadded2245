import { sql } from 'drizzle-orm'
import { check, index, integer, real, sqliteTable, text, unique, uniqueIndex } from 'drizzle-orm/sqlite-core'
import { adviceAnswers, airNoteKinds, coatKinds, coatSizes, doubtCauses, grounds, holds, milestoneNames, roles } from '#shared/terms'
import type { AdviceAnswer, AirNoteKind, CoatKind, CoatSize, DoubtCause, Ground, Hold, MilestoneName, Role } from '#shared/terms'
import { act } from './acts'
import { belongsTo, flag, id, instant, oneOf, studioKey, within } from './columns'
import { materialVersion, mix, tin } from './materials'
import { face, part, piece } from './pieces'
import { room } from './places'
import { turn } from './steps'
import { member, studioColumn } from './studio'

/** A coat that is on, or a glue-up. `settledAt` is set once the film can no longer change any answer: hot queries read only the others. */
export const coat = sqliteTable('coat', {
  id: id(),
  studioId: studioColumn(),
  pieceId: integer('piece_id').notNull(),
  turnId: integer('turn_id'),
  actId: integer('act_id').notNull(),
  kind: text('kind').$type<CoatKind>().notNull(),
  materialVersionId: integer('material_version_id'),
  tinId: integer('tin_id'),
  mixId: integer('mix_id'),
  beganAt: instant('began_at').notNull(),
  endedAt: instant('ended_at').notNull(),
  size: text('size').$type<CoatSize>().notNull(),
  ground: text('ground').$type<Ground>().notNull(),
  forced: flag('forced').notNull().default(false),
  /** Surface of this coat where it was said, m2, and thinner poured in for it, g. */
  areaM2: real('area_m2'),
  thinnerGrams: real('thinner_grams').notNull().default(0),
  hold: text('hold').$type<Hold>(),
  outAt: instant('out_at'),
  strippedAt: instant('stripped_at'),
  settledAt: instant('settled_at'),
}, t => [
  studioKey(t), within(t, t.pieceId, piece), within(t, t.turnId, turn), within(t, t.actId, act), within(t, t.materialVersionId, materialVersion), within(t, t.tinId, tin), within(t, t.mixId, mix),
  unique().on(t.pieceId, t.actId, t.turnId),
  oneOf('coat_kind', t.kind, coatKinds), oneOf('coat_size', t.size, coatSizes), oneOf('coat_ground', t.ground, grounds), oneOf('coat_hold', t.hold, holds),
  check('coat_span', sql`${t.beganAt} <= ${t.endedAt}`),
  index('coat_live').on(t.studioId, t.pieceId).where(sql`${t.settledAt} is null`),
])

/** What a coat lies on. A glue-up names the two or more parts it joins and no face. */
export const coatTarget = sqliteTable('coat_target', {
  id: id(),
  studioId: studioColumn(),
  coatId: integer('coat_id').notNull(),
  partId: integer('part_id').notNull(),
  faceId: integer('face_id'),
  layer: integer('layer').notNull(),
}, t => [
  studioKey(t), belongsTo(t, t.coatId, coat), within(t, t.partId, part), within(t, t.faceId, face),
  uniqueIndex('coat_target_layer').on(t.faceId, t.layer).where(sql`${t.faceId} is not null`),
  index('coat_target_of_coat').on(t.coatId), check('coat_target_from_one', sql`${t.layer} >= 1`),
])

/** Something spoilt this film, perhaps. Open until a maker's test or a strip clears it. */
export const doubt = sqliteTable('doubt', {
  id: id(),
  studioId: studioColumn(),
  coatId: integer('coat_id').notNull(),
  cause: text('cause').$type<DoubtCause>().notNull(),
  fromAt: instant('from_at').notNull(),
  clearedActId: integer('cleared_act_id'),
}, t => [studioKey(t), belongsTo(t, t.coatId, coat), within(t, t.clearedActId, act), unique().on(t.coatId, t.cause), oneOf('doubt_cause', t.cause, doubtCauses)])

/** A scrap coated alongside, to be touched instead of the piece. */
export const witness = sqliteTable('witness', {
  id: id(),
  studioId: studioColumn(),
  coatId: integer('coat_id').notNull(),
  name: text('name').notNull(),
}, t => [studioKey(t), belongsTo(t, t.coatId, coat)])

/** A bound, not a time: `reached` by then, or not yet. `forecast` is what was predicted at that moment, kept to measure the model by. */
export const touchTest = sqliteTable('touch_test', {
  id: id(),
  studioId: studioColumn(),
  coatId: integer('coat_id').notNull(),
  witnessId: integer('witness_id'),
  actId: integer('act_id').notNull(),
  milestone: text('milestone').$type<MilestoneName>().notNull(),
  at: instant('at').notNull(),
  reached: flag('reached').notNull(),
  byRole: text('by_role').$type<Role>().notNull(),
  forecast: text('forecast', { mode: 'json' }).$type<{ likelyAt: number | null, p90At: number | null, p98At: number | null } | null>(),
}, t => [
  studioKey(t), belongsTo(t, t.coatId, coat), within(t, t.witnessId, witness), within(t, t.actId, act), unique().on(t.actId, t.coatId),
  oneOf('touch_test_milestone', t.milestone, milestoneNames), oneOf('touch_test_role', t.byRole, roles), index('touch_test_of_coat').on(t.coatId),
])

/** What the bench has taught about a material. Derived from the tests up to one act; a reset is an act. */
export const benchSpeed = sqliteTable('bench_speed', {
  id: id(),
  studioId: studioColumn(),
  materialVersionId: integer('material_version_id').notNull(),
  tinId: integer('tin_id'),
  state: text('state', { mode: 'json' }).$type<unknown>().notNull(),
  tests: integer('tests').notNull(),
  actIdUpto: integer('act_id_upto'),
  resetAt: instant('reset_at'),
}, t => [studioKey(t), within(t, t.materialVersionId, materialVersion), within(t, t.tinId, tin), within(t, t.actIdUpto, act)])

/** Warm air, sun, a cover: what changed the air at one part or in one room for a while. */
export const airNote = sqliteTable('air_note', {
  id: id(),
  studioId: studioColumn(),
  partId: integer('part_id'),
  roomId: integer('room_id'),
  actId: integer('act_id'),
  kind: text('kind').$type<AirNoteKind>().notNull(),
  fromAt: instant('from_at').notNull(),
  toAt: instant('to_at'),
}, t => [
  studioKey(t), within(t, t.partId, part), within(t, t.roomId, room), within(t, t.actId, act), oneOf('air_note_kind', t.kind, airNoteKinds),
  check('air_note_where', sql`(${t.partId} is null) <> (${t.roomId} is null)`), index('air_note_of_part').on(t.partId),
])

/**
 * What somebody answered to a piece of advice, so that it is not asked again: about a coat that is on, or about a turn before it began.
 * `gapC` is how far the air stood above its dew point when it was about haze, kelvin: that is what a material's own gap is learned from.
 */
export const adviceAnswer = sqliteTable('advice_answer', {
  id: id(),
  studioId: studioColumn(),
  coatId: integer('coat_id'),
  turnId: integer('turn_id'),
  code: text('code').notNull(),
  answer: text('answer').$type<AdviceAnswer>().notNull(),
  gapC: real('gap_c'),
  memberId: integer('member_id').notNull(),
  at: instant('at').notNull(),
}, t => [
  studioKey(t), belongsTo(t, t.coatId, coat), belongsTo(t, t.turnId, turn), within(t, t.memberId, member), unique().on(t.coatId, t.code), unique().on(t.turnId, t.code),
  oneOf('advice_answer_word', t.answer, adviceAnswers), check('advice_answer_about', sql`(${t.coatId} is null) <> (${t.turnId} is null)`),
])
