import type { ScheduleEdition } from '~~/server/work/schedule'
import { waitingTurn } from '#shared/work/draft'
import { releaseOrdinal } from '#shared/work/films'
import type { Seed, SeedPart, Step, Target, Turn } from '#shared/work/types'

/** Checks inside a rest come after the coats of a step and before its release. */
const checkOrdinal = 500

/**
 * What a piece starts from: its own parts with the steps of its edition laid over them.
 * @param materials the edition of the material that each step was started with, by step key
 */
export function seedOf(parts: readonly SeedPart[], edition: ScheduleEdition | null, materials: Readonly<Record<string, number>>): Seed {
  if (!edition) return { parts, steps: [], links: [] }
  return { parts, steps: edition.steps.map(step => seedStep(step, parts, materials[step.key] ?? null)), links: edition.links.map(({ recovery: _recovery, ...link }) => link) }
}

function seedStep(step: ScheduleEdition['steps'][number], parts: readonly SeedPart[], materialVersionId: number | null): Step {
  return {
    key: step.key, ordinal: step.ordinal, name: step.name, kind: step.kind, origin: 'schedule', scheduleStepId: step.id, insertedByActId: null,
    materialVersionId, status: 'waiting', asideReason: null, coatSize: step.coatSize, ground: step.ground, hold: step.hold, placeKind: step.placeKind,
    untilEnough: step.untilEnough, setupMin: step.setupMin, pieceMin: step.pieceMin, cleanMin: step.cleanMin, releaseMin: step.releaseMin,
    hands: step.hands, dust: step.dust, mayRunOver: step.mayRunOver, atFront: false,
    targets: step.targets.flatMap(target => targetsOn(parts, target)),
    turns: turnsOf(step),
  }
}

function targetsOn(parts: readonly SeedPart[], target: { partKey: string, faceKey: string | null }): Target[] {
  const part = parts.find(each => each.key === target.partKey)
  if (!part) return []
  if (target.faceKey === null) return part.faces.length > 0 ? part.faces.map(face => ({ partId: part.id, faceId: face.id })) : [{ partId: part.id, faceId: null }]
  const face = part.faces.find(each => each.key === target.faceKey)
  return face ? [{ partId: part.id, faceId: face.id }] : []
}

function turnsOf(step: ScheduleEdition['steps'][number]): Turn[] {
  const work = Array.from({ length: step.perDay * step.days }, (_, index) => waitingTurn(index + 1, step.pieceMin, { day: Math.floor(index / step.perDay) }))
  const checks = step.checks.map(check => waitingTurn(checkOrdinal + check.ordinal, check.minutes, { kind: 'check', name: check.name, checkAfterMin: check.afterMin }))
  const release = step.hold === null ? [] : [waitingTurn(releaseOrdinal, step.releaseMin, { kind: 'release' })]
  return [...work, ...checks, ...release]
}
