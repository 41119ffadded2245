import type { ActKind } from '#shared/terms'
import { leavesFilm } from '#shared/step-kinds'
import { coatOn, enough, glueUpOn, itIsOut, stripped } from '#shared/work/films'
import { droppedOut, rejoined, windowMissed } from '#shared/work/splices'
import { began, cancelled, checkDone, leftOut, notOnYet, resumed, setAside, workDone } from '#shared/work/steps'
import { air, back, gone, moved, notThere, regrouped, seen, started, touchTest } from '#shared/work/whereabouts'
import { latestAt, startDraft } from '#shared/work/draft'
import type { Draft } from '#shared/work/draft'
import type { Folded, Seed, Step, WorkAct } from '#shared/work/types'

type Telling = (draft: Draft, act: WorkAct) => void
const nothing: Telling = () => {}

/** What each kind of act does to a piece. Acts about a room or an answer change nothing here. */
const tellings: Record<ActKind, Telling> = {
  'batch started': started,
  'began': began,
  'coat on': coatOn,
  'glue-up on': glueUpOn,
  'not on yet': notOnYet,
  'it is out': itIsOut,
  'work done': workDone,
  'turned over': workDone,
  'check done': checkDone,
  'touch test': touchTest,
  'stripped': stripped,
  'moved': moved,
  'not there': notThere,
  'seen': seen,
  'set aside': setAside,
  'resumed': resumed,
  'left out': leftOut,
  'dropped out': droppedOut,
  'rejoined': rejoined,
  'enough': enough,
  'window missed': windowMissed,
  'air': air,
  'intake answered': nothing,
  'room opened': nothing,
  'rags answered': nothing,
  'gone': gone,
  'back': back,
  'regrouped': regrouped,
  'cancelled': cancelled,
}

/**
 * The piece as its acts make it: a pure replay, so that a correction of any act for days back recomputes all that
 * follows. `acts` are those in force (the last of each chain of corrections, voided ones left out), in any order.
 */
export function fold(seed: Seed, acts: readonly WorkAct[]): Folded {
  const draft = startDraft(seed)
  for (const act of inOrder(acts)) tellings[act.kind](draft, act)
  closeRests(draft)
  findFront(draft)
  const { parts: _, ...folded } = draft
  return folded
}

/** By when it was done; two at one instant by the order in which they were first told. The start is first, though it may be planned for tomorrow. */
function inOrder(acts: readonly WorkAct[]): WorkAct[] {
  const rank = (act: WorkAct) => (act.kind === 'batch started' ? 0 : 1)
  return [...acts].filter(act => act.subjects.length > 0).sort((a, b) => rank(a) - rank(b) || latestAt(a) - latestAt(b) || a.rootId - b.rootId)
}

/** A film's step is done once what waited for it has begun: nobody says "it has dried". */
function closeRests(draft: Draft) {
  const begun = new Set(draft.steps.filter(step => ['doing', 'resting', 'done'].includes(step.status)).map(step => step.key))
  for (const step of draft.steps) {
    if (step.status !== 'resting' || !leavesFilm(step.kind) || step.turns.some(turn => turn.kind === 'work' && turn.status === 'waiting')) continue
    const held = draft.coats.some(coat => coat.turn?.step === step.key && coat.hold !== null && coat.outAt === null && coat.strippedAt === null)
    if (held) continue
    const followed = draft.links.some(link => link.from === step.key && begun.has(link.to))
    if (followed || (step.hold !== null && draft.coats.some(coat => coat.turn?.step === step.key && coat.outAt !== null))) step.status = 'done'
  }
}

/** Only drying is left of it. A round with coats to come still stands before what follows. */
function isBehind(step: Step): boolean {
  if (step.status === 'resting') return !step.turns.some(turn => turn.kind === 'work' && turn.status === 'waiting')
  return step.status === 'done' || step.status === 'left out'
}

/** Marks the steps whose turn it is: what comes before them is done, left out or only drying. */
function findFront(draft: Draft) {
  const behind = new Set(draft.steps.filter(isBehind).map(step => step.key))
  for (const step of draft.steps) {
    const left = step.turns.some(turn => turn.status === 'waiting' || turn.status === 'doing')
    const reached = step.status !== 'waiting' || draft.links.every(link => link.to !== step.key || behind.has(link.from))
    step.atFront = draft.goneAt === null && left && reached && step.status !== 'left out' && step.status !== 'done'
  }
}
