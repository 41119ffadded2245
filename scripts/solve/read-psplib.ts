import { planProblem } from '#shared/planning/problem'
import type { PlanProblem } from '#shared/planning/types'
import { BadField } from '../model/fields'
import { makespanOnly, resourcesOf, usesOf, wholeNumbers } from './lines'

function after(lines: readonly string[], heading: string, skip: number): number {
  const at = lines.findIndex(line => line.trim().startsWith(heading))
  if (at < 0) throw new BadField(`${heading}: expected this heading`)
  return at + skip
}

const isRow = (line: string | undefined) => line !== undefined && /^\s*\d/.test(line)

/**
 * A single-mode project of the project scheduling library, `.sm`: headings, then a row for each activity with its followers, a row with its
 * minutes and demands, and the capacities. (Layout: R. Kolisch, A. Sprecher, "PSPLIB - a project scheduling problem library", European
 * Journal of Operational Research 96, 1997.)
 * @throws BadField naming the heading or line.
 */
export function readPsplib(text: string): PlanProblem {
  const lines = text.split(/\r?\n/)
  const lags: { from: string, to: string }[] = []
  for (let i = after(lines, 'PRECEDENCE RELATIONS', 2); isRow(lines[i]); i++) {
    const [from, , count, ...to] = wholeNumbers(lines, i, 3, 'number, modes, followers') as [number, number, number, ...number[]]
    if (to.length !== count) throw new BadField(`line ${i + 1}: expected ${count} followers, got ${to.length}`)
    for (const id of to) lags.push({ from: `${from}`, to: `${id}` })
  }
  const activities: { id: string, minutes: number, uses: Record<string, number> }[] = []
  for (let i = after(lines, 'REQUESTS/DURATIONS', 3); isRow(lines[i]); i++) {
    const [id, mode, minutes, ...amounts] = wholeNumbers(lines, i, 3, 'number, mode, minutes, demands') as [number, number, number, ...number[]]
    if (mode !== 1) throw new BadField(`line ${i + 1}: expected one mode for each activity`)
    activities.push({ id: `${id}`, minutes, uses: usesOf(amounts) })
  }
  const capacities = wholeNumbers(lines, after(lines, 'RESOURCEAVAILABILITIES', 2), 0, 'capacities')
  return planProblem({ activities, lags, resources: resourcesOf(capacities), weights: makespanOnly })
}
