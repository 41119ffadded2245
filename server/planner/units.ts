import { components, signatures } from './components'
import { none } from './model'
import { never } from './profile'
import type { Component } from './components'
import type { CompiledRest, Mode, Model, Waits } from './model'
import type { Recovery } from '#shared/planning/types'

/** One session's worth of work: a member of each piece in the unit, in a row or together. */
export interface UnitNode {
  readonly members: Int32Array
  /** Of each member, from the start of the first. */
  readonly starts: Int32Array
  readonly ends: Int32Array
  readonly length: number
  readonly family: number
  readonly setup: number
  readonly cleanup: number
  readonly earliest: number
  readonly modes: readonly Mode[]
  readonly mayRunOver: boolean
  readonly splittable: boolean
}

/** Allowed waits from the end of one node (or minute 0) to the start of another (or minute 0: then minus the end); `past`: once the last of them is missed. */
export interface Edge { readonly from: number, readonly to: number, readonly waits: Waits, readonly past: Waits, readonly recovery: Recovery | null, readonly lag: number }
export interface UnitRest { readonly from: number, readonly to: number, readonly members: readonly CompiledRest[] }

/** Pieces that go through their work together, one alone at least. */
export interface Unit {
  readonly components: readonly Component[]
  readonly nodes: readonly UnitNode[]
  readonly edges: readonly Edge[]
  readonly rests: readonly UnitRest[]
  /** Edges and rests by node. */
  readonly into: readonly (readonly Edge[])[]
  readonly outOf: readonly (readonly Edge[])[]
  readonly restsInto: readonly (readonly UnitRest[])[]
  readonly restsOutOf: readonly (readonly UnitRest[])[]
}

function makeNode(model: Model, members: Int32Array): UnitNode {
  const first = members[0]!
  const family = model.family[first] === none ? null : model.problem.families[model.family[first]!]!
  const starts = new Int32Array(members.length)
  const ends = new Int32Array(members.length)
  let at = 0
  members.forEach((activity, i) => {
    starts[i] = family?.mode === 'together' ? 0 : at
    ends[i] = starts[i]! + model.minutes[activity]!
    at = ends[i]!
  })
  return {
    members, starts, ends, length: Math.max(...ends), family: model.family[first]!, setup: family?.setup ?? 0, cleanup: family?.cleanup ?? 0,
    earliest: members.reduce((most, activity, i) => Math.max(most, model.earliest[activity]! - starts[i]!), 0),
    modes: model.modes[first]!, mayRunOver: model.problem.activities[first]!.mayRunOver, splittable: model.problem.activities[first]!.splittable,
  }
}

/** More than one member only if family limits and some stretch of open time allow it. */
function fits(model: Model, node: UnitNode): boolean {
  if (node.members.length === 1) return true
  if (node.splittable) return false
  const family = node.family === none ? null : model.problem.families[node.family]!
  if (family && family.maxMembers !== null && node.members.length > family.maxMembers) return false
  if (family && family.maxMinutes !== null && node.length > family.maxMinutes) return false
  const total = node.setup + node.length + node.cleanup
  return node.modes.some(mode => mode.open.some((to, i) => i % 2 === 1 && to - mode.open[i - 1]! >= total))
}

function meet(a: Waits, b: Waits): Waits {
  const result: number[] = []
  for (let i = 0; i < a.length; i += 2) {
    for (let k = 0; k < b.length; k += 2) {
      const from = Math.max(a[i]!, b[k]!)
      const to = Math.min(a[i + 1]!, b[k + 1]!)
      if (from <= to) result.push(from, to)
    }
  }
  return Int32Array.from(result)
}

const shift = (waits: Waits, by: number): Waits => waits.map((value, i) => i % 2 === 1 && value === never ? never : value + by)

interface Link { from: number, to: number, waits: Waits }

/** The link of each piece, seen from the first member's times, all at once. */
function combine(model: Model, links: readonly Link[], from: UnitNode | null, to: UnitNode | null): Waits {
  return links.map((link, i) => {
    const leaves = from ? from.ends[i]! - from.length : link.from === none ? 0 : model.fixedEnd[link.from]!
    const arrives = to ? -to.starts[i]! : link.to === none ? 0 : -model.fixedStart[link.to]!
    return shift(link.waits, leaves + arrives)
  }).reduce(meet)
}

const anyWait: Waits = Int32Array.of(0, never)

interface Frame { model: Model, nodes: readonly UnitNode[], parts: readonly Component[], place: ReadonlyMap<number, number> }

function makeEdges({ model, nodes, parts, place }: Frame): Edge[] | null {
  const edges: Edge[] = []
  const add = (links: readonly Link[], recovery: Recovery | null, lag: number) => {
    const from = place.get(links[0]!.from) ?? none
    const to = place.get(links[0]!.to) ?? none
    const waits = combine(model, links, nodes[from] ?? null, nodes[to] ?? null)
    edges.push({ from, to, waits, past: Int32Array.of(Math.min(never, (waits.at(-1) ?? 0) + 1), never), recovery: parts.length === 1 ? recovery : null, lag })
  }
  parts[0]!.lags.forEach((first, k) => add(parts.map(part => model.lags[part.lags[k]!]!), model.lags[first]!.recovery, first))
  parts[0]!.rests.forEach((first, k) => {
    const rest = model.rests[first]!
    if (rest.from !== none && rest.to !== none) add(parts.map(part => ({ ...model.rests[part.rests[k]!]!, waits: anyWait })), null, none)
  })
  return edges.some(edge => edge.waits.length === 0) ? null : edges
}

/** A unit of these pieces, or null when they cannot go together. */
export function makeUnit(model: Model, parts: readonly Component[]): Unit | null {
  const nodes = parts[0]!.activities.map((_, i) => makeNode(model, Int32Array.from(parts, part => part.activities[i]!)))
  if (!nodes.every(node => fits(model, node))) return null
  const place = new Map(parts[0]!.activities.map((activity, i) => [activity, i]))
  const edges = makeEdges({ model, nodes, parts, place })
  if (!edges) return null
  const rests = parts[0]!.rests.map((first, k): UnitRest => ({
    from: place.get(model.rests[first]!.from) ?? none, to: place.get(model.rests[first]!.to) ?? none, members: parts.map(part => model.rests[part.rests[k]!]!),
  }))
  const by = <T>(items: readonly T[], node: (item: T) => number) => {
    const lists: T[][] = nodes.map(() => [])
    for (const item of items) lists[node(item)]?.push(item)
    return lists
  }
  return {
    components: parts, nodes, edges, rests,
    into: by(edges, edge => edge.to), outOf: by(edges, edge => edge.from), restsInto: by(rests, rest => rest.to), restsOutOf: by(rests, rest => rest.from),
  }
}

/** One unit if the pieces can go together, else of their halves; a piece alone always makes one. */
function unitsOf(model: Model, parts: readonly Component[]): Unit[] {
  const unit = makeUnit(model, parts)
  if (unit) return [unit]
  return parts.length === 1 ? [] : halves(parts).flatMap(half => unitsOf(model, half))
}

const halves = <T>(items: readonly T[]): T[][] => [items.slice(0, Math.ceil(items.length / 2)), items.slice(Math.ceil(items.length / 2))]

/** The same pieces in two units. */
export const splitUnit = (model: Model, unit: Unit): Unit[] => halves(unit.components).flatMap(half => unitsOf(model, half))

/** First the piece whose windows or releases come first: its row goes first. */
function readiness(model: Model, component: Component): number {
  let at = 0
  for (const i of component.lags) {
    const lag = model.lags[i]!
    if (lag.from === none || model.isFixed[lag.from]) at = Math.max(at, (lag.from === none ? 0 : model.fixedEnd[lag.from]!) + lag.waits[0]!)
  }
  return component.activities.reduce((latest, activity) => Math.max(latest, model.earliest[activity]!), at)
}

/** Pieces by signature, those with the earliest windows first; a piece without any family alone: nothing is saved by waiting for another. */
export function piecesOf(model: Model): Component[][] {
  const all = components(model)
  const names = signatures(model, all)
  const groups = new Map<string, { component: Component, at: number }[]>()
  all.forEach((component, i) => {
    const name = component.activities.every(activity => model.family[activity] === none) ? `${i}` : names[i]!
    const group = groups.get(name) ?? []
    group.push({ component, at: readiness(model, component) })
    groups.set(name, group)
  })
  return [...groups.values()].map(group => group.sort((a, b) => a.at - b.at).map(item => item.component))
}

/** Like pieces put together, at most `1 / divisor` of them in one unit; Infinity: each piece alone. */
export function makeUnits(model: Model, pieces: readonly (readonly Component[])[], divisor: number): Unit[] {
  return pieces.flatMap((group) => {
    const size = Math.max(1, Math.ceil(group.length / divisor))
    const chunks = Array.from({ length: Math.ceil(group.length / size) }, (_, i) => group.slice(i * size, (i + 1) * size))
    return chunks.flatMap(chunk => unitsOf(model, chunk))
  })
}
