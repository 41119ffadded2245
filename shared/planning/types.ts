/**
 * The plan's vocabulary. Times are whole minutes from the problem's own minute 0; intervals are half-open.
 * Problems are made by `planProblem` or `fromContract`, plans by `makePlan`: both refuse what does not hold together.
 */

export type Interval = readonly [from: number, to: number]

/** Resource id to the number of units used. */
export type Uses = Readonly<Record<string, number>>

/** `count` different resources, one unit of each, out of `of`: hands by what they may do. */
export interface Choice { readonly of: readonly string[], readonly count: number }

export interface Activity {
  readonly id: string
  /** 0 or more. */
  readonly minutes: number
  readonly uses: Uses
  readonly choices: readonly Choice[]
  /** No start before this minute. */
  readonly release: number
  /** May pause while its resources are closed; it keeps them meanwhile. Not together with a family. */
  readonly splittable: boolean
  /** Must start in open time but may end after it. */
  readonly mayRunOver: boolean
}

/** Capacity in force in one interval instead of the resource's own. Intervals do not overlap. */
export interface CapacityChange { readonly from: number, readonly to: number, readonly capacity: number }

export interface Resource {
  readonly id: string
  readonly capacity: number
  /** An activity lies within one of these (touching ones count as one); null: always open. Rests do not ask. */
  readonly open: readonly Interval[] | null
  readonly changes: readonly CapacityChange[]
}

/** When the start of `to` may lie after the end of `from`: both ends allowed, `null` leaves the end open. */
export type LagWindow = readonly [from: number, to: number | null]

/** What a missed window costs: `penalty` counts in the objective, `minutes` are added to the work of `to`. */
export interface Recovery { readonly penalty: number, readonly minutes: number }

export interface Lag {
  /** `null`: counted from minute 0. */
  readonly from: string | null
  readonly to: string
  /** Sorted, apart from each other, at least one. A plain minimum is `[[min, null]]`. */
  readonly windows: readonly LagWindow[]
  /** Null: the last window may never be overrun. Else it may, at this cost. */
  readonly recovery: Recovery | null
}

/** Capacity held from the end of one activity to the real start of the other, day and night. */
export interface Rest {
  /** `null`: held since minute 0. */
  readonly from: string | null
  /** `null`: held to the horizon. */
  readonly to: string | null
  readonly uses: Uses
}

export interface ApartMember { readonly activity: string, readonly after: number }

/** No member of one side may overlap a member of the other, each counted from its start to its end plus `after`. */
export interface Apart { readonly id: string, readonly one: readonly ApartMember[], readonly other: readonly ApartMember[] }

/**
 * Like work done in one session: set-up before the first member and clean-up after the last, once.
 * `row`: one member straight after another; `together`: all start at once. The session holds the resources of one member.
 */
export interface Family {
  readonly id: string
  readonly setup: number
  readonly cleanup: number
  readonly members: readonly string[]
  readonly mode: 'row' | 'together'
  readonly maxMembers: number | null
  /** Longest time from the start of the first member to the end of the last. */
  readonly maxMinutes: number | null
}

export interface Job {
  readonly id: string
  readonly activities: readonly string[]
  readonly release: number
  readonly due: number | null
  readonly weight: number
}

/** Work in hand or promised. Its start is a fact: no calendar, capacity or lag between fixed activities is asked of it. May be negative. `begun`: in hand, so nobody is told that its time does not fit. */
export interface Fixed { readonly activity: string, readonly start: number, readonly resources: readonly string[], readonly begun?: boolean }

export const objectiveParts = ['windowsMissed', 'lateness', 'setup', 'waiting', 'moves', 'makespan'] as const
export type ObjectivePart = typeof objectiveParts[number]
export type Objective = Readonly<Record<ObjectivePart, number>>

/**
 * One missed window outweighs 10 000 late minutes, a late minute ten of set-up, one of set-up a hundred of one piece waiting (pieces are many,
 * hands few). A step moves only for half an hour of lateness: people have been told its time (planning value). Whoever wants the rest, makes
 * the plan anew.
 */
export const standardWeights: Objective = { windowsMissed: 1_000_000, lateness: 100, setup: 10, waiting: 0.1, moves: 3000, makespan: 0 }

export interface PlanProblem {
  readonly activities: readonly Activity[]
  readonly resources: readonly Resource[]
  readonly lags: readonly Lag[]
  readonly rests: readonly Rest[]
  readonly apart: readonly Apart[]
  readonly families: readonly Family[]
  readonly jobs: readonly Job[]
  readonly fixed: readonly Fixed[]
  /** Nothing ends after this minute. */
  readonly horizon: number
  /** Starts of the last plan by activity; a start that differs counts as one move. */
  readonly previous: Readonly<Record<string, number>>
  /** Who the last plan chose for it: whoever keeps its start keeps them too where it can. */
  readonly previousResources: Readonly<Record<string, readonly string[]>>
  readonly weights: Objective
}

export interface PlanEntry {
  readonly activity: string
  readonly start: number
  readonly end: number
  /** The resources chosen for `choices`, in their order; the fixed `uses` are not repeated. */
  readonly resources: readonly string[]
  /** Index in `Plan.sessions`, or null without a family. */
  readonly session: number | null
  /** Its window was missed: its minutes include the recovery. */
  readonly afterRecovery: boolean
}

/** `start` to `end` with set-up and clean-up. */
export interface PlanSession { readonly family: string, readonly start: number, readonly end: number, readonly activities: readonly string[], readonly resources: readonly string[] }

export const conflictKinds = ['too much', 'no open time', 'window closed', 'window taken', 'cycle', 'no room', 'horizon', 'fixed', 'after unplaced'] as const
export type ConflictKind = typeof conflictKinds[number]

/**
 * Why something has no start, or why a fixed start does not fit. Words are the caller's.
 * too much: it asks more of `resource` than there ever is. no open time: `resource` is never open long enough. window closed: `window` meets no open time of `resource`.
 * window taken: open, but booked. cycle: lags contradict each other. no room: `resource` is full for the rest. horizon: no start before the end of the plan.
 * fixed: a fixed start breaks `lag`, the hours or the capacity of `resource`. after unplaced: waits for `other`, which has no start.
 */
export interface Conflict {
  readonly kind: ConflictKind
  readonly activity: string
  readonly resource: string | null
  /** Index in `PlanProblem.lags`. */
  readonly lag: number | null
  /** Absolute minutes. */
  readonly window: readonly [from: number, to: number | null] | null
  readonly other: string | null
}

export interface Plan {
  readonly status: 'optimal' | 'feasible' | 'infeasible'
  /** Every activity of the problem; when infeasible, only those with a start. In the problem's order. */
  readonly entries: readonly PlanEntry[]
  readonly sessions: readonly PlanSession[]
  readonly unplaced: readonly string[]
  readonly conflicts: readonly Conflict[]
  readonly objective: Objective
  /** Sum of the objective's parts times the problem's weights. */
  readonly cost: number
  /** No plan costs less. */
  readonly bound: number
  readonly seed: number
  readonly schedules: number
  /** Milliseconds by the caller's clock; 0 without one. */
  readonly elapsed: number
}

/** Starts by activity id. */
export const startsOf = (plan: Plan): Record<string, number> => Object.fromEntries(plan.entries.map(entry => [entry.activity, entry.start]))
