import { libraryDraft, librarySheets } from '#shared/library/as-draft'
import type { LibraryMaterial, LibrarySchedule } from '#shared/library/types'
import * as graph from '#shared/schedules/graph'
import { draftProblems } from '#shared/schedules/problems'
import { problemText } from '#shared/words/schedule-problems'

/** Keys of steps in an order in which each comes after all it waits for, or null when they wait for each other. */
export function stepOrder(schedule: LibrarySchedule): string[] | null {
  const waiting = new Map(schedule.steps.map(step => [step.key, schedule.links.filter(link => link.to === step.key).map(link => link.from)]))
  const order: string[] = []
  while (waiting.size > 0) {
    const next = [...waiting].find(([, before]) => before.every(key => order.includes(key)))
    if (!next) return null
    order.push(next[0])
    waiting.delete(next[0])
  }
  return order
}

/** Every step that cannot begin before `key` has, through any number of links. */
export const stepsAfter = (schedule: LibrarySchedule, key: string): Set<string> => graph.stepsAfter(schedule.links, key)

/** Only the library says into what a part goes: elsewhere the steps that join them do. */
function partProblems(schedule: LibrarySchedule): string[] {
  const keys = schedule.parts.map(part => part.key)
  const into = new Map(schedule.parts.map(part => [part.key, part.into]))
  return schedule.parts.flatMap((part) => {
    const problems = part.into !== undefined && !keys.includes(part.into) ? [`part "${part.key}" goes into "${part.into}", which is not a part`] : []
    let at = part.into
    for (let i = 0; at !== undefined && i < keys.length; i++) at = into.get(at)
    return at === undefined ? problems : [...problems, `part "${part.key}" goes into itself`]
  })
}

/**
 * What is wrong with a finishing schedule of the library, in sentences that name the step, part or link; an empty list
 * when nothing is: its parts, and all that is asked of a studio's own.
 * @param materials those it may ask for
 */
export function scheduleProblems(schedule: LibrarySchedule, materials: readonly LibraryMaterial[]): string[] {
  const draft = libraryDraft(schedule, materials)
  return [...partProblems(schedule), ...draftProblems(draft, librarySheets(materials)).map(problem => problemText(problem, draft))]
}
