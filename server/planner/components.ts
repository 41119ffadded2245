import { none } from './model'
import type { Model } from './model'

/** Activities tied together by lags or rests, in an order in which every one follows what it waits for; indices of its lags and rests. */
export interface Component { readonly activities: readonly number[], readonly lags: readonly number[], readonly rests: readonly number[] }

function roots(model: Model): Int32Array {
  const parent = Int32Array.from({ length: model.size }, (_, i) => i)
  const root = (i: number) => {
    while (parent[i] !== i) {
      parent[i] = parent[parent[i]!]!
      i = parent[i]!
    }
    return i
  }
  for (const link of [...model.lags, ...model.rests]) {
    if (link.from === none || link.to === none || model.isFixed[link.from] || model.isFixed[link.to]) continue
    const [a, b] = [root(link.from), root(link.to)]
    if (a < b) parent[b] = a
    else parent[a] = b
  }
  for (let i = 0; i < model.size; i++) parent[i] = root(i)
  return parent
}

/** Each after what it waits for, lowest index first; members of a circle come last, in index order. */
function ordered(activities: readonly number[], links: readonly { from: number, to: number }[]): number[] {
  const waits = new Map(activities.map(activity => [activity, 0]))
  const after = new Map<number, number[]>(activities.map(activity => [activity, []]))
  for (const { from, to } of links) {
    if (!waits.has(from) || !waits.has(to)) continue
    waits.set(to, waits.get(to)! + 1)
    after.get(from)!.push(to)
  }
  const ready = activities.filter(activity => waits.get(activity) === 0)
  const result: number[] = []
  for (let i = 0; i < ready.length; i++) {
    result.push(ready[i]!)
    for (const next of after.get(ready[i]!)!) {
      waits.set(next, waits.get(next)! - 1)
      if (waits.get(next) === 0) ready.push(next)
    }
  }
  return [...result, ...activities.filter(activity => waits.get(activity)! > 0)]
}

/** Splits the activities without a fixed start into what hangs together; fixed ones are where lags begin or end, not ties. */
export function components(model: Model): Component[] {
  const root = roots(model)
  const groups = new Map<number, { activities: number[], lags: number[], rests: number[] }>()
  for (let i = 0; i < model.size; i++) {
    if (model.isFixed[i]) continue
    const group = groups.get(root[i]!) ?? { activities: [], lags: [], rests: [] }
    group.activities.push(i)
    groups.set(root[i]!, group)
  }
  const owner = (link: { from: number, to: number }) => [link.to, link.from].find(end => end !== none && !model.isFixed[end])
  const collect = (name: 'lags' | 'rests') => model[name].forEach((link, i) => {
    const end = owner(link)
    if (end !== undefined) groups.get(root[end]!)![name].push(i)
  })
  collect('lags')
  collect('rests')
  return [...groups.values()].map(group => ({
    ...group, activities: ordered(group.activities, [...group.lags.map(i => model.lags[i]!), ...group.rests.map(i => model.rests[i]!)]),
  }))
}

/** Two components with the same signature do the same work in the same way, whatever their times. */
export function signatures(model: Model, all: readonly Component[]): string[] {
  const ways = new Map<unknown, number>()
  const way = (i: number) => {
    const modes = model.modes[i]!
    if (!ways.has(modes)) ways.set(modes, ways.size)
    return ways.get(modes)
  }
  return all.map((component) => {
    const place = new Map(component.activities.map((activity, i) => [activity, i]))
    const end = (i: number) => i === none ? 'n' : place.get(i) ?? 'f'
    let name = `${model.job[component.activities[0]!]}`
    for (const i of component.activities) {
      const { mayRunOver, splittable } = model.problem.activities[i]!
      name += `;${model.family[i]},${way(i)},${mayRunOver},${splittable}`
    }
    for (const i of component.lags) name += `;${end(model.lags[i]!.from)}>${end(model.lags[i]!.to)}`
    for (const i of component.rests) name += `;${end(model.rests[i]!.from)}-${end(model.rests[i]!.to)},${model.rests[i]!.resources.join()}`
    return name
  })
}
