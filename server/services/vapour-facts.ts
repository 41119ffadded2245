import { desc, inArray, isNull, sql } from 'drizzle-orm'
import type { SQL } from 'drizzle-orm'
import { materialFigure, milestone, vapourLimit, vapourStart } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { startToldForMs } from '#shared/solvent-rooms'
import { coatKinds } from '#shared/terms'
import type { SheetFigures, Span } from '#shared/vapour/facts'
import type { NamedCoat } from '#shared/vapour/picture'
import type { CoatSize } from '#shared/terms'

type Reader = Database | Transaction

/** Films older than this give off nothing that a sum counts: the tail of a water-borne one is seven days. */
const forgottenMs = 8 * 24 * 60 * 60_000
/** A start that nobody ended counts its exhaust as running for so long. */
const exhaustTrustedMs = 12 * 60 * 60_000

interface CoatRow { id: string, at: number, roomId: number, piece: string, areaM2: number | null, sizeUnits: number, size: CoatSize, thinnerGrams: number, versionId: number | null, materialId: number | null, material: string | null, solvent: string | null, touchAt: number | null, touchKnown: 0 | 1 | null }

/** What the figures of some material editions say, by edition: VOC, spread rate, and the slow end of touch-dry. */
function readFigures(db: Reader, studioId: number, versionIds: readonly number[]) {
  const ids = [...new Set(versionIds)]
  const figures = ids.length === 0 ? [] : db.select().from(materialFigure).where(scoped(materialFigure, studioId, inArray(materialFigure.versionId, ids), inArray(materialFigure.name, ['VOC', 'spread rate']))).all()
  const rungs = ids.length === 0 ? [] : db.select({ versionId: milestone.versionId, name: milestone.name, high: milestone.high }).from(milestone).where(scoped(milestone, studioId, inArray(milestone.versionId, ids))).orderBy(milestone.versionId, milestone.ordinal).all()
  return (versionId: number | null) => {
    const span = (name: string): Span | null => figures.find(each => each.versionId === versionId && each.name === name) ?? null
    const own = rungs.filter(each => each.versionId === versionId)
    return { voc: span('VOC'), spread: span('spread rate'), touch: (own.find(each => each.name === 'set-to-touch') ?? own[0])?.high ?? null }
  }
}

/** What owners read in data sheets, by material. */
function readSheets(db: Reader, studioId: number): Map<number, SheetFigures> {
  return new Map(db.select().from(vapourLimit).where(scoped(vapourLimit, studioId)).all().map(({ materialId, solventKey, limitMgM3, ceilingMgM3, lelGramsM3, vocGramsPerLitre, exemptGramsPerLitre, spreadM2PerLitre, touchDryMinutes }) =>
    [materialId, { solventKey, limitMgM3, ceilingMgM3, lelGramsM3, vocGramsPerLitre, exemptGramsPerLitre, spreadM2PerLitre, touchDryMinutes }]))
}

function named(db: Reader, studioId: number, rows: readonly CoatRow[], planned: boolean): Map<number, NamedCoat[]> {
  const figuresOf = readFigures(db, studioId, rows.flatMap(row => row.versionId ?? []))
  const sheets = readSheets(db, studioId)
  const rooms = new Map<number, NamedCoat[]>()
  for (const row of rows) {
    const { voc, spread, touch } = figuresOf(row.versionId)
    const unpromised = row.touchKnown === 1 && row.touchAt === null
    const coat: NamedCoat = {
      id: row.id, piece: row.piece, material: row.material ?? '', planned, at: row.at, solvent: row.solvent, voc, spread,
      areaM2: row.areaM2, sizeUnits: row.sizeUnits, size: row.size, thinnerGrams: row.thinnerGrams,
      // A thumb that said dry says nothing of how slowly it got there: then the sheet speaks. A film that is too cold or damp to promise is not dry by the sheet's time: its time is not known.
      sheetTouchMinutes: unpromised ? null : touch, foretoldTouchMinutes: row.touchAt === null ? null : Math.max(0.1, (row.touchAt - row.at) / 60_000),
      sheet: row.materialId === null ? null : sheets.get(row.materialId) ?? null,
    }
    rooms.set(row.roomId, [...rooms.get(row.roomId) ?? [], coat])
  }
  return rooms
}

/**
 * The coats that may still give off vapour, by the rooms they have stood in since they went on: what a coat gave off where it was laid hangs there after
 * it was moved, so that it counts in both rooms.
 */
export function wetCoats(db: Reader, studioId: number, now: number): Map<number, NamedCoat[]> {
  const rows = db.all<CoatRow>(sql`select distinct 'coat ' || coat.id as id, coat.ended_at as at, place.room_id as roomId, piece.name as piece, coalesce(coat.area_m2, piece.area_m2) as areaM2, piece.size_units as sizeUnits,
      coat.size, coat.thinner_grams as thinnerGrams, version.id as versionId, material.id as materialId, material.name as material, version.solvent,
      (select case when reached_at is null then p98_at end from prediction where coat_id = coat.id order by milestone <> 'set-to-touch', ordinal limit 1) as touchAt,
      (select reached_at is null from prediction where coat_id = coat.id order by milestone <> 'set-to-touch', ordinal limit 1) as touchKnown
    from coat indexed by coat_live join piece on piece.id = coat.piece_id join coat_target target on target.coat_id = coat.id join part on part.id = target.part_id
      join stay on stay.part_id in (part.id, part.into_part_id) and (stay.to_at is null or stay.to_at > coat.ended_at) join place on place.id = stay.place_id
      left join material_version version on version.id = coat.material_version_id left join material on material.id = version.material_id
    where coat.studio_id = ${studioId} and coat.settled_at is null and coat.stripped_at is null and coat.ended_at > ${now - forgottenMs} order by coat.ended_at, coat.id`)
  return named(db, studioId, rows, false)
}

/** The coats and glue-ups that the plan in force puts on within the hours given, by the room their piece stands in. */
export function plannedCoats(db: Reader, studioId: number, now: number, hours: number): Map<number, NamedCoat[]> {
  const rows = db.all<CoatRow>(sql`select distinct 'turn ' || turn.id as id, entry.ends_at as at, place.room_id as roomId, piece.name as piece, piece.area_m2 as areaM2, piece.size_units as sizeUnits,
      step.coat_size as size, 0 as thinnerGrams, version.id as versionId, material.id as materialId, material.name as material, version.solvent, null as touchAt, null as touchKnown
    from plan join plan_entry entry on entry.plan_id = plan.id join turn on turn.id = entry.turn_id join piece_step step on step.id = turn.step_id join piece on piece.id = step.piece_id
      join step_target target on target.step_id = step.id join part on part.id = target.part_id join stay on stay.part_id in (part.id, part.into_part_id) and stay.to_at is null join place on place.id = stay.place_id
      join material_version version on version.id = step.material_version_id join material on material.id = version.material_id
    where plan.studio_id = ${studioId} and plan.current = 1 and turn.status = 'waiting' and turn.kind = 'work' and step.kind in ${coatKinds} and piece.gone_at is null
      and entry.ends_at between ${now} and ${now + hours * 3_600_000} order by entry.ends_at, turn.id`)
  return named(db, studioId, rows, true)
}

export type StartRow = typeof vapourStart.$inferSelect

/** The newest start of solvent work in each room that nobody has ended. */
export const openStarts = (db: Reader, studioId: number) => newestStarts(db, studioId, isNull(vapourStart.endedAt))

/** Whether everybody is still told of a start at `now`, ms UTC: it is of late, and nobody has opened its room since. That its one coat is on, which ends it, changes nothing about that. */
export function stillTold(now: number): SQL {
  return sql`${vapourStart.at} > ${now - startToldForMs} and not exists (select 1 from keep_out where keep_out.room_id = ${vapourStart.roomId} and keep_out.opened_at >= ${vapourStart.at})`
}

/** The newest start in each room that goes on or that everybody is told of. */
export const shownStarts = (db: Reader, studioId: number, now: number) => newestStarts(db, studioId, sql`(${vapourStart.endedAt} is null or (${stillTold(now)}))`)

function newestStarts(db: Reader, studioId: number, which: SQL): Map<number, StartRow> {
  const rows = db.select().from(vapourStart).where(scoped(vapourStart, studioId, which)).orderBy(desc(vapourStart.at), desc(vapourStart.id)).all()
  const newest = new Map<number, StartRow>()
  for (const row of rows) if (!newest.has(row.roomId)) newest.set(row.roomId, row)
  return newest
}

/** Whether somebody has said that the exhaust of a room runs. */
export const exhaustRuns = (start: StartRow | undefined, now: number) => start?.exhaust === 'running' && now - start.at < exhaustTrustedMs
