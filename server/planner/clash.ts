import { none } from './model'
import { never } from './profile'
import type { Board } from './board'
import type { Mode } from './model'
import type { Attempt, Failure } from './place'
import type { Edge, Unit, UnitNode } from './units'
import type { Conflict, PlanProblem } from '#shared/planning/types'

const nothing = { resource: null, lag: null, window: null, other: null }

const idOf = (board: Board, unit: Unit, node: number) => board.model.problem.activities[unit.nodes[node]!.members[0]!]!.id

/** Waits for something that has no start. */
export const nameFollower = (board: Board, unit: Unit, node: number, victim: number): Conflict => ({
  ...nothing, kind: 'after unplaced', activity: idOf(board, unit, node), other: idOf(board, unit, victim),
})

const most = (problem: PlanProblem, resource: number) => Math.max(problem.resources[resource]!.capacity, ...problem.resources[resource]!.changes.map(change => change.capacity))

function tooMuch(problem: PlanProblem, mode: Mode): number | null {
  const i = mode.resources.findIndex((resource, k) => mode.amounts[k]! > most(problem, resource))
  return i < 0 ? null : mode.resources[i]!
}

const longest = (open: readonly (readonly [number, number])[] | null) => open ? Math.max(0, ...open.map(([from, to]) => to - from)) : never

/** The resource that is open for the shortest stretch. */
function tightest(problem: PlanProblem, mode: Mode): number | null {
  const sorted = [...mode.resources].filter(resource => problem.resources[resource]!.open).sort((a, b) => longest(problem.resources[a]!.open) - longest(problem.resources[b]!.open))
  return sorted[0] ?? null
}

/** Clashes of the activity with the resources alone, whatever else is booked. */
function nameAlone(problem: PlanProblem, node: UnitNode): Pick<Conflict, 'kind' | 'resource'> | null {
  const name = (resource: number | null) => resource === null ? null : problem.resources[resource]!.id
  const short = node.modes.map(mode => tooMuch(problem, mode))
  if (short.every(resource => resource !== null)) return { kind: 'too much', resource: name(short[0] ?? null) }
  const total = node.mayRunOver || node.splittable ? Math.min(1, node.length) : node.setup + node.length + node.cleanup
  const able = node.modes.some(mode => mode.open.some((to, i) => i % 2 === 1 && to - mode.open[i - 1]! >= total))
  return able ? null : { kind: 'no open time', resource: name(node.modes[0] ? tightest(problem, node.modes[0]) : null) }
}

/** Longest paths over the edges alone: still growing after as many rounds as there are nodes means the lags contradict each other. */
function contradicts(unit: Unit): boolean {
  const at = unit.nodes.map(() => 0)
  for (let round = 0; round <= unit.nodes.length; round++) {
    let grew = false
    for (const { from, to, waits } of unit.edges) {
      if (from === none || to === none) continue
      const longestWait = waits.at(-1)!
      const earliest = at[from]! + unit.nodes[from]!.length + waits[0]!
      const latest = longestWait === never ? -never : at[to]! - longestWait - unit.nodes[from]!.length
      if (earliest > at[to]!) [at[to], grew] = [earliest, true]
      else if (latest > at[from]!) [at[from], grew] = [latest, true]
    }
    if (!grew) return false
  }
  return true
}

function opensWithin(node: UnitNode, mode: Mode, from: number, to: number): boolean {
  for (let i = 0; i < mode.open.length; i += 2) {
    const begin = Math.max(mode.open[i]! + node.setup, from)
    const end = node.mayRunOver || node.splittable ? begin + Math.min(1, node.length) : begin + node.length + node.cleanup
    if (begin <= to && end <= mode.open[i + 1]!) return true
  }
  return false
}

function nameWindow(attempt: Attempt, node: UnitNode, edge: Edge): Omit<Conflict, 'activity'> {
  const { problem } = attempt.board.model
  const lag = edge.lag === none ? null : edge.lag
  const fixed = edge.lag === none ? null : problem.lags[edge.lag]![edge.to === none ? 'to' : 'from']
  if (edge.to === none) return { ...nothing, kind: 'fixed', lag, other: fixed }
  const origin = attempt.origin.get(edge) ?? 0
  const last = edge.waits.at(-1)!
  const window = [origin + edge.waits[0]!, last === never ? null : origin + last] as const
  const open = node.modes.some(mode => edge.waits.some((from, i) => i % 2 === 0 && opensWithin(node, mode, origin + from, origin + edge.waits[i + 1]!)))
  const resource = open || !node.modes[0] ? null : tightest(problem, node.modes[0])
  return { ...nothing, kind: open ? 'window taken' : 'window closed', lag, window, other: fixed, resource: resource === null ? null : problem.resources[resource]!.id }
}

/** What kept an activity from having a start, for a person to read. The clash that pushed it counts before where it was pushed to. */
export function nameClash(attempt: Attempt, failure: Failure): Conflict {
  const { board, unit } = attempt
  const cause = failure.blame ?? failure.cause
  const activity = idOf(board, unit, cause.node)
  const node = unit.nodes[cause.node]!
  const alone = nameAlone(board.model.problem, node)
  if (alone) return { ...nothing, ...alone, activity }
  if (contradicts(unit)) return { ...nothing, kind: 'cycle', activity, lag: cause.edge && cause.edge.lag !== none ? cause.edge.lag : null }
  if (cause.edge) return { ...nameWindow(attempt, node, cause.edge), activity }
  if (cause.resource !== null) return { ...nothing, kind: 'no room', activity, resource: board.model.problem.resources[cause.resource]!.id }
  return { ...nothing, kind: 'horizon', activity }
}

function outsideHours(problem: PlanProblem, id: string, start: number, end: number): boolean {
  const open = problem.resources.find(resource => resource.id === id)!.open
  return open !== null && !open.some(([from, to]) => start >= from && end <= to)
}

/** Fixed starts from minute 0 on of work that nobody has begun, and that do not fit the hours, the capacity or each other. They stay where they are; somebody should know. */
export function nameFixed(board: Board): Conflict[] {
  const { model } = board
  const { problem } = model
  const found: Conflict[] = []
  const begun = new Set(problem.fixed.flatMap(fixed => fixed.begun || fixed.start < 0 ? model.index.get(fixed.activity)! : []))
  for (const fixed of problem.fixed) {
    if (begun.has(model.index.get(fixed.activity)!)) continue
    const i = model.index.get(fixed.activity)!
    const uses = [...Object.keys(problem.activities[i]!.uses), ...fixed.resources]
    for (const id of new Set(uses)) {
      const over = board.profiles[model.resourceIndex.get(id)!]!.blockedUntil(fixed.start, model.fixedEnd[i]!, 0) !== null
      if (over || outsideHours(problem, id, fixed.start, model.fixedEnd[i]!)) found.push({ ...nothing, kind: 'fixed', activity: fixed.activity, resource: id })
    }
  }
  for (const lag of model.lags) {
    if (!model.isFixed[lag.to] || (lag.from !== none && !model.isFixed[lag.from]) || begun.has(lag.to)) continue
    const wait = model.fixedStart[lag.to]! - (lag.from === none ? 0 : model.fixedEnd[lag.from]!)
    const inside = lag.waits.some((from, i) => i % 2 === 0 && wait >= from && wait <= lag.waits[i + 1]!)
    if (!inside) found.push({ ...nothing, kind: 'fixed', activity: problem.activities[lag.to]!.id, lag: lag.lag, other: lag.from === none ? null : problem.activities[lag.from]!.id })
  }
  return found
}
