import { searchGaps } from './gap-search'
import { networkOf, settle } from './network'
import { searchOrders } from './order-search'
import type { Found, SearchLimits } from './order-search'
import type { Project } from './project'
import type { Deadlock, Network } from './network'

/** `deadlock`: why there is no plan at all, `none` when lags alone contradict each other; null with `found` null: none was found. */
export interface ProjectResult { found: Found | null, bound: number, deadlock: Deadlock | 'none' | null }

/** Longest path from the beginning to the end. */
function longest({ size, minutes, gap }: Network, release: Int32Array): number {
  let most = 0
  for (let i = 0; i < size; i++) for (let j = 0; j < size; j++) most = Math.max(most, release[i]! + gap[i * size + j]! + minutes[j]!)
  return most
}

/** Share of the time for settling orders before the search begins: one in so many asks. */
const asksForSettling = 400

/** Searches a project in the way it allows: orders alone when it has only shortest waits. */
export function solveProject(project: Project, limits: SearchLimits): ProjectResult {
  if (project.plain) return { found: searchOrders(project, limits), bound: limits.bound, deadlock: null }
  const network = networkOf(project)
  if (!network) return { found: null, bound: limits.bound, deadlock: 'none' }
  let asks = 0
  const deadlock = settle(project, network, () => ++asks > asksForSettling || limits.shouldStop())
  if (deadlock) return { found: null, bound: limits.bound, deadlock }
  const bound = Math.max(limits.bound, longest(network, project.release))
  return { found: searchGaps(project, network, { ...limits, bound }), bound, deadlock: null }
}
