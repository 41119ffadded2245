import { planProblem } from '#shared/planning/problem'
import type { PlanProblem } from '#shared/planning/types'
import { makespanOnly } from './lines'

/**
 * Two classic job shops; a row is a job: machine, minutes, machine, ...
 * Figures and proved optima from the repository ScheduleOpt/benchmarks (jobshop/instances/text, jobshop/solutions/bks.json, commit
 * 79f0edc1a2e95ed0e3cc105e79a6d03910a6d091), CC BY-SA 4.0, https://creativecommons.org/licenses/by-sa/4.0/; laid out anew.
 */
export interface JobShop { readonly name: string, readonly rows: readonly (readonly number[])[], readonly optimum: number }

/** H. Fisher, G. L. Thompson, "Probabilistic learning combinations of local job-shop scheduling rules", in Muth and Thompson (eds.), Industrial Scheduling, Prentice-Hall, 1963, pp. 225-251. */
export const ft06: JobShop = { name: 'ft06', optimum: 55, rows: [
  [2, 1, 0, 3, 1, 6, 3, 7, 5, 3, 4, 6],
  [1, 8, 2, 5, 4, 10, 5, 10, 0, 10, 3, 4],
  [2, 5, 3, 4, 5, 8, 0, 9, 1, 1, 4, 7],
  [1, 5, 0, 5, 2, 5, 3, 3, 4, 8, 5, 9],
  [2, 9, 1, 3, 4, 5, 5, 4, 0, 3, 3, 1],
  [1, 3, 3, 3, 5, 9, 0, 10, 4, 4, 2, 1],
] }

/** S. Lawrence, "Resource constrained project scheduling: an experimental investigation of heuristic scheduling techniques", Carnegie-Mellon University, 1984. */
export const la21: JobShop = { name: 'la21', optimum: 1046, rows: [
  [2, 34, 3, 55, 5, 95, 9, 16, 4, 21, 6, 71, 0, 53, 8, 52, 1, 21, 7, 26],
  [3, 39, 2, 31, 0, 12, 1, 42, 9, 79, 8, 77, 6, 77, 5, 98, 4, 55, 7, 66],
  [1, 19, 0, 83, 3, 34, 4, 92, 6, 54, 9, 79, 8, 62, 5, 37, 2, 64, 7, 43],
  [4, 60, 2, 87, 8, 24, 5, 77, 3, 69, 7, 38, 1, 87, 6, 41, 9, 83, 0, 93],
  [8, 79, 9, 77, 2, 98, 4, 96, 3, 17, 0, 44, 7, 43, 6, 75, 1, 49, 5, 25],
  [8, 35, 7, 95, 6, 9, 9, 10, 2, 35, 1, 7, 5, 28, 4, 61, 0, 95, 3, 76],
  [4, 28, 5, 59, 3, 16, 9, 43, 0, 46, 8, 50, 6, 52, 7, 27, 2, 59, 1, 91],
  [5, 9, 4, 20, 2, 39, 6, 54, 1, 45, 7, 71, 0, 87, 3, 41, 9, 43, 8, 14],
  [1, 28, 5, 33, 0, 78, 3, 26, 2, 37, 7, 8, 8, 66, 6, 89, 9, 42, 4, 33],
  [2, 94, 5, 84, 6, 78, 9, 81, 1, 74, 3, 27, 8, 69, 0, 69, 7, 45, 4, 96],
  [1, 31, 4, 24, 0, 20, 2, 17, 9, 25, 8, 81, 5, 76, 3, 87, 7, 32, 6, 18],
  [5, 28, 9, 97, 0, 58, 4, 45, 6, 76, 3, 99, 2, 23, 1, 72, 8, 90, 7, 86],
  [5, 27, 9, 48, 8, 27, 7, 62, 4, 98, 6, 67, 3, 48, 0, 42, 1, 46, 2, 17],
  [1, 12, 8, 50, 0, 80, 2, 50, 9, 80, 3, 19, 5, 28, 6, 63, 4, 94, 7, 98],
  [4, 61, 3, 55, 6, 37, 5, 14, 2, 50, 8, 79, 1, 41, 9, 72, 7, 18, 0, 75],
] }

/** One machine at a time for each job, one job at a time on each machine; judged by when all is done. */
export function jobShopProblem({ rows }: JobShop): PlanProblem {
  const steps = rows.flatMap((row, job) => Array.from({ length: row.length / 2 }, (_, k) => ({ id: `${job}.${k}`, job, k, machine: `${row[2 * k]}`, minutes: row[2 * k + 1]! })))
  return planProblem({
    resources: [...new Set(steps.map(step => step.machine))].sort().map(id => ({ id, capacity: 1 })),
    activities: steps.map(({ id, minutes, machine }) => ({ id, minutes, uses: { [machine]: 1 } })),
    lags: steps.filter(({ k }) => k > 0).map(({ id, job, k }) => ({ from: `${job}.${k - 1}`, to: id })), weights: makespanOnly,
  })
}
