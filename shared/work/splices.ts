import { leavesFilm, usualDust } from '#shared/step-kinds'
import { cannotBe, insertedStep, linksFrom, sandable, stepNamed } from '#shared/work/draft'
import type { Draft } from '#shared/work/draft'
import type { Step, WorkAct } from '#shared/work/types'

/** Minutes that levelling a filled run takes where nobody has said otherwise (planning value). */
const levelMinutes = 10
const fillMinutes = 5

/**
 * A run: the piece leaves its batch for a while. The run is filled with the same material, waits until it can be cut
 * flat, is levelled, and only then does the piece take the step that waited on the coat.
 */
export function droppedOut(draft: Draft, act: WorkAct) {
  const coated = draft.steps.filter(step => leavesFilm(step.kind) && step.turns.some(turn => turn.kind === 'work' && turn.status === 'done'))
  const from = stepNamed(draft, act.body.step) ?? coated.reduce<Step | null>((last, step) => (last === null || step.ordinal > last.ordinal ? step : last), null)
  if (!from) return cannotBe(draft, act, 'no such step')
  const common = { origin: 'branch' as const, insertedByActId: act.rootId, targets: from.targets }
  const fill = insertedStep({ ...common, key: `fill ${act.rootId}`, ordinal: from.ordinal + 0.3, name: 'Drop-fill the run', kind: 'coat', pieceMin: fillMinutes, materialVersionId: from.materialVersionId, coatSize: 'full', ground: 'sealed' })
  const level = insertedStep({ ...common, key: `level ${act.rootId}`, ordinal: from.ordinal + 0.6, name: 'Level the run', kind: 'levelling', pieceMin: levelMinutes, dust: usualDust.levelling })
  draft.steps.push(fill, level)
  for (const link of linksFrom(draft, from.key)) {
    draft.links.push({ from: level.key, to: link.to, milestone: null, risk: 'p90', windowed: false })
    link.windowed = false
  }
  draft.links.push(
    { from: from.key, to: fill.key, milestone: 'dry-to-handle', risk: 'p90', windowed: false },
    { from: fill.key, to: level.key, milestone: sandable, risk: 'p90', windowed: false },
  )
  draft.branch = { fromStep: from.key, actId: act.rootId, rejoinedActId: null }
}

/** Back with the others: what the branch still asked for is left out. */
export function rejoined(draft: Draft, act: WorkAct) {
  if (!draft.branch || draft.branch.rejoinedActId !== null) return cannotBe(draft, act, 'nothing left to do')
  draft.branch.rejoinedActId = act.rootId
  for (const step of draft.steps) {
    if (step.insertedByActId !== draft.branch.actId || step.status === 'done' || step.status === 'resting') continue
    step.status = 'left out'
    for (const turn of step.turns) turn.status = 'left out'
  }
}

/** The window shut with nobody at it: the recovery its material asks for goes in between, and the window no longer binds. */
export function windowMissed(draft: Draft, act: WorkAct) {
  const from = stepNamed(draft, act.body.from)
  const to = stepNamed(draft, act.body.to)
  const link = draft.links.find(each => each.from === from?.key && each.to === to?.key)
  if (!from || !to || (from.key !== to.key && !link)) return cannotBe(draft, act, 'no such step')
  const name = typeof act.body.recovery === 'string' ? act.body.recovery : 'Scuff the surface'
  const minutes = typeof act.body.minutes === 'number' ? act.body.minutes : 10
  const recovery = insertedStep({ key: `recovery ${act.rootId}`, ordinal: to.ordinal - 0.5, name, kind: 'light sanding', origin: 'recovery', insertedByActId: act.rootId, pieceMin: minutes, targets: to.targets, dust: usualDust['light sanding'] })
  draft.steps.push(recovery)
  draft.links.push({ from: recovery.key, to: to.key, milestone: null, risk: 'p90', windowed: false })
  if (from.key !== to.key) draft.links.push({ from: from.key, to: recovery.key, milestone: 'dry-to-sand-lightly', risk: 'p90', windowed: false })
  if (link) link.windowed = false
}
