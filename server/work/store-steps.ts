import { eq, inArray } from 'drizzle-orm'
import { pieceStep, stepLink, stepTarget, turn } from '~~/db/schema'
import type { Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { difference, holds } from '~~/server/work/difference'
import type { StoredRows } from '~~/server/work/stored-rows'
import type { Folded, Step } from '#shared/work/types'

/** The numbers of a piece's turns by step key and ordinal. `prune` takes away rows that nothing stands on any more. */
export interface TurnIds { of(step: string, ordinal: number): number | null, prune(): void }

/** Writes steps, their targets, turns and links. Removal waits for `prune`, after the coats have let go of their turns. */
export function storeSteps(tx: Transaction, studioId: number, pieceId: number, folded: Folded, stored: StoredRows): TurnIds {
  const rows = stored.steps
  const columns = ({ targets: _targets, turns: _turns, ...step }: Step) => step
  const change = difference(rows, folded.steps, row => row.key, step => step.key, (row, step) => holds(row, columns(step)))
  const ids = new Map(rows.map(row => [row.key, row.id]))
  for (const { row, wanted } of change.changed) tx.update(pieceStep).set(columns(wanted)).where(scoped(pieceStep, studioId, eq(pieceStep.id, row.id))).run()
  for (const step of change.added) {
    const stepId = tx.insert(pieceStep).values({ studioId, pieceId, ...columns(step) }).returning({ id: pieceStep.id }).get().id
    ids.set(step.key, stepId)
  }
  const idOf = (key: string) => {
    const found = ids.get(key)
    if (found === undefined) throw new Error(`The fold of piece ${pieceId} names the step ${key}, which it does not have.`)
    return found
  }
  storeTargets(tx, studioId, stored.targets, folded, idOf)
  storeLinks(tx, studioId, stored.links, folded, idOf)
  const turns = storeTurns(tx, studioId, stored.turns, folded, idOf)
  return {
    of: (step, ordinal) => turns.ids.get(`${idOf(step)} ${ordinal}`) ?? null,
    prune: () => {
      if (turns.removed.length > 0) tx.delete(turn).where(scoped(turn, studioId, inArray(turn.id, turns.removed))).run()
      if (change.removed.length > 0) tx.delete(pieceStep).where(scoped(pieceStep, studioId, inArray(pieceStep.id, change.removed.map(row => row.id)))).run()
    },
  }
}

/** A correction may put an unplanned coat on other faces, so the targets of a step that stays can change too. */
function storeTargets(tx: Transaction, studioId: number, rows: StoredRows['targets'], folded: Folded, idOf: (key: string) => number) {
  const wanted = folded.steps.flatMap(step => step.targets.map(target => ({ studioId, stepId: idOf(step.key), ...target })))
  const keyOf = (target: { stepId: number, partId: number, faceId: number | null }) => `${target.stepId} ${target.partId} ${target.faceId}`
  const kept = new Set(folded.steps.map(step => idOf(step.key)))
  const change = difference(rows.filter(row => kept.has(row.stepId)), wanted, keyOf, keyOf, holds)
  if (change.removed.length > 0) tx.delete(stepTarget).where(scoped(stepTarget, studioId, inArray(stepTarget.id, change.removed.map(row => row.id)))).run()
  if (change.added.length > 0) tx.insert(stepTarget).values(change.added).run()
}

function storeLinks(tx: Transaction, studioId: number, rows: StoredRows['links'], folded: Folded, idOf: (key: string) => number) {
  const wanted = folded.links.map(({ from, to, ...link }) => ({ studioId, fromStepId: idOf(from), toStepId: idOf(to), ...link }))
  const keyOf = (link: { fromStepId: number, toStepId: number }) => `${link.fromStepId} ${link.toStepId}`
  const change = difference(rows, wanted, keyOf, keyOf, holds)
  const gone = [...change.removed, ...change.changed.map(each => each.row)]
  for (const row of gone) tx.delete(stepLink).where(scoped(stepLink, studioId, eq(stepLink.fromStepId, row.fromStepId), eq(stepLink.toStepId, row.toStepId))).run()
  const added = [...change.added, ...change.changed.map(each => each.wanted)]
  if (added.length > 0) tx.insert(stepLink).values(added).run()
}

function storeTurns(tx: Transaction, studioId: number, rows: StoredRows['turns'], folded: Folded, idOf: (key: string) => number) {
  const wanted = folded.steps.flatMap(step => step.turns.map(each => ({ studioId, stepId: idOf(step.key), ...each })))
  const keyOf = (each: { stepId: number, ordinal: number }) => `${each.stepId} ${each.ordinal}`
  const change = difference(rows, wanted, keyOf, keyOf, holds)
  const ids = new Map(rows.map(row => [keyOf(row), row.id]))
  for (const each of change.changed) tx.update(turn).set(each.wanted).where(scoped(turn, studioId, eq(turn.id, each.row.id))).run()
  if (change.added.length > 0) {
    const added = tx.insert(turn).values(change.added).returning({ id: turn.id, stepId: turn.stepId, ordinal: turn.ordinal }).all()
    for (const row of added) ids.set(keyOf(row), row.id)
  }
  return { ids, removed: change.removed.map(row => row.id) }
}
