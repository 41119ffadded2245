import type { Anew } from '#shared/schemas/what-if'
import { countOf, gainsText, lossesText } from '#shared/words/what-if'

export const planAnewWords = {
  make: 'Make the plan anew',
  making: 'Making the plan anew',
  made: 'The plan is made anew. What moved stands under the plan.',
  changed: 'The studio changed while the plan was made. The plan follows by itself; then look again.',
  notMade: 'The planner found no plan in time. The last one stays. Try again in a moment.',
} as const

/** "The plan moves as little as it must. Made anew it would finish Box 3 days sooner, but Lid 5 h later; 36 steps would get another time. What is pinned or in hand stays." */
export function anewText({ moves, difference }: Anew): string {
  const losses = lossesText(difference)
  return `The plan moves as little as it must. Made anew it would ${gainsText(difference)}${losses === '' ? '' : `, but ${losses}`}; ${countOf(moves, 'step')} would get another time. What is pinned or in hand stays.`
}
