import { check } from '#shared/planning/check'
import type { Plan, PlanProblem } from '#shared/planning/types'
import { solve } from '../../server/planner/solve'

/** Milliseconds of processor this process has used: on a machine shared with others a second of the wall clock is anything. */
export function processor(): number {
  const { user, system } = process.cpuUsage()
  return (user + system) / 1000
}

export interface Limits { seconds?: number, schedules?: number, seed?: number }

/** Solves within so many seconds of processor or so many schedules, and lets the judge see the plan. @throws when the plan breaks a rule. */
export function judged(problem: PlanProblem, { seconds = Infinity, schedules = Infinity, seed = 1 }: Limits): Plan {
  const end = processor() + seconds * 1000
  let asked = 0
  let over = false
  const shouldStop = () => over ||= ++asked % 8 === 0 && processor() >= end
  const plan = solve(problem, { seed, schedules, shouldStop, now: processor })
  const broken = check(problem, plan)
  if (broken.length > 0) throw new Error(`A plan breaks ${broken.length} rules: ${JSON.stringify(broken.slice(0, 2))}`)
  return plan
}
