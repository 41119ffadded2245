import type { StudioProblem } from '~~/server/planning/problem'
import type { Conflict, Plan } from '#shared/planning/types'
import { planWords } from '#shared/words/plan'

/** Why something has no start, or only one after its window, each as one sentence that names the clash. */
export function clashSentences(plan: Plan, given: StudioProblem): string[] {
  const missed = plan.entries.filter(entry => entry.afterRecovery).map(entry => planWords.windowMissed(stepOf(entry.activity, given)))
  return [...new Set([...plan.conflicts.map(conflict => sentence(conflict, given)), ...missed])]
}

function sentence(conflict: Conflict, given: StudioProblem): string {
  const step = stepOf(conflict.activity, given)
  const other = conflict.other === null ? null : stepOf(conflict.other, given)
  const place = conflict.resource?.startsWith('p ') ? conflict.resource.slice(2) : null
  switch (conflict.kind) {
    case 'too much': return place ? planWords.tooFewPlaces(step, place) : planWords.tooFewHands(step)
    case 'no open time': return planWords.noHours(step)
    case 'window closed': return planWords.windowClosed(step)
    case 'window taken': return planWords.windowTaken(step)
    case 'no room': return planWords.noRoom(step, place)
    case 'cycle': return planWords.cycle(step)
    case 'horizon': return planWords.horizon(step)
    case 'fixed': return planWords.fixed(step)
    case 'after unplaced': return planWords.after(step, other ?? step)
  }
}

const stepOf = (activity: string, given: StudioProblem) => given.works.find(work => work.turns.some(turn => `t${turn.id}` === activity))?.step.name ?? ''
