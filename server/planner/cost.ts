import { none } from './model'
import type { Board } from './board'
import type { Model } from './model'
import type { Seat } from './seat'

/** Costs what lies on a board as `objectiveOf` and `costOf` do, in numbers: it is asked after every change. */
export class Cost {
  private readonly jobAt: Int32Array
  private readonly jobOf: Int32Array
  private readonly previous: Int32Array
  private readonly ready: Int32Array

  constructor(private readonly model: Model) {
    const { problem, size, index } = model
    this.jobAt = new Int32Array(problem.jobs.length + 1)
    problem.jobs.forEach((job, j) => { this.jobAt[j + 1] = this.jobAt[j]! + job.activities.length })
    this.jobOf = Int32Array.from(problem.jobs.flatMap(job => job.activities.map(id => index.get(id)!)))
    this.previous = Int32Array.from(problem.activities, activity => problem.previous[activity.id] ?? unknown)
    this.ready = new Int32Array(size)
  }

  of(board: Board, seats: readonly Seat[]): number {
    const { weights } = this.model.problem
    let penalty = 0
    for (let i = 0; i < seats.length; i++) penalty += seats[i]!.penalty
    let cost = penalty * weights.windowsMissed + this.lateness(board) * weights.lateness + this.spanAndMoves(board)
    if (weights.waiting > 0) cost += this.waiting(board) * weights.waiting
    if (weights.setup > 0) for (const session of board.sessions) cost += (this.model.problem.families[session.family]!.setup + this.model.problem.families[session.family]!.cleanup) * weights.setup
    return cost
  }

  /** Weighted minutes late of one job. */
  jobLateness(board: Board, job: number): number {
    const { due, weight } = this.model.problem.jobs[job]!
    if (due === null) return 0
    let end = -Infinity
    for (let k = this.jobAt[job]!; k < this.jobAt[job + 1]!; k++) {
      const activity = this.jobOf[k]!
      if (board.placed[activity] && board.end[activity]! > end) end = board.end[activity]!
    }
    return end > due ? weight * (end - due) : 0
  }

  private lateness(board: Board): number {
    let sum = 0
    for (let job = 0; job < this.model.problem.jobs.length; job++) sum += this.jobLateness(board, job)
    return sum
  }

  private spanAndMoves(board: Board): number {
    const { size, problem: { weights } } = this.model
    let makespan = 0
    let moves = 0
    for (let i = 0; i < size; i++) {
      if (!board.placed[i]) continue
      if (board.end[i]! > makespan) makespan = board.end[i]!
      if (this.previous[i] !== unknown && this.previous[i] !== board.start[i]) moves++
    }
    return makespan * weights.makespan + moves * weights.moves
  }

  private waiting(board: Board): number {
    const { lags, size, isFixed } = this.model
    const { ready } = this
    ready.fill(unknown)
    for (let i = 0; i < lags.length; i++) {
      const { from, to, waits } = lags[i]!
      if (from !== none && !board.placed[from]) continue
      const at = (from === none ? 0 : board.end[from]!) + waits[0]!
      if (at > ready[to]!) ready[to] = at
    }
    let sum = 0
    for (let i = 0; i < size; i++) if (ready[i] !== unknown && board.placed[i] && !isFixed[i]) sum += Math.max(0, board.start[i]! - ready[i]!)
    return sum
  }
}

const unknown = -0x7fffffff
