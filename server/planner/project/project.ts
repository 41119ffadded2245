import type { PlanProblem } from '#shared/planning/types'

/** Arcs by activity: those of `k` are `at[k]` to `at[k + 1]`. From start to start, at least `gap`. */
export interface Arcs { readonly at: Int32Array, readonly other: Int32Array, readonly gap: Int32Array }

/**
 * A problem without hours, places or families, judged by when all is done. Activities in numbers, all times from start to start.
 * Demands of several resources share one word: a lane of bits for each, with a guard bit above it that any overload sets.
 */
export interface Project {
  readonly size: number
  readonly minutes: Int32Array
  readonly words: number
  /** By word, then by activity. */
  readonly demand: Int32Array
  /** Added to what is booked, so that full plus one reaches the guard bit. */
  readonly bias: Int32Array
  readonly guard: Int32Array
  readonly release: Int32Array
  readonly into: Arcs
  readonly outOf: Arcs
  /** No longest wait and no overlap of one with the next: any order that keeps the arcs can be placed. */
  readonly plain: boolean
  /** Slots of time that any order of the work fits into. */
  readonly horizon: number
}

interface Arc { from: number, to: number, gap: number }

/** Longest time line laid out minute by minute. */
const mostSlots = 200_000

function isProject(problem: PlanProblem): boolean {
  const { weights } = problem
  return problem.activities.every(activity => activity.choices.length === 0 && !activity.splittable)
    && problem.resources.every(resource => resource.open === null && resource.changes.length === 0)
    && problem.lags.every(lag => lag.windows.length === 1 && lag.recovery === null)
    && problem.rests.length + problem.apart.length + problem.families.length + problem.fixed.length === 0
    && problem.jobs.every(job => job.due === null) && weights.waiting + weights.setup === 0 && weights.makespan > 0
    && Object.keys(problem.previous).length === 0 && problem.horizon <= mostSlots
}

function arcsOf(problem: PlanProblem, minutes: Int32Array): { arcs: Arc[], release: Int32Array } | null {
  const index = new Map(problem.activities.map((activity, i) => [activity.id, i]))
  const release = Int32Array.from(problem.activities, activity => Math.max(0, activity.release))
  const arcs: Arc[] = []
  for (const job of problem.jobs) for (const id of job.activities) release[index.get(id)!] = Math.max(release[index.get(id)!]!, job.release)
  for (const lag of problem.lags) {
    const to = index.get(lag.to)!
    const [least, most] = lag.windows[0]!
    if (lag.from === null) {
      if (most !== null) return null
      release[to] = Math.max(release[to]!, least)
      continue
    }
    const from = index.get(lag.from)!
    arcs.push({ from, to, gap: minutes[from]! + least })
    if (most !== null) arcs.push({ from: to, to: from, gap: -(minutes[from]! + most) })
  }
  return { arcs, release }
}

function gathered(size: number, arcs: readonly Arc[], key: 'from' | 'to', other: 'from' | 'to'): Arcs {
  const at = new Int32Array(size + 1)
  for (const arc of arcs) at[arc[key] + 1]!++
  for (let i = 0; i < size; i++) at[i + 1]! += at[i]!
  const next = at.slice()
  const result = { at, other: new Int32Array(arcs.length), gap: new Int32Array(arcs.length) }
  for (const arc of arcs) {
    const spot = next[arc[key]]!++
    result.other[spot] = arc[other]
    result.gap[spot] = arc.gap
  }
  return result
}

interface Lane { word: number, shift: number, bits: number, capacity: number }

/** A lane of bits for each resource, as many in a word as go in. */
function lanesOf(problem: PlanProblem): Lane[] {
  let word = 0
  let shift = 0
  return problem.resources.map(({ capacity }) => {
    const bits = 33 - Math.clz32(capacity)
    if (shift + bits > 32) [word, shift] = [word + 1, 0]
    const lane = { word, shift, bits, capacity }
    shift += bits
    return lane
  })
}

function demandsOf(problem: PlanProblem): Pick<Project, 'words' | 'demand' | 'bias' | 'guard'> {
  const lanes = lanesOf(problem)
  const words = (lanes.at(-1)?.word ?? 0) + 1
  const size = problem.activities.length
  const result = { words, demand: new Int32Array(words * size), bias: new Int32Array(words), guard: new Int32Array(words) }
  for (const { word, shift, bits, capacity } of lanes) {
    result.bias[word]! += (2 ** (bits - 1) - 1 - capacity) << shift
    result.guard[word]! |= 1 << (shift + bits - 1)
  }
  const place = new Map(problem.resources.map((resource, i) => [resource.id, i]))
  problem.activities.forEach(({ uses }, i) => {
    for (const [id, amount] of Object.entries(uses)) {
      const { word, shift } = lanes[place.get(id)!]!
      result.demand[word * size + i]! += amount << shift
    }
  })
  return result
}

const mostCapacity = 2 ** 29

/** The problem as a project, or null when it is more than that (or asks for more than there is: then there is nothing to order). */
export function projectOf(problem: PlanProblem): Project | null {
  if (!isProject(problem) || problem.resources.some(resource => resource.capacity > mostCapacity)) return null
  const capacity = new Map(problem.resources.map(resource => [resource.id, resource.capacity]))
  if (problem.activities.some(({ uses }) => Object.entries(uses).some(([id, amount]) => amount > capacity.get(id)!))) return null
  const size = problem.activities.length
  const minutes = Int32Array.from(problem.activities, activity => activity.minutes)
  const read = arcsOf(problem, minutes)
  if (!read) return null
  const plain = read.arcs.every(arc => arc.gap >= minutes[arc.from]!) && isAcyclic(size, read.arcs)
  return {
    size, minutes, plain, release: read.release, horizon: problem.horizon, ...demandsOf(problem),
    into: gathered(size, read.arcs, 'to', 'from'), outOf: gathered(size, read.arcs, 'from', 'to'),
  }
}

function isAcyclic(size: number, arcs: readonly Arc[]): boolean {
  return topological(size, gathered(size, arcs, 'to', 'from'), gathered(size, arcs, 'from', 'to')) !== null
}

/** Every activity after all that its arcs come from; null when they go round in a circle. */
export function topological(size: number, into: Arcs, outOf: Arcs): Int32Array | null {
  const left = Int32Array.from({ length: size }, (_, i) => into.at[i + 1]! - into.at[i]!)
  const order = new Int32Array(size)
  let found = 0
  for (let i = 0; i < size; i++) if (left[i] === 0) order[found++] = i
  for (let next = 0; next < found; next++) {
    for (let k = outOf.at[order[next]!]!; k < outOf.at[order[next]! + 1]!; k++) if (--left[outOf.other[k]!]! === 0) order[found++] = outOf.other[k]!
  }
  return found === size ? order : null
}
