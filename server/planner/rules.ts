import { none } from './model'
import { never } from './profile'
import type { Model } from './model'
import type { Unit } from './units'

/** What the priority rules look at, for a unit: minutes, and weights of its jobs. */
interface Traits { due: number, weight: number, chain: number, release: number, closing: number, previous: number }

function chainOf(unit: Unit): number {
  const end = unit.nodes.map(node => node.setup + node.length + node.cleanup)
  unit.nodes.forEach((_, k) => {
    for (const edge of unit.outOf[k]!) {
      if (edge.to !== none) end[edge.to] = Math.max(end[edge.to]!, end[k]! + edge.waits[0]! + unit.nodes[edge.to]!.length)
    }
  })
  return Math.max(...end)
}

function traitsOf(model: Model, unit: Unit): Traits {
  const { problem } = model
  const traits: Traits = { due: never, weight: 0, chain: chainOf(unit), release: Math.min(...unit.nodes.map(node => node.earliest)), closing: never, previous: never }
  for (const edge of unit.edges) if (edge.from === none) traits.closing = Math.min(traits.closing, edge.waits.at(-1)!)
  const jobs = new Set<number>()
  for (const node of unit.nodes) {
    for (const activity of node.members) {
      if (model.job[activity] !== none) jobs.add(model.job[activity]!)
      traits.previous = Math.min(traits.previous, problem.previous[problem.activities[activity]!.id] ?? never)
    }
  }
  for (const job of jobs) {
    traits.due = Math.min(traits.due, problem.jobs[job]!.due ?? never)
    traits.weight += problem.jobs[job]!.weight
  }
  return traits
}

type Rule = (traits: Traits) => number

/** Latest start that still makes the due date or the shutting window. */
const latestStart: Rule = traits => Math.min(traits.closing, traits.due - traits.chain)

/** Smaller goes first. */
const rules: readonly Rule[] = [
  // Work that is late anyway must not push a shutting window shut.
  traits => traits.closing,
  latestStart,
  traits => traits.due,
  traits => traits.chain / (traits.weight + 0.01),
  traits => Math.min(traits.closing, traits.due - traits.chain - 240 * traits.weight),
  traits => -traits.chain,
  traits => traits.release,
]

export const ruleCount = rules.length

/** Units by one of the rules; ties by the first rule, then by how they were given. */
export function byRule(model: Model, units: readonly Unit[], rule: number): Unit[] {
  return sorted(units.map((unit) => {
    const traits = traitsOf(model, unit)
    return { unit, key: rules[rule]!(traits), second: latestStart(traits) }
  }))
}

/** Units as the last plan had them, new ones after. */
export const byPrevious = (model: Model, units: readonly Unit[]): Unit[] => sorted(units.map((unit) => {
  const traits = traitsOf(model, unit)
  return { unit, key: traits.previous, second: latestStart(traits) }
}))

/** An order near the given one: a stretch of it is shaken, or all of it. */
export function shaken(units: readonly Unit[], random: () => number, all = false): Unit[] {
  const width = all ? units.length : Math.max(2, Math.ceil(units.length * (0.06 + 0.4 * random())))
  const from = Math.floor(random() * Math.max(1, units.length - width + 1))
  return sorted(units.map((unit, i) => ({ unit, key: i >= from && i < from + width ? i + (random() - 0.5) * width : i, second: i })))
}

const sorted = (items: { unit: Unit, key: number, second: number }[]) => items.sort((a, b) => a.key - b.key || a.second - b.second).map(item => item.unit)
