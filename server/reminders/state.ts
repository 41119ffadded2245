import { and, eq, isNull, sql } from 'drizzle-orm'
import { closure, openHours, ragDuty, room, studio } from '~~/db/schema'
import { pieceStates } from '~~/server/services/piece-states'
import { placeStates, roomStates } from '~~/server/services/room-states'
import type { Database } from '~~/server/utils/database'
import { grouped } from '#shared/grouped'
import type { StepKind, TurnKind } from '#shared/terms'
import { startOfLocalDay, studioZone } from '#shared/time'
import type { StudioZone } from '#shared/time'
import { readPiece } from '#shared/verdict/piece'
import type { ReadTurn } from '#shared/verdict/piece'
import type { StudioHours } from './hours'
import { readShutRooms, readStarts } from './vapour'
import type { ShutRoomCall, VapourStartCall } from './vapour'

/** A turn of the current plan that waits to be done, as far as calls need it. Times in ms UTC. */
export interface PlannedTurn {
  turnId: number
  sessionId: number | null
  batchId: number
  batchName: string
  branchId: number | null
  stepId: number
  stepKey: string
  stepName: string
  stepKind: StepKind
  ordinal: number
  kind: TurnKind
  turnName: string
  pieceName: string
  /** The first planned start that nobody has spoken to: a new plan does not push a silent start on. */
  dueAt: number
  afterTest: boolean
  /** As every screen reads it. */
  read: ReadTurn
  /** The act of the newest film under this turn's hands, and how often that film was still not there when touched. */
  after: { actId: number, failedTests: number } | null
}

/** Films that still matter in one room, by what they give off. */
export interface WetRoom { roomId: number, name: string, heated: boolean, films: number, solvent: number }

/** What the calls of a studio follow from. */
export interface CallState {
  studioId: number
  hours: StudioHours
  turns: PlannedTurn[]
  /** Steps of a batch that somebody is at, or was within the last 45 minutes: `batch/step/ordinal`. */
  underWay: ReadonlySet<string>
  wetRooms: WetRoom[]
  outdoors: { pieceName: string, placeName: string }[]
  usedToday: { name: string, kind: string, libraryKey: string | null }[]
  rags: { dutyId: number, roomName: string, lastOilAt: number, lastOilActId: number }[]
  /** Solvent work begun of late in rooms that nobody has opened since, and shut rooms with the floor under their opening. */
  starts: VapourStartCall[]
  shut: ShutRoomCall[]
}

/** How far ahead calls are prepared, in ms. */
export const horizonMs = 36 * 3_600_000
const atItMs = 45 * 60_000

/** Names a step of a batch for `underWay`. */
export const workKey = (turn: { batchId: number, stepKey: string, ordinal: number }) => `${turn.batchId}/${turn.stepKey}/${turn.ordinal}`

/** Reads one studio's state for its calls; null when there is no such studio. */
export function readCallState(db: Database, studioId: number, now: number): CallState | null {
  const found = db.select().from(studio).where(eq(studio.id, studioId)).get()
  if (!found) return null
  const zone = studioZone(found.zone)
  return {
    studioId,
    hours: readHours(db, studioId, zone),
    turns: readTurns(db, studioId, now),
    underWay: readUnderWay(db, studioId, now),
    wetRooms: readWetRooms(db, studioId),
    outdoors: readOutdoors(db, studioId),
    usedToday: readUsed(db, studioId, startOfLocalDay(now, zone)),
    rags: db.select({ dutyId: ragDuty.id, roomName: room.name, lastOilAt: ragDuty.lastOilAt, lastOilActId: ragDuty.lastOilActId })
      .from(ragDuty).innerJoin(room, eq(ragDuty.roomId, room.id)).where(and(eq(ragDuty.studioId, studioId), isNull(ragDuty.answeredAt))).all(),
    starts: readStarts(db, studioId, now),
    shut: readShutRooms(db, studioId, now),
  }
}

function readHours(db: Database, studioId: number, zone: StudioZone): StudioHours {
  const own = (table: typeof openHours | typeof closure) => and(eq(table.studioId, studioId), isNull(table.memberId))
  return { zone, open: db.select().from(openHours).where(own(openHours)).all(), closed: db.select().from(closure).where(own(closure)).all() }
}

type TurnRow = Omit<PlannedTurn, 'after' | 'afterTest' | 'read'> & { afterTest: number }

function readTurns(db: Database, studioId: number, now: number): PlannedTurn[] {
  const until = now + horizonMs
  const rows = db.all<TurnRow>(sql`
    select e.turn_id as turnId, e.session_id as sessionId, p.batch_id as batchId, b.name as batchName, p.branch_id as branchId,
      s.id as stepId, s.key as stepKey, s.name as stepName, s.kind as stepKind, t.ordinal, t.kind, t.name as turnName, p.name as pieceName,
      e.due_at as dueAt, e.after_test as afterTest
    from plan pl join plan_entry e on e.plan_id = pl.id join turn t on t.id = e.turn_id join piece_step s on s.id = t.step_id
      join piece p on p.id = s.piece_id join batch b on b.id = p.batch_id
    where pl.studio_id = ${studioId} and pl.current = 1 and (e.due_at <= ${until} or e.last_start_at <= ${until})
      and t.status = 'waiting' and s.status in ('waiting', 'doing', 'resting') and p.gone_at is null and b.closed_at is null
    order by e.due_at, p.ordinal, t.id`)
  if (rows.length === 0) return []
  const films = readFilms(db, studioId)
  const parts = readParts(db, studioId)
  const reads = readAsScreensDo(db, studioId, now)
  return rows.flatMap((row): PlannedTurn[] => {
    const read = reads.get(row.turnId)
    return read ? [{ ...row, read, afterTest: Boolean(row.afterTest), after: newest((parts.get(row.stepId) ?? []).map(({ partId }) => films.get(partId))) }] : []
  })
}

/** The turns that are next on their pieces, by number: of what comes only after them no call can say a true time. */
function readAsScreensDo(db: Database, studioId: number, now: number): Map<number, ReadTurn> {
  const where = { rooms: roomStates(db, studioId, now), places: placeStates(db, studioId) }
  return new Map(pieceStates(db, studioId, null).flatMap(piece => readPiece(piece, where, now, null).turns.map(read => [read.turn.turnId, read] as const)))
}

interface Film { coatId: number, actId: number, failedTests: number }

/** The newest film on each part that still matters. */
function readFilms(db: Database, studioId: number): Map<number, Film> {
  const rows = db.all<Film & { partId: number }>(sql`
    select ct.part_id as partId, c.id as coatId, c.act_id as actId,
      (select count(*) from touch_test f where f.coat_id = c.id and f.reached = 0) as failedTests
    from coat c join coat_target ct on ct.coat_id = c.id
    where c.studio_id = ${studioId} and c.settled_at is null and c.stripped_at is null order by c.id`)
  return new Map(rows.map(row => [row.partId, row]))
}

function readParts(db: Database, studioId: number) {
  const rows = db.all<{ stepId: number, partId: number }>(sql`
    select distinct g.step_id as stepId, g.part_id as partId from piece_step s join step_target g on g.step_id = s.id
    where s.studio_id = ${studioId} and s.status in ('waiting', 'doing', 'resting', 'set aside')`)
  return grouped(rows, row => row.stepId)
}

function newest(films: (Film | undefined)[]) {
  let last: Film | null = null
  for (const film of films) if (film && (!last || film.coatId > last.coatId)) last = film
  return last && { actId: last.actId, failedTests: last.failedTests }
}

function readUnderWay(db: Database, studioId: number, now: number): Set<string> {
  const rows = db.all<{ batchId: number, stepKey: string, ordinal: number }>(sql`
    select distinct p.batch_id as batchId, s.key as stepKey, t.ordinal
    from piece_step s join turn t on t.step_id = s.id join piece p on p.id = s.piece_id
    where s.studio_id = ${studioId} and s.status in ('waiting', 'doing', 'resting', 'set aside') and (t.status = 'doing' or t.done_at > ${now - atItMs})
    union select distinct p.batch_id, s.key, t.ordinal from turn t join piece_step s on s.id = t.step_id join piece p on p.id = s.piece_id
    where t.studio_id = ${studioId} and t.status = 'done' and t.done_at > ${now - atItMs}`)
  return new Set(rows.map(workKey))
}

function readWetRooms(db: Database, studioId: number): WetRoom[] {
  return db.all<Omit<WetRoom, 'heated'> & { heated: number }>(sql`
    select r.id as roomId, r.name, r.heated, count(distinct c.id) as films,
      count(distinct case when coalesce(v.solvent, 'unknown') not in ('water', 'none') then c.id end) as solvent
    from coat c join coat_target ct on ct.coat_id = c.id join stay y on y.part_id = ct.part_id and y.to_at is null
      join place l on l.id = y.place_id join room r on r.id = l.room_id left join material_version v on v.id = c.material_version_id
    where c.studio_id = ${studioId} and c.settled_at is null and c.stripped_at is null and r.outdoor = 0
    group by r.id order by r.sort, r.id`).map(row => ({ ...row, heated: Boolean(row.heated) }))
}

function readOutdoors(db: Database, studioId: number) {
  return db.all<{ pieceName: string, placeName: string }>(sql`
    select distinct p.name as pieceName, l.name as placeName
    from room r join place l on l.room_id = r.id join stay y on y.place_id = l.id and y.to_at is null
      join part a on a.id = y.part_id join piece p on p.id = a.piece_id
    where r.studio_id = ${studioId} and r.outdoor = 1 and p.gone_at is null order by l.sort, p.ordinal, p.id`)
}

function readUsed(db: Database, studioId: number, fromAt: number) {
  return db.all<{ name: string, kind: string, libraryKey: string | null }>(sql`
    select distinct m.name, v.kind, m.library_key as libraryKey
    from coat c join material_version v on v.id = c.material_version_id join material m on m.id = v.material_id
    where c.studio_id = ${studioId} and c.settled_at is null and c.began_at >= ${fromAt} order by m.name`)
}
