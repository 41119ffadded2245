import { and, asc, desc, eq, inArray } from 'drizzle-orm'
import { audit, benchSpeed, coat, material, materialFigure, materialVersion, room, studio, tin, touchTest } from '~~/db/schema'
import { hiddenFrom } from '~~/server/services/private-materials'
import type { Membership } from '~~/server/services/sessions'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { roomAirs } from '~~/server/work/air'
import { benchState } from '~~/server/work/benches'
import type { KeptTest } from '~~/server/work/benches'
import { dryingMaterials, preparedMaterials } from '~~/server/work/materials'
import { editionsInUse } from '~~/server/work/newest-editions'
import { predictPieces } from '~~/server/work/predict'
import { airAt } from '#shared/air/room'
import { learnBench } from '#shared/drying/learn'
import type { PreparedRung } from '#shared/drying/material'
import { withLearned } from '#shared/drying/material'
import { potLifeAt } from '#shared/drying/pot-life'
import { trackRoom } from '#shared/drying/tools'
import type { BandWire, LearnedRungWire, LearnedWire } from '#shared/schemas/learned'
import { milestoneNames } from '#shared/terms'

const iso = (at: number | null | undefined) => at === null || at === undefined ? null : new Date(at).toISOString()

/** The newest edition of a material, or null when it is not there or not this studio's. */
function newestVersion(db: Database | Transaction, studioId: number, materialId: number): number | null {
  if (!db.select({ id: material.id }).from(material).where(owned(material, studioId, materialId)).get()) return null
  return db.select({ id: materialVersion.id }).from(materialVersion).where(scoped(materialVersion, studioId, eq(materialVersion.materialId, materialId))).orderBy(desc(materialVersion.no)).get()?.id ?? null
}

/** What this studio's touch tests teach about a material's newest edition. */
export function learnedPart(db: Database, studioId: number, materialId: number, now: number, seesPrivate = true): LearnedWire | Refusal {
  if (hiddenFrom(db, studioId, seesPrivate).has(materialId)) return absent()
  const versionId = newestVersion(db, studioId, materialId)
  const sheet = versionId === null ? undefined : dryingMaterials(db, studioId, [versionId]).get(versionId)
  if (versionId === null || !sheet) return absent()
  const row = db.select().from(benchSpeed).where(scoped(benchSpeed, studioId, eq(benchSpeed.materialVersionId, versionId))).get()
  const tests = benchState(row?.state)?.tests ?? []
  const prepared = preparedMaterials.prepare(sheet)
  const bench = learnBench(prepared.rungs.map(rung => rung.quantiles), tests)
  const learned = bench.kind === 'learned' ? withLearned(prepared, bench) : null
  return {
    tests: tests.length,
    speed: bench.kind === 'learned' ? bench.speed : null,
    rungs: prepared.rungs.map((rung, k) => rungWire(rung, learned?.rungs[k] ?? null, tests.filter(test => test.rung === k))),
    coverage: coverageOf(db, studioId, versionId, row?.resetAt ?? 0),
    resetAt: iso(row?.resetAt),
    newestTinAt: iso(db.select({ openedAt: tin.openedAt }).from(tin).where(scoped(tin, studioId, eq(tin.materialId, materialId))).orderBy(desc(tin.openedAt)).get()?.openedAt),
    potLife: potLifeOf(db, studioId, versionId, sheet.reference.tempC, now),
  }
}

/** How long a mixed quantity lasts in each room that was read within a day: its sheet's pot life at the room's warmth. */
function potLifeOf(db: Database, studioId: number, versionId: number, referenceC: number, now: number): LearnedWire['potLife'] {
  const figure = db.select().from(materialFigure).where(scoped(materialFigure, studioId, eq(materialFigure.versionId, versionId), eq(materialFigure.name, 'pot life'))).get()
  const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()
  if (!figure || !owner) return []
  const airs = roomAirs(db, owner, now)
  return db.select({ id: room.id, name: room.name }).from(room).where(scoped(room, studioId)).orderBy(asc(room.name)).all().flatMap(({ id, name }) => {
    const known = airs.get(id)
    const air = known && airAt(trackRoom(preparedMaterials.tools, known, now), now)
    if (!air || air.assumed || (air.hoursSinceReading ?? Infinity) > 24 || !(air.tempC >= -20 && air.tempC <= 60)) return []
    return [{ room: name, tempC: air.tempC, minutes: potLifeAt(figure.typical, referenceC, air.tempC), sheetMinutes: figure.typical }]
  })
}

function bandOf({ typical, quantiles: { values } }: PreparedRung): BandWire {
  const [low, middle, high] = values.map(row => typical * Math.exp(row[0]!))
  return { low: low!, typical: middle!, high: high! }
}

function rungWire(sheet: PreparedRung, bench: PreparedRung | null, tests: readonly KeptTest[]): LearnedRungWire {
  return {
    name: milestoneNames.find(name => name === sheet.name) ?? 'cured',
    sheet: bandOf(sheet),
    bench: bench && tests.length > 0 ? bandOf(bench) : null,
    tests: tests.map(({ log, reached, weight }) => ({ minutes: sheet.typical * Math.exp(log), reached, weight })),
  }
}

/** Of the tests made at or after the give-it-till that stood when they were made, how many still said "not yet". */
function coverageOf(db: Database, studioId: number, versionId: number, since: number): LearnedWire['coverage'] {
  const rows = db.select({ at: touchTest.at, reached: touchTest.reached, forecast: touchTest.forecast }).from(touchTest).innerJoin(coat, eq(coat.id, touchTest.coatId))
    .where(scoped(touchTest, studioId, inArray(coat.materialVersionId, editionsInUse(db, studioId).fellowsOf(versionId)), eq(coat.forced, false))).orderBy(asc(touchTest.id)).all()
  const late = rows.filter(({ at, forecast }) => at > since && forecast?.p90At !== null && forecast?.p90At !== undefined && at >= forecast.p90At)
  return { early: late.filter(row => !row.reached).length, of: late.length }
}

/** Writes down who changed what a bench has learned, learns anew and foretells every film of the studio. */
function taughtAnew(tx: Transaction, studioId: number, who: Membership, rowId: number, after: Record<string, unknown>, now: number) {
  tx.insert(audit).values({ studioId, tableName: 'bench_speed', rowId, memberId: who.id, at: now, before: null, after }).run()
  predictPieces(tx, studioId, null, now)
}

/**
 * Forgets the tests of a material so far, or counts them again: the times go back to the sheet's, the tests stay on their pieces.
 * @param forget true forgets what was tested until `now` (ms UTC)
 */
export function resetLearned(db: Database, studioId: number, who: Membership, materialId: number, forget: boolean, now: number): LearnedWire | Refusal {
  const done = change(db, studioId, 'library', (tx): { ok: true } | Refusal => {
    const versionId = newestVersion(tx, studioId, materialId)
    if (versionId === null) return absent()
    const resetAt = forget ? now : null
    const known = tx.select({ id: benchSpeed.id }).from(benchSpeed).where(and(scoped(benchSpeed, studioId, eq(benchSpeed.materialVersionId, versionId)))).get()
    const id = known?.id ?? tx.insert(benchSpeed).values({ studioId, materialVersionId: versionId, state: { signature: '', tests: [] }, tests: 0 }).returning({ id: benchSpeed.id }).get().id
    tx.update(benchSpeed).set({ resetAt }).where(owned(benchSpeed, studioId, id)).run()
    taughtAnew(tx, studioId, who, id, { resetAt }, now)
    return { ok: true }
  })
  return done.ok ? learnedPart(db, studioId, materialId, now) : done
}

/** A new tin is open: tests of the ones before count half from now on. */
export function openTin(db: Database, studioId: number, who: Membership, materialId: number, now: number): LearnedWire | Refusal {
  const done = change(db, studioId, 'library', (tx): { ok: true } | Refusal => {
    if (newestVersion(tx, studioId, materialId) === null) return absent()
    const id = tx.insert(tin).values({ studioId, materialId, openedAt: now }).returning({ id: tin.id }).get().id
    taughtAnew(tx, studioId, who, id, { tinOpenedAt: now }, now)
    return { ok: true }
  })
  return done.ok ? learnedPart(db, studioId, materialId, now) : done
}
