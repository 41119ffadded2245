import { sql } from 'drizzle-orm'
import { check, index, integer, primaryKey, real, sqliteTable, text, unique, uniqueIndex } from 'drizzle-orm/sqlite-core'
import { actKinds, actors, airNoteKinds, coatKinds, coatSizes, doubtCauses, dustClasses, grounds, holds, intakeQuestions, milestoneNames, placeKinds, risks, roles, stepKinds, stepOrigins, stepStatuses, turnKinds, turnStatuses } from '#shared/terms'
import type { ActKind, Actor, AirNoteKind, CoatKind, CoatSize, DoubtCause, DustClass, Ground, Hold, IntakeQuestion, MilestoneName, PlaceKind, Risk, Role, StepKind, StepOrigin, StepStatus, TurnKind, TurnStatus } from '#shared/terms'
import { belongsTo, flag, id, instant, oneOf, studioKey, within } from './columns'
import { materialVersion, mix, tin } from './materials'
import { carrier, place, room } from './places'
import { scheduleStep, scheduleVersion } from './schedules'
import { member, studio } from './studio'

const studioColumn = () => integer('studio_id').notNull().references(() => studio.id, { onDelete: 'cascade' })

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

export const order = sqliteTable('order', {
  id: id(),
  studioId: studioColumn(),
  name: text('name').notNull(),
  dueAt: instant('due_at'),
  promisedAt: instant('promised_at'),
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
  stepsDone: integer('steps_done').notNull().default(0),
  stepsOf: integer('steps_of').notNull().default(0),
}, t => [
  studioKey(t), within(t, t.batchId, batch), within(t, t.branchId, branch), unique().on(t.batchId, t.ordinal),
  check('piece_size', sql`${t.sizeUnits} > 0`), index('piece_here').on(t.studioId, t.batchId).where(sql`${t.goneAt} is null`),
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
  check('stay_span', sql`${t.toAt} is null or ${t.toAt} >= ${t.fromAt}`),
])

/** A step of one piece, copied from the schedule at the start so that a recovery or a branch can be spliced in. `key` is unique in the piece and survives a refold. */
export const pieceStep = sqliteTable('piece_step', {
  id: id(),
  studioId: studioColumn(),
  pieceId: integer('piece_id').notNull(),
  key: text('key').notNull(),
  ordinal: real('ordinal').notNull(),
  name: text('name').notNull(),
  kind: text('kind').$type<StepKind>().notNull(),
  origin: text('origin').$type<StepOrigin>().notNull(),
  scheduleStepId: integer('schedule_step_id'),
  insertedByActId: integer('inserted_by_act_id'),
  materialVersionId: integer('material_version_id'),
  status: text('status').$type<StepStatus>().notNull().default('waiting'),
  asideReason: text('aside_reason'),
  coatSize: text('coat_size').$type<CoatSize>().notNull().default('normal'),
  ground: text('ground').$type<Ground>().notNull().default('primed'),
  hold: text('hold').$type<Hold>(),
  placeKind: text('place_kind').$type<PlaceKind>(),
  untilEnough: flag('until_enough').notNull().default(false),
  setupMin: integer('setup_min').notNull().default(0),
  pieceMin: integer('piece_min').notNull(),
  cleanMin: integer('clean_min').notNull().default(0),
  releaseMin: integer('release_min').notNull().default(0),
  hands: integer('hands').notNull().default(1),
  dust: text('dust').$type<DustClass>().notNull().default('none'),
  mayRunOver: flag('may_run_over').notNull().default(false),
  /** Nothing but drying stands before it, and something of it is left to do: the steps that screens read. */
  atFront: flag('at_front').notNull().default(false),
}, t => [
  studioKey(t), within(t, t.pieceId, piece), within(t, t.scheduleStepId, scheduleStep), within(t, t.insertedByActId, act), within(t, t.materialVersionId, materialVersion),
  unique().on(t.pieceId, t.key),
  oneOf('piece_step_kind', t.kind, stepKinds), oneOf('piece_step_origin', t.origin, stepOrigins), oneOf('piece_step_status', t.status, stepStatuses),
  oneOf('piece_step_size', t.coatSize, coatSizes), oneOf('piece_step_ground', t.ground, grounds), oneOf('piece_step_hold', t.hold, holds),
  oneOf('piece_step_place', t.placeKind, placeKinds), oneOf('piece_step_dust', t.dust, dustClasses),
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

/** A room nobody enters until a named person opens it. One open line per room. */
export const keepOut = sqliteTable('keep_out', {
  id: id(),
  studioId: studioColumn(),
  roomId: integer('room_id').notNull(),
  fromActId: integer('from_act_id').notNull(),
  fromAt: instant('from_at').notNull(),
  opensByMemberId: integer('opens_by_member_id'),
  openedActId: integer('opened_act_id'),
  openedAt: instant('opened_at'),
}, t => [
  studioKey(t), within(t, t.roomId, room), within(t, t.fromActId, act), within(t, t.openedActId, act), within(t, t.opensByMemberId, member),
  uniqueIndex('keep_out_now').on(t.roomId).where(sql`${t.openedAt} is null`),
])

/** Oily rags somewhere: asked about until somebody says where they are. */
export const ragDuty = sqliteTable('rag_duty', {
  id: id(),
  studioId: studioColumn(),
  roomId: integer('room_id').notNull(),
  lastOilAt: instant('last_oil_at').notNull(),
  lastOilActId: integer('last_oil_act_id').notNull(),
  answer: text('answer').$type<'flat outdoors' | 'in water can' | 'not dealt with'>(),
  answeredAt: instant('answered_at'),
  answeredByMemberId: integer('answered_by_member_id'),
}, t => [
  studioKey(t), within(t, t.roomId, room), within(t, t.lastOilActId, act), within(t, t.answeredByMemberId, member),
  oneOf('rag_duty_answer', t.answer, ['flat outdoors', 'in water can', 'not dealt with']),
  uniqueIndex('rag_duty_now').on(t.roomId).where(sql`${t.answeredAt} is null`),
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

export const attachment = sqliteTable('attachment', {
  id: id(),
  studioId: studioColumn(),
  actId: integer('act_id'),
  materialVersionId: integer('material_version_id'),
  kind: text('kind').$type<'photo' | 'data sheet'>().notNull(),
  sha256: text('sha256').notNull(),
  bytes: integer('bytes').notNull(),
}, t => [
  studioKey(t), within(t, t.actId, act), within(t, t.materialVersionId, materialVersion), oneOf('attachment_kind', t.kind, ['photo', 'data sheet']),
  check('attachment_bytes', sql`${t.bytes} > 0`), check('attachment_of_one', sql`(${t.actId} is null) <> (${t.materialVersionId} is null)`),
])
