import { and, asc, desc, eq, gt, inArray, isNotNull, isNull, sql } from 'drizzle-orm'
import { act, cause, keepOut, material, materialVersion, member, person, ragDuty, reminder, room, seen, statement, studioRule, vapourLimit } from '~~/db/schema'
import { cautionsOf, cautionsWith } from '~~/server/services/cautions'
import { reshutMs } from '~~/server/services/keep-outs'
import { memberNames } from '~~/server/services/member-names'
import { hiddenFrom } from '~~/server/services/private-materials'
import type { Membership } from '~~/server/services/sessions'
import { exhaustRuns, shownStarts } from '~~/server/services/vapour-facts'
import type { StartRow } from '~~/server/services/vapour-facts'
import { readPlanned, readVapour, sumsOf } from '~~/server/services/vapour-rooms'
import type { VapourNow } from '~~/server/services/vapour-rooms'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { RoomRow } from '~~/server/work/rooms-of-parts'
import { findCaution } from '#shared/library/cautions'
import { may } from '#shared/permissions'
import type { RoomVapourState, StartState, VapourState } from '#shared/schemas/vapour'
import { vapourPhase } from '#shared/solvent-rooms'
import { isSolventBorne } from '#shared/vapour/facts'
import { leversFor } from '#shared/vapour/picture'
import type { NamedCoat } from '#shared/vapour/picture'

/** All that the Safety screen shows of a studio at `now` (ms UTC). */
export function vapourState(db: Database, studioId: number, who: Membership, now: number): VapourState {
  const rows = db.select().from(room).where(scoped(room, studioId)).orderBy(asc(room.sort), asc(room.id)).all()
  const read = readVapour(db, studioId, now)
  const planned = readPlanned(db, studioId, now)
  const names = memberNames(db, studioId)
  const starts = startStates(db, studioId, shownStarts(db, studioId, now), names)
  const lines = keepOuts(db, studioId, now)
  const hidden = hiddenFrom(db, studioId, may(who.role, 'see private mixes'))
  return {
    at: now,
    rooms: rows.map(row => roomState(row, rows, { read, planned, names, starts, lines, who })),
    rags: db.select({ id: ragDuty.id, room: room.name, sinceAt: ragDuty.lastOilAt, answer: ragDuty.answer }).from(ragDuty).innerJoin(room, eq(room.id, ragDuty.roomId)).where(scoped(ragDuty, studioId, isNull(ragDuty.answeredAt))).orderBy(asc(ragDuty.lastOilAt)).all(),
    cautions: standingCautions(db, studioId, hidden),
    rules: db.select({ id: studioRule.id, text: studioRule.text, memberId: studioRule.memberId }).from(studioRule).where(scoped(studioRule, studioId, isNull(studioRule.withdrawnAt))).orderBy(asc(studioRule.id)).all()
      .map(({ memberId, ...rule }) => ({ ...rule, by: names.get(memberId) ?? '' })),
    statement: statementOf(db, studioId, names),
    materials: limitStates(db, studioId, hidden, [...read.wet.values(), ...planned.values()].flat()),
    unsized: unsized(db, studioId, now),
  }
}

interface Known { read: VapourNow, planned: Map<number, NamedCoat[]>, names: Map<number, string>, starts: Map<number, StartState>, lines: ReturnType<typeof keepOuts>, who: Membership }

function roomState(row: RoomRow, all: readonly RoomRow[], { read, planned, names, starts, lines, who }: Known): RoomVapourState {
  const ahead = planned.get(row.id) ?? []
  const now = sumsOf(row, read)
  const sums = ahead.length > 0 ? sumsOf(row, read, ahead) : now
  const coats = [...read.wet.get(row.id) ?? [], ...ahead].filter(each => sums?.contributions.some(one => one.id === each.id))
  const others = all.filter(each => each.id !== row.id).map(each => ({ name: each.name, outdoor: each.outdoor, sleptIn: each.sleptIn, sums: (added: readonly NamedCoat[]) => sumsOf(each, read, added) }))
  const line = lines.open.get(row.id)
  const opened = lines.opened.get(row.id)
  return {
    roomId: row.id, name: row.name, outdoor: row.outdoor, sprayArea: row.sprayArea, sleptIn: row.sleptIn, volumeM3: row.volumeM3, exhaustM3H: row.exhaustM3H, airChangesPerHour: row.airChangesPerHour, airMoves: row.airMoves,
    exhaustRuns: exhaustRuns(read.starts.get(row.id), read.now),
    keepOut: line ? { sinceAt: line.fromAt, opensBy: names.get(line.opensByMemberId ?? 0) ?? null, mayOpen: may(who.role, 'start batches') && (line.opensByMemberId === null || line.opensByMemberId === who.id || who.role === 'owner') } : null,
    openedLast: !line && opened?.openedAt ? { at: opened.openedAt, by: names.get(opened.openedBy ?? 0) ?? null } : null,
    start: starts.get(row.id) ?? null,
    now, ahead: sums,
    levers: sums ? leversFor(sums, coats, others, now?.cautious.notClearBefore ?? null) : null,
  }
}

function keepOuts(db: Database, studioId: number, now: number) {
  const open = db.select().from(keepOut).where(scoped(keepOut, studioId, isNull(keepOut.openedAt))).all()
  const opened = db.select({ roomId: keepOut.roomId, openedAt: keepOut.openedAt, openedBy: sql<number | null>`(select member_id from act where id = ${keepOut.openedActId})` }).from(keepOut)
    .where(and(scoped(keepOut, studioId, isNotNull(keepOut.openedAt)), gt(keepOut.openedAt, now - reshutMs))).orderBy(asc(keepOut.id)).all()
  return { open: new Map(open.map(row => [row.roomId, row])), opened: new Map(opened.map(row => [row.roomId, row])) }
}

/** The starts with their call, and who has seen it. */
function startStates(db: Database, studioId: number, starts: Map<number, StartRow>, names: Map<number, string>): Map<number, StartState> {
  const ids = [...starts.values()].map(row => row.id)
  const calls = ids.length === 0
    ? []
    : db.select({ startId: cause.subjectId, reminderId: reminder.id }).from(cause).innerJoin(reminder, eq(reminder.causeId, cause.id))
        .where(scoped(cause, studioId, eq(cause.kind, 'vapour'), inArray(cause.subjectId, ids))).orderBy(desc(reminder.id)).all()
  const looks = calls.length === 0 ? [] : db.select().from(seen).where(scoped(seen, studioId, inArray(seen.reminderId, calls.map(each => each.reminderId)))).orderBy(asc(seen.at)).all()
  const acts = new Map(ids.length === 0 ? [] : db.select({ id: act.id, kind: act.kind, doneAt: act.doneAt, toldAt: act.toldAt }).from(act).where(scoped(act, studioId, inArray(act.id, [...starts.values()].map(row => row.actId)))).all().map(row => [row.id, row]))
  const here = db.select({ id: member.id, name: person.name }).from(member).innerJoin(person, eq(person.id, member.personId)).where(scoped(member, studioId, isNull(member.leftAt))).orderBy(asc(member.id)).all()
  return new Map([...starts].map(([roomId, row]) => {
    const reminderId = calls.find(each => each.startId === row.id)?.reminderId ?? null
    const seenBy = looks.filter(each => each.reminderId === reminderId)
    const told = acts.get(row.actId)
    return [roomId, {
      id: row.id, at: row.at, phase: told ? vapourPhase(told, told.toldAt) : 'began', by: names.get(row.memberId ?? 0) ?? null, answers: { exhaust: row.exhaust, flamesOff: row.flamesOff, nobodyElse: row.nobodyElse }, reminderId,
      seenBy: seenBy.map(each => ({ name: names.get(each.memberId) ?? '', at: each.at })),
      unseenBy: here.filter(each => each.id !== row.memberId && !seenBy.some(one => one.memberId === each.id)).map(each => each.name),
    }]
  }))
}

/** The cautions of everything the studio has on its shelves, each once. */
function standingCautions(db: Database, studioId: number, hidden: ReadonlySet<number>): VapourState['cautions'] {
  const rows = db.select({ id: material.id, name: material.name, cautions: materialVersion.cautions, solvent: materialVersion.solvent, solventKey: vapourLimit.solventKey }).from(material).innerJoin(materialVersion, eq(materialVersion.materialId, material.id)).leftJoin(vapourLimit, eq(vapourLimit.materialId, material.id))
    .where(scoped(material, studioId, isNull(material.archivedAt))).orderBy(asc(material.name), asc(materialVersion.no)).all()
  const newest = [...new Map(rows.map(row => [row.id, row])).values()].filter(row => !hidden.has(row.id)).map(row => ({ ...row, cautions: cautionsWith(row) }))
  return [...['phones', 'paint stripper'].map(key => ({ key, materials: [] })), ...cautionsOf(newest)].flatMap(({ key, materials }) => {
    const known = findCaution(key)
    return known ? [{ key: known.key, materials }] : []
  })
}

function statementOf(db: Database, studioId: number, names: Map<number, string>): VapourState['statement'] {
  const row = db.select().from(statement).where(scoped(statement, studioId, eq(statement.kind, 'isocyanate'), isNull(statement.withdrawnAt))).get()
  return row ? { id: row.id, text: row.text, by: names.get(row.memberId) ?? '', at: row.at } : null
}

/** Materials that give off solvent with what the owner read in their sheets; those in use first. */
function limitStates(db: Database, studioId: number, hidden: ReadonlySet<number>, coats: readonly NamedCoat[]): VapourState['materials'] {
  const rows = db.select({ materialId: material.id, name: material.name, solvent: materialVersion.solvent, sheet: vapourLimit }).from(material).innerJoin(materialVersion, eq(materialVersion.materialId, material.id))
    .leftJoin(vapourLimit, eq(vapourLimit.materialId, material.id)).where(scoped(material, studioId, isNull(material.archivedAt))).orderBy(asc(material.name), asc(materialVersion.no)).all()
  const newest = [...new Map(rows.map(row => [row.materialId, row])).values()].filter(row => !hidden.has(row.materialId) && (isSolventBorne(row.solvent) || row.sheet !== null))
  const used = new Set(coats.map(each => each.material))
  return newest.map(({ materialId, name, solvent, sheet }) => ({
    materialId, name, solvent, used: used.has(name),
    sheet: sheet && { solventKey: sheet.solventKey, limitMgM3: sheet.limitMgM3, ceilingMgM3: sheet.ceilingMgM3, lelGramsM3: sheet.lelGramsM3, vocGramsPerLitre: sheet.vocGramsPerLitre, exemptGramsPerLitre: sheet.exemptGramsPerLitre, spreadM2PerLitre: sheet.spreadM2PerLitre, touchDryMinutes: sheet.touchDryMinutes },
  })).sort((a, b) => Number(b.used) - Number(a.used))
}

/** Batches in the studio whose pieces nobody has measured, with solvent on them or to come. */
function unsized(db: Database, studioId: number, now: number): VapourState['unsized'] {
  return db.all<VapourState['unsized'][number]>(sql`select batch.id as batchId, batch.name as batch, count(distinct piece.id) as pieces from piece join batch on batch.id = piece.batch_id
    where piece.studio_id = ${studioId} and piece.gone_at is null and batch.closed_at is null and piece.area_m2 is null and (
      exists (select 1 from coat join material_version version on version.id = coat.material_version_id where coat.piece_id = piece.id and coat.settled_at is null and coat.ended_at > ${now - 2 * 24 * 3_600_000} and version.solvent not in ('water', 'none'))
      or exists (select 1 from piece_step step join material_version version on version.id = step.material_version_id where step.piece_id = piece.id and step.status in ('waiting', 'doing') and version.solvent not in ('water', 'none')))
    group by batch.id order by batch.id`)
}
