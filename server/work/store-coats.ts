import { eq, inArray } from 'drizzle-orm'
import { coat, coatTarget, doubt, prediction, touchTest } from '~~/db/schema'
import type { Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { difference, holds } from '~~/server/work/difference'
import type { StoredRows } from '~~/server/work/stored-rows'
import type { TurnIds } from '~~/server/work/store-steps'
import type { Folded, FoldedTest } from '#shared/work/types'

/** Writes coats with what they lie on, their tests and the doubts that acts raised. A coat is known by the act that first told of it. */
export function storeCoats(tx: Transaction, studioId: number, pieceId: number, folded: Folded, turnIds: TurnIds, stored: StoredRows) {
  const rows = stored.coats
  const wanted = folded.coats.map(({ targets: _targets, turn, ...each }) => ({ pieceId, turnId: turn ? turnIds.of(turn.step, turn.ordinal) : null, ...each }))
  const change = difference(rows, wanted, row => String(row.actId), each => String(each.actId), holds)
  if (change.removed.length > 0) tx.delete(coat).where(scoped(coat, studioId, inArray(coat.id, change.removed.map(row => row.id)))).run()
  // A changed film has to be reckoned again, so it is no longer settled.
  for (const each of change.changed) tx.update(coat).set({ ...each.wanted, settledAt: null }).where(scoped(coat, studioId, eq(coat.id, each.row.id))).run()
  const ids = new Map(rows.map(row => [row.actId, row.id]))
  for (const each of change.added) ids.set(each.actId, tx.insert(coat).values({ studioId, ...each }).returning({ id: coat.id }).get().id)
  const kept = new Set(folded.coats.flatMap(each => ids.get(each.actId) ?? []))
  // What hung on a coat that is taken away has gone with it.
  const removed = new Set(change.removed.map(row => row.id))
  const left = <Row extends { coatId: number }>(hanging: Row[]) => hanging.filter(row => !removed.has(row.coatId))
  storeTargets(tx, studioId, stored.coatTargets.filter(row => kept.has(row.coatId)), folded, ids)
  storeTests(tx, studioId, left(stored.tests), folded.tests, ids)
  storeDoubts(tx, studioId, left(stored.doubts), folded, ids)
}

function storeTargets(tx: Transaction, studioId: number, rows: StoredRows['coatTargets'], folded: Folded, ids: ReadonlyMap<number, number>) {
  const wanted = folded.coats.flatMap(each => each.targets.map(target => ({ studioId, coatId: ids.get(each.actId) ?? 0, ...target })))
  const keyOf = (target: { coatId: number, partId: number, faceId: number | null, layer: number }) => `${target.coatId} ${target.partId} ${target.faceId} ${target.layer}`
  const change = difference(rows, wanted, keyOf, keyOf, () => true)
  // All that goes goes first: two coats may not lie in one layer of a face, not even for a moment.
  if (change.removed.length > 0) tx.delete(coatTarget).where(scoped(coatTarget, studioId, inArray(coatTarget.id, change.removed.map(row => row.id)))).run()
  if (change.added.length > 0) tx.insert(coatTarget).values(change.added).run()
}

function storeTests(tx: Transaction, studioId: number, rows: StoredRows['tests'], tests: readonly FoldedTest[], ids: ReadonlyMap<number, number>) {
  const wanted = tests.flatMap(({ coatActId, ...test }) => {
    const coatId = ids.get(coatActId)
    return coatId === undefined ? [] : [{ studioId, coatId, ...test }]
  })
  const keyOf = (test: { actId: number, coatId: number }) => `${test.actId} ${test.coatId}`
  const change = difference(rows, wanted, keyOf, keyOf, holds)
  if (change.removed.length > 0) tx.delete(touchTest).where(scoped(touchTest, studioId, inArray(touchTest.id, change.removed.map(row => row.id)))).run()
  for (const each of change.changed) tx.update(touchTest).set(each.wanted).where(scoped(touchTest, studioId, eq(touchTest.id, each.row.id))).run()
  for (const test of change.added) tx.insert(touchTest).values({ ...test, forecast: forecastOf(tx, studioId, test.coatId, test.milestone) }).run()
  const touched = [...change.added, ...change.changed.map(each => each.wanted)].map(test => test.coatId)
  if (touched.length > 0) tx.update(coat).set({ settledAt: null }).where(scoped(coat, studioId, inArray(coat.id, touched))).run()
}

/** What was foretold at the moment of the test, frozen with it: the model is measured by this and by nothing later. */
function forecastOf(tx: Transaction, studioId: number, coatId: number, milestone: FoldedTest['milestone']) {
  return tx.select({ likelyAt: prediction.likelyAt, p90At: prediction.p90At, p98At: prediction.p98At }).from(prediction)
    .where(scoped(prediction, studioId, eq(prediction.coatId, coatId), eq(prediction.milestone, milestone))).get() ?? null
}

function storeDoubts(tx: Transaction, studioId: number, rows: StoredRows['doubts'], folded: Folded, ids: ReadonlyMap<number, number>) {
  const newest = new Map(folded.doubts.map(each => [`${each.coatActId} ${each.cause}`, each]))
  const wanted = [...newest.values()].flatMap(({ coatActId, ...each }) => {
    const coatId = ids.get(coatActId)
    return coatId === undefined ? [] : [{ studioId, coatId, ...each }]
  })
  const keyOf = (each: { coatId: number, cause: string }) => `${each.coatId} ${each.cause}`
  const change = difference(rows, wanted, keyOf, keyOf, holds)
  if (change.removed.length > 0) tx.delete(doubt).where(scoped(doubt, studioId, inArray(doubt.id, change.removed.map(row => row.id)))).run()
  for (const each of change.changed) tx.update(doubt).set(each.wanted).where(scoped(doubt, studioId, eq(doubt.id, each.row.id))).run()
  if (change.added.length > 0) tx.insert(doubt).values(change.added).run()
}
