import type { Operation } from '#shared/promise/operations'
import type { Plan, PlanProblem } from '#shared/planning/types'

/** A turn that the plan gave: `next` begins no sooner than `first` does. By operation. */
export interface Turn { first: number, next: number }

/**
 * Who gets a place after whom, as the plan has it: in another course of things each keeps its turn, and waits till the piece before it is
 * really moved on. Only turns whose first begins no later than the next, so that none goes round.
 */
export function turnsOf(problem: PlanProblem, plan: Plan, operations: readonly Operation[]): Turn[] {
  const numbers = new Map(problem.activities.map((activity, i) => [activity.id, i]))
  const ends = new Map(plan.entries.map(entry => [entry.activity, entry.end]))
  return placeTurns(problem, numbers, ends, operations)
    .filter(({ first, next }) => first !== next && operations[first]!.plannedAt <= operations[next]!.plannedAt && operations[next]!.plannedAt < Infinity)
}

interface Hold { from: number | null, to: number | null, units: number, begins: number, ends: number }

/** Each resting piece takes the units that were left first. */
function placeTurns(problem: PlanProblem, numbers: ReadonlyMap<string, number>, ends: ReadonlyMap<string, number>, operations: readonly Operation[]): Turn[] {
  return problem.resources.flatMap(({ id, capacity }) => {
    const holds = problem.rests.flatMap((rest): Hold[] => {
      const units = rest.uses[id] ?? 0
      const from = rest.from === null ? null : numbers.get(rest.from) ?? null
      const to = rest.to === null ? null : numbers.get(rest.to) ?? null
      const begins = rest.from === null ? 0 : ends.get(rest.from) ?? Infinity
      return units === 0 || begins === Infinity ? [] : [{ from, to, units, begins, ends: to === null ? Infinity : operations[to]!.plannedAt }]
    }).filter(hold => hold.ends > hold.begins).sort((a, b) => a.begins - b.begins || a.ends - b.ends)
    const lanes: { until: number, by: number | null }[] = Array.from({ length: capacity }, () => ({ until: 0, by: null }))
    return holds.flatMap((hold) => {
      const taken = lanes.sort((a, b) => a.until - b.until).slice(0, hold.units)
      const before = new Set(taken.flatMap(lane => lane.by ?? []))
      for (const lane of taken) Object.assign(lane, { until: hold.ends, by: hold.to })
      return hold.from === null ? [] : [...before].map((first): Turn => ({ first, next: hold.from! }))
    })
  })
}
