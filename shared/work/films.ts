import type { CoatKind, CoatSize, Ground, Hold } from '#shared/terms'
import { cannotBe, facesOf, finishTurn, insertedStep, latestAt, layered, movesWith, newestCoat, openTurn, settleStatus, stepNamed, waitingTurn } from '#shared/work/draft'
import { moved } from '#shared/work/whereabouts'
import type { Draft } from '#shared/work/draft'
import type { FoldedCoat, Step, Target, Turn, WorkAct } from '#shared/work/types'

/** "Coat is on": the next turn of the named step, or a coat that no schedule asked for. */
export function coatOn(draft: Draft, act: WorkAct) {
  const done = layFilm(draft, act, 'coat')
  if (done) finishTurn(done.step, done.turn, done.coat.endedAt)
}

/** "In the clamps": the parts of the step are joined from now on and what holds them holds them. */
export function glueUpOn(draft: Draft, act: WorkAct) {
  const done = layFilm(draft, act, 'glue-up')
  if (!done) return
  done.coat.hold = asHold(act.body.hold) ?? done.step.hold
  moved(draft, act)
  finishTurn(done.step, done.turn, done.coat.endedAt)
  join(draft, act, done.coat)
}

/** "It is out" of the clamps, the press or from under the weight. */
export function itIsOut(draft: Draft, act: WorkAct) {
  const parts = act.subjects.flatMap(subject => [...movesWith(draft, subject.partId)])
  const held = newestCoat(draft, parts, coat => coat.hold !== null && coat.outAt === null)
  if (!held) return cannotBe(draft, act, 'nothing held')
  const at = latestAt(act)
  if (at < held.endedAt) return cannotBe(draft, act, 'before its start')
  held.outAt = at
  moved(draft, act)
  const step = stepNamed(draft, held.turn?.step)
  const release = step && openTurn(step, 'release')
  if (step && release) finishTurn(step, release, at)
}

/** A film taken off again: its turn waits once more, and nothing of it counts. */
export function stripped(draft: Draft, act: WorkAct) {
  const wanted = act.body.coatActId
  const coat = newestCoat(draft, act.subjects.map(subject => subject.partId), each => wanted === undefined || each.actId === wanted)
  if (!coat) return cannotBe(draft, act, 'no film to test')
  coat.strippedAt = latestAt(act)
  draft.clearings.push({ coatActId: coat.actId, at: coat.strippedAt, actId: act.rootId })
  for (const doubt of draft.doubts) if (doubt.coatActId === coat.actId) doubt.clearedActId = act.rootId
  const step = stepNamed(draft, coat.turn?.step)
  const turn = step?.turns.find(each => each.ordinal === coat.turn?.ordinal)
  if (!step || !turn) return
  Object.assign(turn, { status: 'waiting', doneAt: null } satisfies Partial<Turn>)
  settleStatus(step)
}

/** "Enough": the maker sees that the round is full; turns still waiting are left out. */
export function enough(draft: Draft, act: WorkAct) {
  const step = stepNamed(draft, act.body.step)
  if (!step) return cannotBe(draft, act, 'no such step')
  for (const turn of step.turns) if (turn.kind === 'work' && turn.status === 'waiting') turn.status = 'left out'
  step.untilEnough = false
  settleStatus(step)
}

interface Laid { step: Step, turn: Turn, coat: FoldedCoat }

function layFilm(draft: Draft, act: WorkAct, kind: CoatKind): Laid | null {
  const named = act.body.step !== undefined && act.body.step !== null
  const step = named ? stepNamed(draft, act.body.step) : unplannedStep(draft, act, kind)
  if (!step) {
    cannotBe(draft, act, 'no such step')
    return null
  }
  const turn = openTurn(step, 'work') ?? (step.untilEnough ? anotherTurn(step) : null)
  if (!turn) {
    cannotBe(draft, act, 'nothing left to do')
    return null
  }
  const coat = newCoat(draft, act, kind, step, turn)
  draft.coats.push(coat)
  if (coat.materialVersionId === null) draft.doubts.push({ coatActId: coat.actId, cause: 'unknown', fromAt: coat.endedAt, clearedActId: null })
  if (step.untilEnough && !openTurn(step, 'work')) anotherTurn(step)
  return { step, turn, coat }
}

function newCoat(draft: Draft, act: WorkAct, kind: CoatKind, step: Step, turn: Turn): FoldedCoat {
  const endedAt = latestAt(act)
  const minutes = typeof act.body.minutes === 'number' ? act.body.minutes : step.pieceMin
  return {
    actId: act.rootId,
    turn: { step: step.key, ordinal: turn.ordinal },
    kind,
    materialVersionId: typeof act.body.materialVersionId === 'number' ? act.body.materialVersionId : step.materialVersionId,
    tinId: asNumber(act.body.tinId),
    mixId: asNumber(act.body.mixId),
    beganAt: endedAt - Math.round(minutes * 60_000),
    endedAt,
    size: asSize(act.body.size) ?? step.coatSize,
    ground: asGround(act.body.ground) ?? step.ground,
    forced: act.body.forced === true,
    areaM2: asNumber(act.body.areaM2),
    thinnerGrams: asNumber(act.body.thinnerGrams) ?? 0,
    hold: null,
    outAt: null,
    strippedAt: null,
    targets: layered(draft, targetsOf(step, kind)),
  }
}

/** A glue line lies between parts, so it names them and no face. */
function targetsOf(step: Step, kind: CoatKind): Target[] {
  if (kind === 'coat') return step.targets
  return [...new Set(step.targets.map(target => target.partId))].map(partId => ({ partId, faceId: null }))
}

function unplannedStep(draft: Draft, act: WorkAct, kind: CoatKind): Step {
  const parts = act.subjects.map(subject => subject.partId)
  const faceKeys = Array.isArray(act.body.faces) ? act.body.faces.filter((key): key is string => typeof key === 'string') : undefined
  const last = draft.steps.reduce((highest, each) => Math.max(highest, each.ordinal), 0)
  const step = insertedStep({
    key: `unplanned ${act.rootId}`, ordinal: last + 1, name: typeof act.body.name === 'string' ? act.body.name : '', kind, origin: 'unplanned',
    insertedByActId: act.rootId, pieceMin: typeof act.body.minutes === 'number' ? act.body.minutes : 5, targets: facesOf(draft, parts, faceKeys),
    materialVersionId: asNumber(act.body.materialVersionId), hold: asHold(act.body.hold),
  })
  if (step.hold !== null) step.turns.push(waitingTurn(releaseOrdinal, 5, { kind: 'release' }))
  draft.steps.push(step)
  return step
}

/** Release turns come after every coat and check of a step. */
export const releaseOrdinal = 900

function anotherTurn(step: Step): Turn {
  const work = step.turns.filter(turn => turn.kind === 'work')
  const last = work[work.length - 1]
  const turn = waitingTurn((last?.ordinal ?? 0) + 1, step.pieceMin, { day: (last?.day ?? 0) + 1 })
  step.turns.push(turn)
  return turn
}

function join(draft: Draft, act: WorkAct, coat: FoldedCoat) {
  const [main, ...others] = [...new Set(coat.targets.map(target => target.partId))]
  if (main === undefined) return
  for (const partId of others) {
    if (draft.joins.some(each => each.partId === partId)) continue
    draft.joins.push({ partId, intoPartId: main, actId: act.rootId })
    const stay = draft.stays.find(each => each.partId === partId && each.toAt === null)
    if (stay) stay.toAt = Math.max(stay.fromAt, coat.endedAt)
  }
}

const asNumber = (value: unknown) => (typeof value === 'number' ? value : null)
const asHold = (value: unknown): Hold | null => (value === 'clamps' || value === 'press' || value === 'weight' ? value : null)
const asSize = (value: unknown): CoatSize | null => (value === 'thin' || value === 'normal' || value === 'full' || value === 'flood' ? value : null)
const asGround = (value: unknown): Ground | null => (value === 'porous' || value === 'primed' || value === 'sealed' || value === 'non-absorbent' ? value : null)
