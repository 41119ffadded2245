import type { PlanFacts } from '~~/server/planning/facts'
import { newestMaterials, newestVersion } from '~~/server/services/batches'
import type { Database } from '~~/server/utils/database'
import { readEdition } from '~~/server/work/schedule'
import { seedOf } from '~~/server/work/seed'
import type { SeedPart, Step } from '#shared/work/types'
import { wholePart } from '#shared/words/batch'

/** Numbers of rows that are in no database: above any real one, so that a batch to come stands behind the others. */
const unreal = 1_000_000_000
/** Rows of one piece at most. */
const room = 10_000

/** A batch that has not been started. Instants in ms UTC; `startsAt` is when its first step begins. */
export interface BatchToCome { scheduleId: number, pieces: number, sizeUnits: number, placeId: number, startsAt: number, dueAt: number | null }

/** The number that the batch to come has among the facts. */
export const batchToCome = unreal

/**
 * The facts of a studio as if a batch had been started: nothing is written.
 * @param pinnedFrom ms UTC, when its first step is to begin for certain, one piece after another; null: when it suits the plan
 * @returns null when there is no such schedule
 */
export function factsWithBatch(db: Database, facts: PlanFacts, given: BatchToCome, pinnedFrom: number | null): PlanFacts | null {
  const studioId = facts.owner.id
  const version = newestVersion(db, studioId, given.scheduleId)
  if (version === null) return null
  const edition = readEdition(db, studioId, version)
  const materials = newestMaterials(db, studioId, edition)
  const roomId = facts.places.find(place => place.id === given.placeId)?.roomId ?? 0
  const added: PlanFacts = { ...facts, pieces: [...facts.pieces], steps: [...facts.steps], turns: [...facts.turns], links: [...facts.links], targets: [...facts.targets], stays: [...facts.stays], pins: [...facts.pins] }
  const keys = edition.parts.length > 0 ? edition.parts : [{ ...wholePart, faces: [] }]
  for (let i = 0; i < given.pieces; i++) {
    const base = unreal + (i + 1) * room
    const parts = keys.map((part, k): SeedPart => ({ id: base + k, key: part.key, name: part.name, faces: part.faces.map((face, n) => ({ id: base + 100 + k * 20 + n, key: face.key })) }))
    const { steps, links } = seedOf(parts, edition, materials)
    added.pieces.push({ id: base, name: '', batchId: batchToCome, batch: '', sizeUnits: given.sizeUnits, startsAt: given.startsAt, dueAt: given.dueAt, weight: 1 })
    added.stays.push(...parts.map(part => ({ partId: part.id, pieceId: base, placeId: given.placeId, roomId })))
    const ids = new Map(steps.map((step, k) => [step.key, base + 200 + k]))
    for (const step of steps) addStep(added, step, studioId, base, ids.get(step.key) ?? 0)
    added.links.push(...links.map(link => ({ studioId, fromStepId: ids.get(link.from) ?? 0, toStepId: ids.get(link.to) ?? 0, milestone: link.milestone, risk: link.risk, windowed: link.windowed })))
  }
  if (pinnedFrom !== null) pinFirst(added, pinnedFrom)
  return added
}

function addStep(facts: PlanFacts, given: Step, studioId: number, pieceId: number, id: number) {
  const { targets, turns, ...step } = given
  facts.steps.push({ ...step, id, studioId, pieceId })
  facts.turns.push(...turns.map((turn, k) => ({ ...turn, id: id * 100 + k, studioId, stepId: id })))
  facts.targets.push(...targets.map(target => ({ stepId: id, partId: target.partId })))
}

const minute = 60_000

/** The first step of every piece, in a row: set up once, then one piece after another. */
function pinFirst(facts: PlanFacts, fromAt: number) {
  const own = facts.pieces.filter(piece => piece.batchId === batchToCome)
  let at: number | null = null
  for (const piece of own) {
    const first = facts.steps.find(step => step.pieceId === piece.id && !facts.links.some(link => link.toStepId === step.id))
    const turn = facts.turns.find(each => each.stepId === first?.id)
    if (!first || !turn) continue
    at ??= fromAt + first.setupMin * minute
    facts.pins.push({ id: unreal + facts.pins.length, studioId: facts.owner.id, turnId: turn.id, startsAt: at, memberId: null, actId: null, madeAt: null, madeByMemberId: null })
    at += Math.max(1, turn.minutes) * minute
  }
}
