import { cannotBe, finishTurn, latestAt, openTurn, settleStatus, stepNamed } from '#shared/work/draft'
import type { Draft } from '#shared/work/draft'
import type { Step, WorkAct } from '#shared/work/types'

/** Somebody is at it: hands off until they say what came of it. */
export function began(draft: Draft, act: WorkAct) {
  const step = stepNamed(draft, act.body.step)
  const turn = step && openTurn(step, 'work')
  if (!step || !turn) return cannotBe(draft, act, step ? 'nothing left to do' : 'no such step')
  turn.status = 'doing'
  turn.doingMemberId = act.memberId
  turn.beganAt = latestAt(act)
  step.status = 'doing'
}

/** Sanded, fitted, pierced, sewn, turned over: bench work that leaves nothing wet. */
export function workDone(draft: Draft, act: WorkAct) {
  const step = stepNamed(draft, act.body.step)
  const turn = step && openTurn(step, 'work')
  if (!step || !turn) return cannotBe(draft, act, step ? 'nothing left to do' : 'no such step')
  finishTurn(step, turn, latestAt(act))
}

/** A look inside a rest has been taken: blotters changed, bowl turned. */
export function checkDone(draft: Draft, act: WorkAct) {
  const step = stepNamed(draft, act.body.step)
  const turn = step?.turns.find(each => each.kind === 'check' && (act.body.ordinal === undefined ? each.status === 'waiting' : each.ordinal === act.body.ordinal))
  if (!step || !turn) return cannotBe(draft, act, step ? 'nothing left to do' : 'no such step')
  finishTurn(step, turn, latestAt(act))
}

/** Stopped by somebody, who says why. */
export function setAside(draft: Draft, act: WorkAct) {
  const step = stepNamed(draft, act.body.step)
  if (!step) return cannotBe(draft, act, 'no such step')
  step.status = 'set aside'
  step.asideReason = typeof act.body.reason === 'string' && act.body.reason !== '' ? act.body.reason : 'no reason given'
  for (const turn of step.turns) if (turn.status === 'doing') Object.assign(turn, { status: 'waiting', doingMemberId: null })
}

/** Taken up again where it stopped. */
export function resumed(draft: Draft, act: WorkAct) {
  const step = stepNamed(draft, act.body.step)
  if (!step) return cannotBe(draft, act, 'no such step')
  step.status = 'waiting'
  step.asideReason = null
  settleStatus(step)
}

/** Not needed on this piece; what waited for it waits for what it waited for. */
export function leftOut(draft: Draft, act: WorkAct) {
  const step = stepNamed(draft, act.body.step)
  if (!step) return cannotBe(draft, act, 'no such step')
  step.status = 'left out'
  step.asideReason = null
  for (const turn of step.turns) if (turn.status !== 'done') turn.status = 'left out'
  for (const before of draft.links.filter(link => link.to === step.key)) {
    for (const after of draft.links.filter(link => link.from === step.key)) {
      if (draft.links.some(link => link.from === before.from && link.to === after.to)) continue
      draft.links.push({ ...before, to: after.to })
    }
  }
}

/** The batch is not finished: nothing more is begun on it. What dries goes on drying, and what is held is still taken out. */
export function cancelled(draft: Draft) {
  for (const step of draft.steps) {
    if (step.status === 'done' || step.status === 'left out') continue
    const begun = step.turns.some(turn => turn.kind === 'work' && turn.status === 'done')
    for (const turn of step.turns) if (turn.status !== 'done' && (turn.kind === 'work' || !begun)) Object.assign(turn, { status: 'left out', doingMemberId: null })
    Object.assign(step, { untilEnough: false, asideReason: null, status: begun ? 'waiting' : 'left out' } satisfies Partial<Step>)
    if (begun) settleStatus(step)
  }
}

/** "Not on yet": the planned start has passed and somebody says that nothing went on. */
export function notOnYet(draft: Draft, act: WorkAct) {
  const step = stepNamed(draft, act.body.step)
  const turn = step && openTurn(step, 'work')
  if (!step || !turn) return cannotBe(draft, act, step ? 'nothing left to do' : 'no such step')
  turn.notOnAt = latestAt(act)
  if (turn.status === 'doing') Object.assign(turn, { status: 'waiting', doingMemberId: null })
  settleStatus(step)
}
