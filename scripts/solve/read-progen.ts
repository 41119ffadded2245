import { planProblem } from '#shared/planning/problem'
import type { PlanProblem } from '#shared/planning/types'
import { BadField } from '../model/fields'
import { makespanOnly, resourcesOf, usesOf, wholeNumbers } from './lines'

interface Followers { to: string, gap: number }

/** Number, modes, count, the followers, then for each of them its gaps in brackets. */
function followersOf(line: string, index: number): Followers[] {
  const words = line.replaceAll(/\[\s+|\s+\]/g, match => match.trim()).trim().split(/\s+/)
  const count = Number(words[2])
  const gaps = words.slice(3 + count)
  if (!Number.isInteger(count) || gaps.length !== count) throw new BadField(`line ${index + 1}: expected followers with one bracket each, got ${JSON.stringify(line)}`)
  return gaps.flatMap((bracket, k) => bracket.replaceAll(/[[\]]/g, '').split(',').map((gap) => {
    if (!/^-?\d+$/.test(gap)) throw new BadField(`line ${index + 1}: expected a gap in brackets, got ${JSON.stringify(bracket)}`)
    return { to: words[3 + k]!, gap: Number(gap) }
  }))
}

/**
 * A project with shortest and longest waits, `.sch` as ProGen/max writes it: gaps from start to start, negative ones for longest waits.
 * (C. Schwindt, "Generation of resource-constrained project scheduling problems subject to temporal constraints", report WIOR-543,
 * University of Karlsruhe, 1998.)
 * @throws BadField naming the line.
 */
export function readProgen(text: string): PlanProblem {
  const lines = text.split(/\r?\n/).filter(line => line.trim() !== '')
  const [count, kinds] = wholeNumbers(lines, 0, 2, 'numbers of activities and of resources') as [number, number]
  const size = count + 2
  const rows = Array.from({ length: size }, (_, i) => wholeNumbers(lines, 1 + size + i, 3 + kinds, 'number, mode, minutes, demands'))
  const minutes = rows.map(row => row[2]!)
  const lags = rows.flatMap((_, i) => followersOf(lines[1 + i]!, 1 + i).map(({ to, gap }) => ({ from: `${i}`, to, min: gap - minutes[i]! })))
  const activities = rows.map((row, i) => ({ id: `${i}`, minutes: minutes[i]!, uses: usesOf(row.slice(3, 3 + kinds)) }))
  const capacities = wholeNumbers(lines, 1 + 2 * size, kinds, 'capacities').slice(0, kinds)
  return planProblem({ activities, lags, resources: resourcesOf(capacities), weights: makespanOnly })
}
