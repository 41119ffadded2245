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
  return { pieces: readPieces(db, studioId, pieceIds), parts: readParts(db, studioId, pieceIds), films: readFilms(db, studioId, pieceIds), materials: readMaterials(db, studioId), steps: readSteps(db, studioId, pieceIds), intakes: readIntakes(db, studioId, pieceIds) }
}
export type PieceRows = ReturnType<typeof readPieceRows>

const among = (column: SQL, only: readonly number[] | null) => only ? sql`and ${column} in ${only}` : sql``

/** What each field of a row is read from. */
type Columns<Row> = { readonly [Field in keyof Row]: string }

/** Plain rows of plain SQL: what the query builder adds to each costs more than the reading, and a full board reads thousands. */
function read<Row extends object>(db: Reader, columns: Columns<Row>, rest: SQL): Row[] {
  const fields = Object.keys(columns) as (keyof Row)[]
  const list = sql.raw(fields.map(field => columns[field]).join(', '))
  return db.values<unknown[]>(sql`select ${list} ${rest}`).map((values) => {
    const row: Partial<Record<keyof Row, unknown>> = {}
    fields.forEach((field, index) => row[field] = values[index])
    return row as Row
  })
}

interface PieceRow { id: number, name: string, version: number, stepsDone: number, stepsOf: number, batchId: number, batchName: string, orderId: number | null, orderName: string | null, dueAt: number | null, promisedAt: number | null }
const pieceColumns: Columns<PieceRow> = {
  id: 'piece.id', name: 'piece.name', version: 'piece.version', stepsDone: 'piece.steps_done', stepsOf: 'piece.steps_of', batchId: 'piece.batch_id', batchName: 'batch.name',
  orderId: '"order".id', orderName: '"order".name', dueAt: '"order".due_at', promisedAt: '"order".promised_at',
}

function readPieces(db: Reader, studioId: number, only: readonly number[] | null) {
  return read(db, pieceColumns, sql`from piece join batch on batch.id = piece.batch_id left join "order" on "order".id = batch.order_id
    where piece.studio_id = ${studioId} and piece.gone_at is null ${among(sql`piece.id`, only)} order by piece.batch_id, piece.ordinal`)
}

interface PartRow { id: number, pieceId: number, key: string, name: string, grip: string | null, into: number | null, placeId: number | null, roomId: number | null, carrier: string | null, seenAt: number | null, missingAt: number | null }
const partColumns: Columns<PartRow> = {
  id: 'part.id', pieceId: 'part.piece_id', key: 'part.key', name: 'part.name', grip: 'part.grip', into: 'part.into_part_id',
  placeId: 'stay.place_id', roomId: 'place.room_id', carrier: 'carrier.name', seenAt: 'stay.seen_at', missingAt: 'stay.missing_since',
}

function readParts(db: Reader, studioId: number, only: readonly number[] | null) {
  return read(db, partColumns, sql`from piece join part on part.piece_id = piece.id left join stay on stay.part_id = part.id and stay.to_at is null
    left join place on place.id = stay.place_id left join carrier on carrier.id = stay.carrier_id
    where piece.studio_id = ${studioId} and piece.gone_at is null ${among(sql`piece.id`, only)} order by part.id`)
}

interface MaterialRow { id: number, name: string, kind: string, solvent: string, mustLieLevel: 0 | 1, glovesUntil: MilestoneName | null, cautions: string }
const materialColumns: Columns<MaterialRow> = { id: 'version.id', name: 'material.name', kind: 'version.kind', solvent: 'version.solvent', mustLieLevel: 'version.must_lie_level', glovesUntil: 'version.gloves_until', cautions: 'version.cautions' }

/** Every edition of every material once, by its number: a few dozen, which hundreds of films and steps point at. */
function readMaterials(db: Reader, studioId: number) {
  const rows = read(db, materialColumns, sql`from material_version version join material on material.id = version.material_id where version.studio_id = ${studioId}`)
  return new Map(rows.map(({ cautions, ...row }) => [row.id, { ...row, cautions: JSON.parse(cautions) as string[] }]))
}

interface CoatRow { id: number, pieceId: number, actId: number, kind: CoatKind, versionId: number | null, beganAt: number, endedAt: number, hold: Hold | null, outAt: number | null, stepId: number | null, step: string | null, rungs: string, windows: string, targets: string, doubts: string }
type Rung = [ordinal: number, name: MilestoneName, likelyAt: number | null, p90At: number | null, p98At: number | null, reachedAt: number | null, reason: ReasonCode | null]
type Window = [ordinal: number, opensAt: number | null, shutsAt: number | null]
type Target = [partId: number, face: string | null, layer: number]
type Doubt = [cause: DoubtCause, fromAt: number]

// A few thousand rungs as rows of their own take twice as long, and so does what SQLite has to sort: rows and lists are sorted here.
const coatColumns: Columns<CoatRow> = {
  id: 'coat.id', pieceId: 'coat.piece_id', actId: 'coat.act_id', kind: 'coat.kind', versionId: 'coat.material_version_id', beganAt: 'coat.began_at', endedAt: 'coat.ended_at', hold: 'coat.hold', outAt: 'coat.out_at', stepId: 'turn.step_id', step: 'step.name',
  rungs: '(select json_group_array(json_array(ordinal, milestone, likely_at, p90_at, p98_at, reached_at, reason)) from prediction where coat_id = coat.id)',
  windows: '(select json_group_array(json_array(ordinal, opens_at, shuts_at)) from window_prediction where coat_id = coat.id)',
  targets: '(select json_group_array(json_array(target.part_id, face.key, target.layer)) from coat_target target left join face on face.id = target.face_id where target.coat_id = coat.id)',
  doubts: '(select json_group_array(json_array(cause, from_at)) from doubt where doubt.coat_id = coat.id and doubt.cleared_act_id is null)',
}
const inOrder = <Row extends [ordinal: number, ...unknown[]]>(json: string) => (JSON.parse(json) as Row[]).sort((a, b) => a[0] - b[0])

/** Films that can still change an answer, by the partial index that holds nothing else: SQLite left to itself takes another. */
function readFilms(db: Reader, studioId: number, only: readonly number[] | null) {
  const rows = read(db, coatColumns, sql`from coat indexed by coat_live left join turn on turn.id = coat.turn_id left join piece_step step on step.id = turn.step_id
    where coat.studio_id = ${studioId} and coat.settled_at is null and coat.stripped_at is null ${among(sql`coat.piece_id`, only)}`)
  return rows.sort((a, b) => a.endedAt - b.endedAt).map(row => ({ ...row, rungs: inOrder<Rung>(row.rungs), windows: inOrder<Window>(row.windows), targets: JSON.parse(row.targets) as Target[], doubts: JSON.parse(row.doubts) as Doubt[] }))
}

interface StepRow { id: number, pieceId: number, key: string, name: string, kind: StepKind, origin: StepOrigin, status: StepStatus, asideReason: string | null, hold: Hold | null, untilEnough: 0 | 1, materialVersionId: number | null, setupMin: number, pieceMin: number, cleanMin: number, dust: DustClass }
const stepColumns: Columns<StepRow> = {
  id: 'step.id', pieceId: 'step.piece_id', key: 'step.key', name: 'step.name', kind: 'step.kind', origin: 'step.origin', status: 'step.status', asideReason: 'step.aside_reason', hold: 'step.hold', untilEnough: 'step.until_enough',
  materialVersionId: 'step.material_version_id', setupMin: 'step.setup_min', pieceMin: 'step.piece_min', cleanMin: 'step.clean_min', dust: 'step.dust',
}

interface TurnRow { id: number, stepId: number, kind: TurnKind, name: string, checkAfterMin: number | null, minutes: number, status: TurnStatus, beganAt: number | null, doingMemberId: number | null, notOnAt: number | null }
const turnColumns: Columns<TurnRow> = {
  id: 'turn.id', stepId: 'turn.step_id', kind: 'turn.kind', name: 'turn.name', checkAfterMin: 'turn.check_after_min', minutes: 'turn.minutes', status: 'turn.status',
  beganAt: 'turn.began_at', doingMemberId: 'turn.doing_member_id', notOnAt: 'turn.not_on_at',
}

/** A link to the front with the step it comes from: its name, and whether it is done. */
interface LinkRow { fromStepId: number, toStepId: number, milestone: MilestoneName | null, risk: Risk, windowed: 0 | 1, fromName: string, fromStatus: StepStatus }
const linkColumns: Columns<LinkRow> = { fromStepId: 'link.from_step_id', toStepId: 'link.to_step_id', milestone: 'link.milestone', risk: 'link.risk', windowed: 'link.windowed', fromName: 'earlier.name', fromStatus: 'earlier.status' }

const targetColumns: Columns<{ stepId: number, partId: number }> = { stepId: 'target.step_id', partId: 'target.part_id' }

interface EntryRow { turnId: number, sessionId: number | null, memberId: number | null, startsAt: number, endsAt: number, dueAt: number, lastStartAt: number | null, firstFew: number | null, lastStartFewAt: number | null, afterTest: 0 | 1 }
const entryColumns: Columns<EntryRow> = {
  turnId: 'entry.turn_id', sessionId: 'entry.session_id', memberId: 'entry.member_id', startsAt: 'entry.starts_at', endsAt: 'entry.ends_at', dueAt: 'entry.due_at',
  lastStartAt: 'entry.last_start_at', firstFew: 'entry.first_few', lastStartFewAt: 'entry.last_start_few_at', afterTest: 'entry.after_test',
}

function readSteps(db: Reader, studioId: number, only: readonly number[] | null) {
  // Written out as 1: SQLite uses a partial index only where the query says the same as the index, not for a bound value.
  const front = sql`step.studio_id = ${studioId} and step.at_front = 1 ${among(sql`step.piece_id`, only)}`
  const from = sql`from piece_step step indexed by piece_step_front`
  const planned = sql`from plan join plan_entry entry on entry.plan_id = plan.id where plan.studio_id = ${studioId} and plan.current = 1`
  const turns = read(db, turnColumns, sql`${from} join turn on turn.step_id = step.id where ${front} order by turn.step_id, turn.ordinal`)
  return {
    steps: read(db, stepColumns, sql`${from} where ${front} order by step.piece_id, step.ordinal`),
    turns,
    links: read(db, linkColumns, sql`${from} join step_link link on link.to_step_id = step.id join piece_step earlier on earlier.id = link.from_step_id where ${front}`),
    targets: read(db, targetColumns, sql`${from} join step_target target on target.step_id = step.id where ${front} group by target.step_id, target.part_id`),
    entries: read(db, entryColumns, sql`${planned} and entry.turn_id in (select value from json_each(${JSON.stringify(turns.map(each => each.id))}))`),
    sizes: read<{ sessionId: number | null, size: number }>(db, { sessionId: 'entry.session_id', size: 'count(entry.last_start_at)' }, sql`${planned} and entry.session_id is not null group by entry.session_id`),
  }
}

function readIntakes(db: Reader, studioId: number, only: readonly number[] | null) {
  return db.select({ pieceId: intake.pieceId, question: intake.question, answer: intake.answer }).from(intake)
    .where(scoped(intake, studioId, inArray(intake.answer, ['open', 'not tested', 'tested, found']), only ? inArray(intake.pieceId, [...only]) : undefined)).all()
}
