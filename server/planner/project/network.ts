import type { Project } from './project'

/** Not bound to each other. */
export const apart = -0x3fffffff

/**
 * Least times from start to start between any two activities, over all arcs: `gap[i * size + j]` from `i` to `j`.
 * Row by row; `back` is the same turned round, so that both ways are read in a row.
 */
export interface Network { readonly size: number, readonly minutes: Int32Array, readonly gap: Int32Array, readonly back: Int32Array }

/** Longest paths from every activity along the arcs (Bellman and Ford with a queue); null when the arcs contradict each other. */
export function networkOf(project: Project): Network | null {
  const { size, minutes, outOf: { at, other, gap } } = project
  const all = new Int32Array(size * size).fill(apart)
  const queue = new Int32Array(size + 1)
  const queued = new Uint8Array(size)
  const count = new Int32Array(size)
  for (let from = 0; from < size; from++) {
    const row = from * size
    all[row + from] = 0
    count.fill(0)
    queue[0] = from
    for (let head = 0, tail = 1; head !== tail;) {
      const node = queue[head]!
      head = head === size ? 0 : head + 1
      queued[node] = 0
      if (++count[node]! > size + 1) return null
      for (let k = at[node]!; k < at[node + 1]!; k++) {
        const to = other[k]!
        const reach = all[row + node]! + gap[k]!
        if (reach <= all[row + to]!) continue
        if (to === from && reach > 0) return null
        all[row + to] = reach
        if (queued[to]) continue
        queued[to] = 1
        queue[tail] = to
        tail = tail === size ? 0 : tail + 1
      }
    }
  }
  return { size, minutes, gap: all, back: turned(all, size) }
}

function turned(matrix: Int32Array, size: number): Int32Array {
  const result = new Int32Array(matrix.length)
  for (let i = 0; i < size; i++) for (let j = 0; j < size; j++) result[j * size + i] = matrix[i * size + j]!
  return result
}

/** One more arc, all paths over it included. False when it contradicts the others, which then are spoilt. */
export function tighten({ size, gap, back }: Network, from: number, to: number, least: number): boolean {
  if (least <= gap[from * size + to]!) return true
  if (gap[to * size + from]! + least > 0) return false
  for (let a = 0; a < size; a++) {
    const before = gap[a * size + from]!
    if (before === apart || before + least <= gap[a * size + to]!) continue
    const reach = before + least
    for (let b = 0; b < size; b++) {
      const after = gap[to * size + b]!
      if (after === apart || reach + after <= gap[a * size + b]!) continue
      gap[a * size + b] = reach + after
      back[b * size + a] = reach + after
    }
  }
  return true
}

/** The same time seen from the end: starts become ends counted back. From `j` to `i` is then what was from `i` to `j`, plus the minutes of `j`, less those of `i`. */
export function mirroredNetwork({ size, minutes, gap, back }: Network): Network {
  const shifted = (matrix: Int32Array, sign: 1 | -1) => matrix.map((value, k) => {
    const [i, j] = [Math.floor(k / size), k % size]
    return value === apart ? apart : value + sign * (minutes[i]! - minutes[j]!)
  })
  return { size, minutes, gap: shifted(back, 1), back: shifted(gap, -1) }
}

/** Do two activities ask for more together than there is? */
export function clash({ words, demand, size, bias, guard }: Project, one: number, other: number): boolean {
  for (let word = 0; word < words; word++) {
    if (((demand[word * size + one]! + demand[word * size + other]! + bias[word]!) & guard[word]!) !== 0) return true
  }
  return false
}

const copy = (network: Network): Network => ({ ...network, gap: network.gap.slice(), back: network.back.slice() })

/** Two activities that cannot overlap and of which neither can be first. */
export type Deadlock = readonly [one: number, other: number]

/** Pairs that cannot go on at once, with an arc for the only order that is left; a pair with none. */
function settlePairs(network: Network, pairs: Int32Array): Deadlock | null {
  const { size, minutes, gap } = network
  for (let grew = true; grew;) {
    grew = false
    for (let k = 0; k < pairs.length; k += 2) {
      const [i, j] = [pairs[k]!, pairs[k + 1]!]
      const iFirst = gap[j * size + i]! + minutes[i]! <= 0
      const jFirst = gap[i * size + j]! + minutes[j]! <= 0
      if (!iFirst && !jFirst) return [i, j]
      const [from, to] = iFirst ? [i, j] : [j, i]
      if (iFirst === jFirst || gap[from * size + to]! >= minutes[from]!) continue
      if (!tighten(network, from, to, minutes[from]!)) return [i, j]
      grew = true
    }
  }
  return null
}

function clashingPairs(project: Project): Int32Array {
  const pairs: number[] = []
  for (let i = 0; i < project.size; i++) {
    for (let j = i + 1; j < project.size; j++) {
      if (project.minutes[i]! > 0 && project.minutes[j]! > 0 && clash(project, i, j)) pairs.push(i, j)
    }
  }
  return Int32Array.from(pairs)
}

/**
 * Settles the order of every pair that cannot overlap and has only one order left, and tries both orders of those with two: when one
 * leads to a contradiction the other holds. A pair without any order: there is no plan, whatever the rest.
 */
export function settle(project: Project, network: Network, shouldStop: () => boolean): Deadlock | null {
  const pairs = clashingPairs(project)
  const { size, minutes, gap } = network
  const trial = copy(network)
  let deadlock = settlePairs(network, pairs)
  for (let grew = true; grew && !deadlock;) {
    grew = false
    for (let k = 0; k < pairs.length && !deadlock; k += 2) {
      const [i, j] = [pairs[k]!, pairs[k + 1]!]
      if (gap[i * size + j]! >= minutes[i]! || gap[j * size + i]! >= minutes[j]!) continue
      if (shouldStop()) return null
      const wrong = [[i, j], [j, i]].find(([from, to]) => !holds(network, trial, pairs, from!, to!))
      if (!wrong) continue
      grew = true
      const [to, from] = wrong as [number, number]
      deadlock = tighten(network, from, to, minutes[from]!) ? settlePairs(network, pairs) : [i, j]
    }
  }
  return deadlock
}

/** Does anything contradict `from` being done before `to` begins? */
function holds(network: Network, trial: Network, pairs: Int32Array, from: number, to: number): boolean {
  trial.gap.set(network.gap)
  trial.back.set(network.back)
  return tighten(trial, from, to, network.minutes[from]!) && settlePairs(trial, pairs) === null
}
