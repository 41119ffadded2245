import { eq, inArray } from 'drizzle-orm'
import { coat, coatTarget, doubt, prediction, touchTest, windowPrediction } from '~~/db/schema'
import type { Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { PredictedCoat } from '~~/server/work/predict'
import { settledFilms } from '~~/server/work/settled'
import { milestoneNames } from '#shared/terms'

type PredictionRow = typeof prediction.$inferInsert
type WindowRow = typeof windowPrediction.$inferInsert

/** SQLite takes 32,766 values in one statement; this stays well under it. */
const rowsAtOnce = 400

/** Writes what changed of the times, the windows, the chills and the settling of some films. */
export function storePredictions(tx: Transaction, studioId: number, predicted: readonly PredictedCoat[], now: number) {
  if (predicted.length === 0) return
  const ids = predicted.map(each => each.coat.id)
  storeMilestones(tx, studioId, ids, predicted)
  storeWindows(tx, studioId, ids, predicted)
  storeChills(tx, studioId, ids, predicted, now)
  settle(tx, studioId, ids, predicted, now)
}

/** The coats whose rows are not what they should be. */
function changedCoats<Row extends { coatId: number }>(had: readonly Row[], wanted: readonly Row[], write: (row: Row) => string): Set<number> {
  const sayings = (rows: readonly Row[]) => {
    const saying = new Map<number, string>()
    for (const row of rows) saying.set(row.coatId, `${saying.get(row.coatId) ?? ''};${write(row)}`)
    return saying
  }
  const before = sayings(had)
  const after = sayings(wanted)
  return new Set([...new Set([...before.keys(), ...after.keys()])].filter(id => before.get(id) !== after.get(id)))
}

function storeMilestones(tx: Transaction, studioId: number, ids: number[], predicted: readonly PredictedCoat[]) {
  const wanted = predicted.flatMap(({ coat: { id }, prediction: { milestones } }) => milestones.flatMap((each, ordinal): PredictionRow[] => {
    const name = milestoneNames.find(one => one === each.name)
    return name ? [{ studioId, coatId: id, ordinal, milestone: name, likelyAt: each.likelyAt, p90At: each.p90At, p98At: each.p98At, reachedAt: each.reachedAt, reason: each.reason }] : []
  }))
  const had = tx.select().from(prediction).where(scoped(prediction, studioId, inArray(prediction.coatId, ids))).orderBy(prediction.coatId, prediction.ordinal).all()
  const changed = changedCoats<PredictionRow>(had, wanted, row => `${row.milestone} ${row.likelyAt} ${row.p90At} ${row.p98At} ${row.reachedAt} ${row.reason}`)
  if (changed.size === 0) return
  tx.delete(prediction).where(scoped(prediction, studioId, inArray(prediction.coatId, [...changed]))).run()
  inParts(wanted.filter(row => changed.has(row.coatId)), rows => tx.insert(prediction).values(rows).run())
}

function storeWindows(tx: Transaction, studioId: number, ids: number[], predicted: readonly PredictedCoat[]) {
  const wanted = predicted.flatMap(({ coat: { id }, prediction: { windows } }) => windows.map((each, ordinal): WindowRow => ({ studioId, coatId: id, ordinal, ...each })))
  const had = tx.select().from(windowPrediction).where(scoped(windowPrediction, studioId, inArray(windowPrediction.coatId, ids))).orderBy(windowPrediction.coatId, windowPrediction.ordinal).all()
  const changed = changedCoats<WindowRow>(had, wanted, row => `${row.opensAt} ${row.shutsAt}`)
  if (changed.size === 0) return
  tx.delete(windowPrediction).where(scoped(windowPrediction, studioId, inArray(windowPrediction.coatId, [...changed]))).run()
  inParts(wanted.filter(row => changed.has(row.coatId)), rows => tx.insert(windowPrediction).values(rows).run())
}

function inParts<Row>(rows: readonly Row[], write: (part: Row[]) => void) {
  for (let from = 0; from < rows.length; from += rowsAtOnce) write(rows.slice(from, from + rowsAtOnce))
}

/** A film that was under its minimum while wet is in doubt from then on, until a maker tests or strips it. */
function storeChills(tx: Transaction, studioId: number, ids: number[], predicted: readonly PredictedCoat[], now: number) {
  const had = tx.select().from(doubt).where(scoped(doubt, studioId, inArray(doubt.coatId, ids), eq(doubt.cause, 'chilled'))).all()
  for (const { coat: row, prediction: { chilledAt } } of predicted) {
    const known = had.find(each => each.coatId === row.id)
    if (chilledAt === null || chilledAt > now) {
      if (known) tx.delete(doubt).where(scoped(doubt, studioId, eq(doubt.id, known.id))).run()
      continue
    }
    const clearedActId = clearingTest(tx, studioId, row.id, chilledAt)
    if (!known) tx.insert(doubt).values({ studioId, coatId: row.id, cause: 'chilled', fromAt: chilledAt, clearedActId }).run()
    else if (known.fromAt !== chilledAt || known.clearedActId !== clearedActId) tx.update(doubt).set({ fromAt: chilledAt, clearedActId }).where(scoped(doubt, studioId, eq(doubt.id, known.id))).run()
  }
}

function clearingTest(tx: Transaction, studioId: number, coatId: number, since: number): number | null {
  const tests = tx.select().from(touchTest).where(scoped(touchTest, studioId, eq(touchTest.coatId, coatId), eq(touchTest.reached, true))).all()
  return tests.find(each => each.at >= since && each.byRole !== 'helper')?.actId ?? null
}

function settle(tx: Transaction, studioId: number, ids: number[], predicted: readonly PredictedCoat[], now: number) {
  const targets = tx.select().from(coatTarget).where(scoped(coatTarget, studioId, inArray(coatTarget.coatId, ids))).all()
  const doubted = tx.select().from(doubt).where(scoped(doubt, studioId, inArray(doubt.coatId, ids))).all().filter(each => each.clearedActId === null).map(each => each.coatId)
  const settled = settledFilms(predicted.filter(each => !doubted.includes(each.coat.id)), targets, now)
  if (settled.length > 0) tx.update(coat).set({ settledAt: now }).where(scoped(coat, studioId, inArray(coat.id, settled))).run()
}
