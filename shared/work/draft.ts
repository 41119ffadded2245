import { leavesFilm } from '#shared/step-kinds'
import type { MilestoneName, TurnKind } from '#shared/terms'
import type { Folded, FoldedCoat, ProblemCode, Seed, SeedPart, Step, Target, Turn, WorkAct } from '#shared/work/types'

/** The piece while its acts are being told, one after the other. Lives for one fold and is never shared. */
export interface Draft extends Folded { parts: readonly SeedPart[] }

/** A fresh draft of a piece: its schedule copied, nothing done. */
export function startDraft(seed: Seed): Draft {
  return {
    parts: seed.parts,
    steps: seed.steps.map(step => ({ ...step, targets: [...step.targets], turns: step.turns.map(turn => ({ ...turn })) })),
    links: seed.links.map(link => ({ ...link })),
    coats: [], stays: [], tests: [], doubts: [], clearings: [], airNotes: [], joins: [], branch: null, goneAt: null, goneHow: null, batch: null, problems: [],
  }
}

/** Notes that an act cannot be true as told; it is kept and listed, never dropped in silence. */
export function cannotBe(draft: Draft, act: WorkAct, why: ProblemCode) {
  draft.problems.push({ actId: act.rootId, why })
}

/** The step an act names by key, or null. */
export function stepNamed(draft: Draft, key: unknown): Step | null {
  return draft.steps.find(step => step.key === key) ?? null
}

/** The turn an act of this kind speaks of: the one being done, else the first that waits. */
export function openTurn(step: Step, kind: TurnKind): Turn | null {
  const turns = step.turns.filter(turn => turn.kind === kind)
  return turns.find(turn => turn.status === 'doing') ?? turns.find(turn => turn.status === 'waiting') ?? null
}

/** Marks a turn done and moves its step on: open turns left means it rests between them. */
export function finishTurn(step: Step, turn: Turn, at: number) {
  turn.status = 'done'
  turn.doneAt = at
  turn.doingMemberId = null
  if (turn.kind === 'work') settleStatus(step)
}

/** Reads a step's status from its turns of work. A coat or a glue-up rests; bench work is done when it is done. */
export function settleStatus(step: Step) {
  if (step.status === 'set aside' || step.status === 'left out') return
  const work = step.turns.filter(turn => turn.kind === 'work')
  const done = work.filter(turn => turn.status === 'done')
  if (work.some(turn => turn.status === 'doing')) step.status = 'doing'
  else if (done.length === 0) step.status = 'waiting'
  else if (leavesFilm(step.kind) || work.some(turn => turn.status === 'waiting')) step.status = 'resting'
  else step.status = 'done'
}

/** The faces under a set of parts, or the part itself where it has none. */
export function facesOf(draft: Draft, partIds: readonly number[], faceKeys?: readonly string[]): Target[] {
  return draft.parts.filter(part => partIds.includes(part.id)).flatMap((part): Target[] => {
    const faces = part.faces.filter(face => !faceKeys || faceKeys.includes(face.key))
    return faces.length > 0 ? faces.map(face => ({ partId: part.id, faceId: face.id })) : [{ partId: part.id, faceId: null }]
  })
}

/** Gives each target its layer: one above the highest coat still on that face. */
export function layered(draft: Draft, targets: readonly Target[]) {
  return targets.map(target => ({ ...target, layer: 1 + highestLayer(draft, target) }))
}

function highestLayer(draft: Draft, target: Target): number {
  const below = draft.coats.flatMap(coat => coat.targets.filter(each => each.partId === target.partId && each.faceId === target.faceId))
  return below.reduce((highest, each) => Math.max(highest, each.layer), 0)
}

/** The part, and every part that has been joined to it, directly or through another. */
export function movesWith(draft: Pick<Draft, 'joins'>, partId: number): Set<number> {
  const together = new Set([partId])
  for (let grew = true; grew;) {
    grew = false
    for (const join of draft.joins) {
      if (together.has(join.partId) === together.has(join.intoPartId)) continue
      together.add(join.partId).add(join.intoPartId)
      grew = true
    }
  }
  return together
}

/** The newest coat on any of these parts that is neither stripped nor, if asked, out of its hold. */
export function newestCoat(draft: Draft, partIds: Iterable<number>, wanted: (coat: FoldedCoat) => boolean = () => true): FoldedCoat | null {
  const parts = new Set(partIds)
  const on = draft.coats.filter(coat => coat.strippedAt === null && wanted(coat) && coat.targets.some(target => parts.has(target.partId)))
  return on.reduce<FoldedCoat | null>((newest, coat) => (newest === null || coat.endedAt >= newest.endedAt ? coat : newest), null)
}

/** A turn that waits. */
export function waitingTurn(ordinal: number, minutes: number, more: Partial<Turn> = {}): Turn {
  return { ordinal, day: 0, kind: 'work', name: '', checkAfterMin: null, minutes, status: 'waiting', doneAt: null, beganAt: null, doingMemberId: null, notOnAt: null, ...more }
}

/** A step that no schedule asked for, with everything at rest. */
export function insertedStep(given: Pick<Step, 'key' | 'ordinal' | 'name' | 'kind' | 'origin' | 'insertedByActId' | 'pieceMin' | 'targets'> & Partial<Step>): Step {
  return {
    scheduleStepId: null, materialVersionId: null, status: 'waiting', asideReason: null, coatSize: 'normal', ground: 'primed', hold: null, placeKind: null,
    untilEnough: false, setupMin: 0, cleanMin: 0, releaseMin: 0, hands: 1, dust: 'none', mayRunOver: false, atFront: false, turns: [waitingTurn(1, given.pieceMin)], ...given,
  }
}

/** The links that leave a step. */
export const linksFrom = (draft: Draft, key: string) => draft.links.filter(link => link.from === key)

/** Milestone a film must have come to before its surface may be cut back. */
export const sandable: MilestoneName = 'dry-to-sand-flat'

/** The instant of an act on this piece: the latest of its parts. */
export const latestAt = (act: WorkAct) => act.subjects.reduce((at, subject) => Math.max(at, subject.doneAt), -Infinity)
