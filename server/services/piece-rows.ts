import { inArray, sql } from 'drizzle-orm'
import type { SQL } from 'drizzle-orm'
import { intake } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { ReasonCode } from '#shared/drying/types'
import type { CoatKind, DoubtCause, DustClass, Hold, MilestoneName, Risk, StepKind, StepOrigin, StepStatus, TurnKind, TurnStatus } from '#shared/terms'

type Reader = Database | Transaction

/**
 * The rows that say how pieces stand: one query each, whatever the number of pieces. Films are read by the partial
 * index of those that can still change an answer, steps by that of those whose turn it is.
 * @param pieceIds only these; null reads every piece in the studio that has not left it
 */
export function readPieceRows(db: Reader, studioId: number, pieceIds: readonly number[] | null) {
  return { pieces: readPieces(db, studioId, pieceIds), parts: readParts(db, studioId, pieceIds), films: readFilms(db, studioId, pieceIds), steps: readSteps(db, studioId, pieceIds), intakes: readIntakes(db, studioId, pieceIds) }
}
export type PieceRows = ReturnType<typeof readPieceRows>

/** Plain SQL gives plain rows: what the query builder adds to each costs more than the reading, and a full board reads thousands. */
const among = (column: SQL, only: readonly number[] | null) => only ? sql`and ${column} in ${only}` : sql``

interface PieceRow { id: number, name: string, version: number, stepsDone: number, stepsOf: number, batchId: number, batchName: string, orderId: number | null, orderName: string | null, dueAt: number | null, promisedAt: number | null }

function readPieces(db: Reader, studioId: number, only: readonly number[] | null) {
  return db.all<PieceRow>(sql`select piece.id, piece.name, piece.version, piece.steps_done as stepsDone, piece.steps_of as stepsOf, piece.batch_id as batchId, batch.name as batchName,
    "order".id as orderId, "order".name as orderName, "order".due_at as dueAt, "order".promised_at as promisedAt
    from piece join batch on batch.id = piece.batch_id left join "order" on "order".id = batch.order_id
    where piece.studio_id = ${studioId} and piece.gone_at is null ${among(sql`piece.id`, only)} order by piece.batch_id, piece.ordinal`)
}

interface PartRow { id: number, pieceId: number, key: string, name: string, grip: string | null, into: number | null, placeId: number | null, roomId: number | null, carrier: string | null, seenAt: number | null, missingAt: number | null }

function readParts(db: Reader, studioId: number, only: readonly number[] | null) {
  return db.all<PartRow>(sql`select part.id, part.piece_id as pieceId, part.key, part.name, part.grip, part.into_part_id as "into", stay.place_id as placeId, place.room_id as roomId, carrier.name as carrier, stay.seen_at as seenAt, stay.missing_since as missingAt
    from piece join part on part.piece_id = piece.id left join stay on stay.part_id = part.id and stay.to_at is null
    left join place on place.id = stay.place_id left join carrier on carrier.id = stay.carrier_id
    where piece.studio_id = ${studioId} and piece.gone_at is null ${among(sql`piece.id`, only)} order by part.id`)
}

interface CoatRow { id: number, pieceId: number, actId: number, kind: CoatKind, versionId: number | null, beganAt: number, endedAt: number, hold: Hold | null, outAt: number | null, material: string | null, materialKind: string | null, solvent: string | null, mustLieLevel: 0 | 1 | null, glovesUntil: MilestoneName | null, stepId: number | null, step: string | null, rungs: string, windows: string, targets: string, doubts: string }
type Rung = [name: MilestoneName, likelyAt: number | null, p90At: number | null, p98At: number | null, reachedAt: number | null, reason: ReasonCode | null]
type Window = [opensAt: number | null, shutsAt: number | null]
type Target = [partId: number, face: string | null, layer: number]
type Doubt = [cause: DoubtCause, fromAt: number]

/**
 * Films that can still change an answer, by the partial index that holds nothing else: SQLite left to itself takes another.
 * What hangs on a film comes as lists within its row: a few thousand rungs as rows of their own take twice as long.
 */
function readFilms(db: Reader, studioId: number, only: readonly number[] | null) {
  const rows = db.all<CoatRow>(sql`select coat.id, coat.piece_id as pieceId, coat.act_id as actId, coat.kind, coat.material_version_id as versionId, coat.began_at as beganAt, coat.ended_at as endedAt, coat.hold, coat.out_at as outAt,
    material.name as material, version.kind as materialKind, version.solvent, version.must_lie_level as mustLieLevel, version.gloves_until as glovesUntil, turn.step_id as stepId, step.name as step,
    (select json_group_array(json_array(milestone, likely_at, p90_at, p98_at, reached_at, reason) order by ordinal) from prediction where coat_id = coat.id) as rungs,
    (select json_group_array(json_array(opens_at, shuts_at) order by ordinal) from window_prediction where coat_id = coat.id) as windows,
    (select json_group_array(json_array(target.part_id, face.key, target.layer)) from coat_target target left join face on face.id = target.face_id where target.coat_id = coat.id) as targets,
    (select json_group_array(json_array(cause, from_at)) from doubt where doubt.coat_id = coat.id and doubt.cleared_act_id is null) as doubts
    from coat indexed by coat_live left join material_version version on version.id = coat.material_version_id left join material on material.id = version.material_id
    left join turn on turn.id = coat.turn_id left join piece_step step on step.id = turn.step_id
    where coat.studio_id = ${studioId} and coat.settled_at is null and coat.stripped_at is null ${among(sql`coat.piece_id`, only)} order by coat.ended_at`)
  return rows.map(row => ({ ...row, rungs: JSON.parse(row.rungs) as Rung[], windows: JSON.parse(row.windows) as Window[], targets: JSON.parse(row.targets) as Target[], doubts: JSON.parse(row.doubts) as Doubt[] }))
}

interface StepRow { id: number, pieceId: number, key: string, name: string, kind: StepKind, origin: StepOrigin, status: StepStatus, asideReason: string | null, hold: Hold | null, untilEnough: 0 | 1, materialVersionId: number | null, setupMin: number, pieceMin: number, cleanMin: number, dust: DustClass, material: string | null, solvent: string | null }
interface TurnRow { id: number, stepId: number, ordinal: number, kind: TurnKind, name: string, checkAfterMin: number | null, minutes: number, status: TurnStatus, beganAt: number | null, doingMemberId: number | null, notOnAt: number | null }
/** A link to the front with the step it comes from: its name, and whether it is done. */
interface LinkRow { fromStepId: number, toStepId: number, milestone: MilestoneName | null, risk: Risk, windowed: 0 | 1, fromName: string, fromStatus: StepStatus }
interface EntryRow { turnId: number, sessionId: number | null, memberId: number | null, startsAt: number, endsAt: number, dueAt: number, lastStartAt: number | null, firstFew: number | null, lastStartFewAt: number | null, afterTest: 0 | 1 }

function readSteps(db: Reader, studioId: number, only: readonly number[] | null) {
  // Written out as 1: SQLite uses a partial index only where the query says the same as the index, not for a bound value.
  const front = sql`step.studio_id = ${studioId} and step.at_front = 1 ${among(sql`step.piece_id`, only)}`
  const from = sql`piece_step step indexed by piece_step_front`
  const steps = db.all<StepRow>(sql`select step.id, step.piece_id as pieceId, step.key, step.name, step.kind, step.origin, step.status, step.aside_reason as asideReason, step.hold, step.until_enough as untilEnough, step.material_version_id as materialVersionId,
    step.setup_min as setupMin, step.piece_min as pieceMin, step.clean_min as cleanMin, step.dust, material.name as material, version.solvent
    from ${from} left join material_version version on version.id = step.material_version_id left join material on material.id = version.material_id where ${front} order by step.piece_id, step.ordinal`)
  const turns = db.all<TurnRow>(sql`select turn.id, turn.step_id as stepId, turn.ordinal, turn.kind, turn.name, turn.check_after_min as checkAfterMin, turn.minutes, turn.status, turn.began_at as beganAt, turn.doing_member_id as doingMemberId, turn.not_on_at as notOnAt
    from ${from} join turn on turn.step_id = step.id where ${front} order by turn.step_id, turn.ordinal`)
  const links = db.all<LinkRow>(sql`select link.from_step_id as fromStepId, link.to_step_id as toStepId, link.milestone, link.risk, link.windowed, earlier.name as fromName, earlier.status as fromStatus
    from ${from} join step_link link on link.to_step_id = step.id join piece_step earlier on earlier.id = link.from_step_id where ${front}`)
  const targets = db.all<{ stepId: number, partId: number }>(sql`select distinct target.step_id as stepId, target.part_id as partId from ${from} join step_target target on target.step_id = step.id where ${front}`)
  const entries = db.all<EntryRow>(sql`select entry.turn_id as turnId, entry.session_id as sessionId, entry.member_id as memberId, entry.starts_at as startsAt, entry.ends_at as endsAt, entry.due_at as dueAt, entry.last_start_at as lastStartAt, entry.first_few as firstFew, entry.last_start_few_at as lastStartFewAt, entry.after_test as afterTest
    from plan join plan_entry entry on entry.plan_id = plan.id where plan.studio_id = ${studioId} and plan.current = 1 and entry.turn_id in (select value from json_each(${JSON.stringify(turns.map(each => each.id))}))`)
  const sizes = db.all<{ sessionId: number | null, size: number }>(sql`select entry.session_id as sessionId, count(*) as size
    from plan join plan_entry entry on entry.plan_id = plan.id where plan.studio_id = ${studioId} and plan.current = 1 group by entry.session_id`)
  return { steps, turns, targets, sizes, links, entries }
}

function readIntakes(db: Reader, studioId: number, only: readonly number[] | null) {
  return db.select({ pieceId: intake.pieceId, question: intake.question, answer: intake.answer }).from(intake)
    .where(scoped(intake, studioId, inArray(intake.answer, ['open', 'not tested', 'tested, found']), only ? inArray(intake.pieceId, [...only]) : undefined)).all()
}
