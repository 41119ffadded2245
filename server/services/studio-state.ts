import { asc, eq, isNull, sql } from 'drizzle-orm'
import { closure, milestone, openHours, plan, planSession, ragDuty, room } from '~~/db/schema'
import { pieceStates } from '~~/server/services/piece-states'
import { movedTurns } from '~~/server/services/plan-moves'
import { placeStates, roomStates } from '~~/server/services/room-states'
import { witnessStates } from '~~/server/services/witnesses'
import type { StudioRow } from '~~/server/services/sessions'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { grouped } from '#shared/grouped'
import { openSpans } from '#shared/open-hours'
import type { OpenHours } from '#shared/open-hours'
import type { PieceState, SessionState, StudioState } from '#shared/schemas/piece-state'
import { handTests } from '#shared/library/hand-tests'
import type { OwnHandTest } from '#shared/words/hand-tests'
import { addDays, fromLocal, localDate, startOfLocalDay, studioZone } from '#shared/time'

/**
 * The studio as it stands at `now` (ms UTC): what every screen is drawn from. A number of queries that does not grow
 * with the number of pieces, each on an index.
 */
export function studioState(db: Database, owner: StudioRow, now: number): StudioState {
  const pieces = pieceStates(db, owner.id, null)
  const hours = studioHours(db, owner.id)
  return {
    at: now, revision: owner.revision,
    studio: { id: owner.id, name: owner.name, zone: owner.zone, units: owner.units },
    hours: hoursToday(hours, owner, now),
    rooms: roomStates(db, owner.id, now),
    places: placeStates(db, owner.id),
    pieces,
    sessions: sessionStates(db, owner.id, pieces),
    moved: movedTurns(db, owner.id, now, hours, studioZone(owner.zone)),
    rags: db.select({ id: ragDuty.id, roomId: ragDuty.roomId, room: room.name, sinceAt: ragDuty.lastOilAt }).from(ragDuty).innerJoin(room, eq(room.id, ragDuty.roomId))
      .where(scoped(ragDuty, owner.id, isNull(ragDuty.answeredAt))).all(),
    witnesses: witnessStates(db, owner.id),
    handTests: ownHandTests(db, owner.id, pieces),
  }
}

/** The hand tests of the materials that are on something, where they are not the trade's usual ones. */
function ownHandTests(db: Database, studioId: number, pieces: readonly PieceState[]): OwnHandTest[] {
  const on = new Set(pieces.flatMap(piece => piece.groups.flatMap(group => group.films.map(film => film.materialVersionId))))
  return db.select({ versionId: milestone.versionId, milestone: milestone.name, text: milestone.handTest }).from(milestone).where(scoped(milestone, studioId)).all()
    .filter(each => on.has(each.versionId) && each.text !== handTests[each.milestone])
}

const studioHours = (db: Database, studioId: number): OpenHours => ({
  open: db.select().from(openHours).where(scoped(openHours, studioId, isNull(openHours.memberId))).all(),
  closed: db.select().from(closure).where(scoped(closure, studioId, isNull(closure.memberId))).all(),
})

function hoursToday(hours: OpenHours, owner: StudioRow, now: number) {
  const zone = studioZone(owner.zone)
  const dayEnd = fromLocal(addDays(localDate(now, zone), 1), 0, zone)
  return openSpans(hours, zone, startOfLocalDay(now, zone), dayEnd).map(span => ({ opensAt: span.fromAt, closesAt: span.toAt }))
}

/** The sessions of the plan in force that still have something waiting, by the turns that pieces show. */
function sessionStates(db: Database, studioId: number, pieces: readonly PieceState[]): SessionState[] {
  const rows = db.select({ session: planSession }).from(plan).innerJoin(planSession, eq(planSession.planId, plan.id))
    .where(scoped(plan, studioId, sql`${plan.current} = 1`, eq(planSession.studioId, studioId))).orderBy(asc(planSession.startsAt)).all().map(row => row.session)
  const planned = pieces.flatMap(piece => piece.turns.flatMap(turn => turn.plan ? [{ ...turn.plan, turnId: turn.turnId, pieceId: piece.id }] : []))
  const turns = grouped(planned, turn => turn.sessionId)
  return rows.flatMap((row) => {
    const members = turns.get(row.id) ?? []
    const first = members[0]
    return first ? [{ id: row.id, family: row.family, startsAt: row.startsAt, endsAt: row.endsAt, lastStartAt: first.lastStartAt, firstFew: first.firstFew, lastStartFewAt: first.lastStartFewAt, turnIds: members.map(each => each.turnId), pieceIds: members.map(each => each.pieceId) }] : []
  })
}
