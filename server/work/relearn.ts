import { and, asc, count, eq, gt, inArray, isNotNull, max } from 'drizzle-orm'
import { benchSpeed, coat, materialVersion, readingImport, studio, tin, touchTest } from '~~/db/schema'
import type { Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { airOf, roomAirs } from '~~/server/work/air'
import { benchState } from '~~/server/work/benches'
import type { KeptTest } from '~~/server/work/benches'
import { caseOf, clocks, readFacts, spansOf } from '~~/server/work/film-cases'
import type { CoatRow } from '~~/server/work/film-cases'
import { editionsInUse } from '~~/server/work/newest-editions'
import { dryingMaterials, preparedMaterials } from '~~/server/work/materials'
import { benchTests, weightOf } from '#shared/drying/bench-tests'

/** Readings and acts of a coat may still be corrected for so long: until then its tests are worked out anew. */
const openMs = 15 * 86_400_000

interface TestRow { test: typeof touchTest.$inferSelect, coat: CoatRow }

/**
 * Learns anew what the tests of some pieces, or of all, teach about their materials, where a test, its coat, a tin or a reset changed, a logger's
 * file came in or was taken back, or a year has gone by. Gives the editions whose teaching changed. A single reading does not: it moves the films, and tests of the
 * last 15 days are worked out again when the lesson next changes; older ones keep their bound until a file tells of their air.
 */
export function relearn(tx: Transaction, studioId: number, pieceIds: readonly number[] | null, now: number): number[] {
  const versions = tx.selectDistinct({ id: coat.materialVersionId }).from(coat).innerJoin(touchTest, eq(touchTest.coatId, coat.id))
    .where(and(scoped(coat, studioId, isNotNull(coat.materialVersionId)), pieceIds ? inArray(coat.pieceId, [...pieceIds]) : undefined)).all()
  // A coat that was taken back has no row any more: with the whole studio its edition is found by what it had taught.
  const taught = tx.selectDistinct({ id: benchSpeed.materialVersionId }).from(benchSpeed).leftJoin(coat, eq(coat.materialVersionId, benchSpeed.materialVersionId))
    .where(and(scoped(benchSpeed, studioId), pieceIds ? inArray(coat.pieceId, [...pieceIds]) : undefined)).all()
  // A test teaches every edition of its material: it is the same tin, read off another sheet.
  const { fellowsOf } = editionsInUse(tx, studioId)
  const ids = [...new Set([...versions, ...taught].flatMap(row => row.id === null ? [] : fellowsOf(row.id)))]
  return ids.filter(id => relearnOne(tx, studioId, id, now))
}

function relearnOne(tx: Transaction, studioId: number, versionId: number, now: number): boolean {
  const known = tx.select().from(benchSpeed).where(scoped(benchSpeed, studioId, eq(benchSpeed.materialVersionId, versionId))).get()
  const rows = tx.select({ test: touchTest, coat }).from(touchTest).innerJoin(coat, eq(coat.id, touchTest.coatId))
    .where(and(scoped(touchTest, studioId, inArray(coat.materialVersionId, editionsInUse(tx, studioId).fellowsOf(versionId))), known?.resetAt ? gt(touchTest.at, known.resetAt) : undefined)).orderBy(asc(touchTest.id)).all()
  const weights = weightsOf(tx, studioId, versionId, rows, now)
  const lines = rows.map((row, i) => `${lineOf(row)} ${weights[i]!.toFixed(2)}`)
  const files = filesOf(tx, studioId)
  const signature = [files, ...lines].join(';')
  const state = benchState(known?.state)
  if ((state?.signature ?? '') === signature) return false
  const tests = boundsOf(tx, studioId, versionId, rows, weights, keptOf(state, files, rows, now), now)
  const values = { state: { signature, tests }, tests: tests.length, actIdUpto: rows.at(-1)?.test.actId ?? null }
  if (known) tx.update(benchSpeed).set(values).where(scoped(benchSpeed, studioId, eq(benchSpeed.id, known.id))).run()
  else tx.insert(benchSpeed).values({ studioId, materialVersionId: versionId, ...values }).run()
  return true
}

const lineOf = ({ test, coat: on }: TestRow) => `${test.id} ${test.milestone} ${test.at} ${test.reached} ${test.byRole} ${on.id} ${on.endedAt} ${on.size} ${on.ground} ${on.forced}`

/** Which files of loggers stand: one that comes late tells of the air that old tests were made in. */
function filesOf(tx: Transaction, studioId: number): string {
  const found = tx.select({ files: count(), last: max(readingImport.id) }).from(readingImport).where(scoped(readingImport, studioId)).get()
  return `files ${found?.files ?? 0} ${found?.last ?? 0}`
}

/** One word about a whole row counts once, shared out among its coats; age and new tins take from it. */
function weightsOf(tx: Transaction, studioId: number, versionId: number, rows: readonly TestRow[], now: number): number[] {
  const tins = tx.select({ openedAt: tin.openedAt }).from(tin).innerJoin(materialVersion, eq(materialVersion.materialId, tin.materialId))
    .where(scoped(tin, studioId, eq(materialVersion.id, versionId))).all().map(row => row.openedAt)
  const fellows = new Map<number, number>()
  for (const { test } of rows) fellows.set(test.actId, (fellows.get(test.actId) ?? 0) + 1)
  return rows.map(({ test }) => weightOf(test.at, now, tins) / fellows.get(test.actId)!)
}

/** Bounds that were worked out before and cannot have changed since: those of coats too old to be corrected, under the same files. */
function keptOf(state: ReturnType<typeof benchState>, files: string, rows: readonly TestRow[], now: number): Map<number, KeptTest> {
  if (!state?.signature.startsWith(`${files};`)) return new Map()
  const lines = new Set(state.signature.split(';').map(line => line.slice(0, line.lastIndexOf(' '))))
  const old = new Set(rows.filter(row => row.test.at < now - openMs && lines.has(lineOf(row))).map(row => row.test.id))
  return new Map(state.tests.filter(test => old.has(test.testId)).map(test => [test.testId, test]))
}

function boundsOf(tx: Transaction, studioId: number, versionId: number, rows: readonly TestRow[], weights: readonly number[], kept: ReadonlyMap<number, KeptTest>, now: number): KeptTest[] {
  const fresh = rows.filter(({ test, coat: on }) => !kept.has(test.id) && !on.forced)
  const coats = [...new Map(fresh.map(row => [row.coat.id, row.coat])).values()]
  const weightById = new Map(rows.map((row, i) => [row.test.id, weights[i]!]))
  const found = new Map<number, KeptTest>()
  const sheet = dryingMaterials(tx, studioId, [versionId]).get(versionId)
  const owner = tx.select().from(studio).where(eq(studio.id, studioId)).get()
  if (sheet && owner && coats.length > 0) {
    const facts = readFacts(tx, studioId, coats)
    const since = coats.reduce((first, each) => Math.min(first, each.endedAt), now)
    const clockOf = clocks(roomAirs(tx, owner, since), airOf(owner), since)
    const material = preparedMaterials.prepare(sheet)
    for (const { test, coat: on } of fresh) {
      const asked = { at: test.at, milestone: test.milestone, reached: test.reached, byRole: test.byRole, weight: 1, witness: test.witnessId !== null }
      const [bound] = benchTests(material, caseOf(on, facts), spansOf(on, facts, clockOf), [asked], on.id)
      if (bound) found.set(test.id, { ...bound, testId: test.id, coatId: on.id })
    }
  }
  return rows.flatMap(({ test }) => {
    const bound = kept.get(test.id) ?? found.get(test.id)
    return bound ? [{ ...bound, weight: weightById.get(test.id)! }] : []
  })
}
