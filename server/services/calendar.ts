import { and, asc, eq, isNull, sql } from 'drizzle-orm'
import icalendar, { ICalEventTransparency } from 'ical-generator'
import { calendarLink, member, part, person, piece, pieceStep, place, plan, planEntry, planMate, stay, stepTarget, studio, turn } from '~~/db/schema'
import type { StudioRow } from '~~/server/services/sessions'
import { studioState } from '~~/server/services/studio-state'
import type { Database } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import { hashToken, newToken } from '~~/server/utils/token'
import { readyEntries, workEntries } from '#shared/calendar'
import type { CalendarEntry, PlannedTurn } from '#shared/calendar'
import type { CalendarWire } from '#shared/schemas/calendar'
import { studioZone } from '#shared/time'
import { readPiece } from '#shared/verdict/piece'
import { calendarWords } from '#shared/words/calendar'

/** Seconds after which a calendar reads it again. */
const readAgain = 15 * 60

/** Makes somebody's calendar address, told once; the one before opens nothing any more. */
export function makeCalendarLink(db: Database, studioId: number, memberId: number, everybody: boolean, now: number): { ok: true, token: string } {
  const { token, hash } = newToken()
  const values = { studioId, memberId, tokenHash: hash, everybody, madeAt: now }
  db.insert(calendarLink).values(values).onConflictDoUpdate({ target: calendarLink.memberId, set: values }).run()
  return { ok: true, token }
}

export function endCalendarLink(db: Database, studioId: number, memberId: number): { ok: true } | Refusal {
  return db.delete(calendarLink).where(scoped(calendarLink, studioId, eq(calendarLink.memberId, memberId))).run().changes > 0 ? { ok: true } : absent()
}

export function readCalendarLink(db: Database, studioId: number, memberId: number): CalendarWire | null {
  const row = db.select().from(calendarLink).where(scoped(calendarLink, studioId, eq(calendarLink.memberId, memberId))).get()
  return row ? { everybody: row.everybody, madeAt: new Date(row.madeAt).toISOString() } : null
}

/** The calendar behind a secret, as iCalendar (RFC 5545), or absent: unknown, ended, or of somebody who has left. */
export function calendarOf(db: Database, secret: string, now: number): { ok: true, text: string } | Refusal {
  const row = db.select({ link: calendarLink, studio, name: person.name }).from(calendarLink)
    .innerJoin(studio, eq(studio.id, calendarLink.studioId)).innerJoin(member, eq(member.id, calendarLink.memberId)).innerJoin(person, eq(person.id, member.personId))
    .where(and(eq(calendarLink.tokenHash, hashToken(secret)), isNull(member.leftAt))).get()
  if (!row) return absent()
  const { link } = row
  return { ok: true, text: written(row.studio, link.everybody ? null : row.name, entriesOf(db, row.studio, link.everybody ? null : link.memberId, now), now) }
}

function entriesOf(db: Database, owner: StudioRow, memberId: number | null, now: number): CalendarEntry[] {
  const clock = { now, zone: studioZone(owner.zone) }
  const state = studioState(db, owner, now)
  return [...workEntries(plannedTurns(db, owner.id), memberId, clock), ...readyEntries(state.pieces.map(each => readPiece(each, state, now, null)), clock)]
}

/** Every waiting turn of the plan in force, and where the part it is about stands. */
function plannedTurns(db: Database, studioId: number): PlannedTurn[] {
  return db.select({
    turnId: planEntry.turnId, sessionId: planEntry.sessionId, memberId: planEntry.memberId, mates: sql<string | null>`(select group_concat(${planMate.memberId}) from ${planMate} where ${planMate.planId} = ${planEntry.planId} and ${planMate.turnId} = ${planEntry.turnId})`, step: pieceStep.name, kind: pieceStep.kind, turnKind: turn.kind, turnName: turn.name,
    piece: piece.name, place: sql<string | null>`min(${place.name})`, startsAt: planEntry.startsAt, endsAt: planEntry.endsAt, lastStartAt: planEntry.lastStartAt,
  }).from(plan).innerJoin(planEntry, eq(planEntry.planId, plan.id)).innerJoin(turn, eq(turn.id, planEntry.turnId)).innerJoin(pieceStep, eq(pieceStep.id, turn.stepId)).innerJoin(piece, eq(piece.id, pieceStep.pieceId))
    .leftJoin(stepTarget, eq(stepTarget.stepId, pieceStep.id)).leftJoin(part, eq(part.id, stepTarget.partId)).leftJoin(stay, and(eq(stay.partId, part.id), isNull(stay.toAt))).leftJoin(place, eq(place.id, stay.placeId))
    .where(scoped(plan, studioId, eq(plan.current, true), eq(turn.status, 'waiting'))).groupBy(planEntry.turnId).orderBy(asc(planEntry.startsAt), asc(planEntry.turnId)).all()
    .map(({ turnKind, turnName, memberId, mates, ...row }) => ({ ...row, memberIds: [memberId, ...(mates?.split(',') ?? []).map(Number)].filter(id => id !== null), check: turnKind === 'work' ? null : turnName }))
}

function written(owner: StudioRow, person: string | null, entries: readonly CalendarEntry[], now: number): string {
  const name = calendarWords.name(owner.name, person)
  const calendar = icalendar({ name, prodId: { company: 'Stillwet', product: 'Board', language: 'EN' }, ttl: readAgain, timezone: null })
  for (const { key, from, to, title, says, place: where } of entries) {
    calendar.createEvent({
      id: `${key}.studio-${owner.id}@stillwet`, stamp: new Date(now), start: new Date(from), end: to === null ? null : new Date(to), summary: title, description: says, location: where,
      transparency: to === null ? ICalEventTransparency.TRANSPARENT : ICalEventTransparency.OPAQUE,
    })
  }
  return calendar.toString()
}
