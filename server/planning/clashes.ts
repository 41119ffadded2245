import type { StudioProblem } from '~~/server/planning/problem'
import { activityId } from '~~/server/planning/ids'
import { busyOf, overlaps } from '#shared/planning/occupied'
import type { Activity, Conflict, Plan, PlanEntry, PlanProblem } from '#shared/planning/types'
import { planWords } from '#shared/words/plan'

/** Why something has no start, or only one after its window, each as one sentence that names the clash. */
export function clashSentences(plan: Plan, given: StudioProblem): string[] {
  const missed = plan.entries.filter(entry => entry.afterRecovery).map(entry => missedSentence(entry, plan, given.problem, stepOf(entry.activity, given)))
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

/** Says only what the plan's own facts prove: nobody works in the window, or whoever does has not the time left or has other work. */
function missedSentence(entry: PlanEntry, plan: Plan, problem: PlanProblem, step: string): string {
  const activity = problem.activities.find(each => each.id === entry.activity)
  const windows = missedWindows(entry, plan, problem)
  if (!activity || windows.length === 0) return planWords.windowPassed(step)
  const open = new Map(problem.resources.map(each => [each.id, each.open]))
  const busy = busyOf(plan)
  const works = (hand: string, from: number) => open.get(hand)?.some(([opens, shuts]) => from >= opens && (activity.mayRunOver ? from < shuts : from + activity.minutes <= shuts)) ?? true
  const idle = (hand: string, from: number) => !(busy.get(hand) ?? []).some(each => !each.activities.includes(activity.id) && overlaps(each, from, from + activity.minutes))
  const meets = (hand: string) => windows.some(([from, to]) => open.get(hand)?.some(([opens, shuts]) => opens <= to && shuts > Math.max(0, from)) ?? true)
  if (!enough(activity, meets)) return planWords.windowClosed(step)
  return windows.some(([from, to]) => anyMinute(from, to, at => enough(activity, hand => works(hand, at) && idle(hand, at)))) ? planWords.windowPassed(step) : planWords.windowMissed(step)
}

/** The last windows that an entry's start lies behind, absolute minutes, both ends allowed. */
function missedWindows(entry: PlanEntry, plan: Plan, problem: PlanProblem): [from: number, to: number][] {
  return problem.lags.filter(lag => lag.to === entry.activity && lag.recovery !== null).flatMap((lag): [number, number][] => {
    const origin = lag.from === null ? 0 : plan.entries.find(each => each.activity === lag.from)?.end
    const last = lag.windows[lag.windows.length - 1]
    return origin === undefined || !last || last[1] === null || entry.start <= origin + last[1] ? [] : [[origin + last[0], origin + last[1]]]
  })
}

function anyMinute(from: number, to: number, holds: (at: number) => boolean): boolean {
  for (let at = Math.max(0, from); at <= to; at++) if (holds(at)) return true
  return false
}

const enough = ({ choices }: Activity, holds: (hand: string) => boolean) => choices.every(({ of, count }) => of.filter(holds).length >= count)

const stepOf = (activity: string, given: StudioProblem) => given.works.find(work => work.turns.some(turn => activityId(turn.id) === activity))?.step.name ?? ''
