import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import type { PlanProblem } from '#shared/planning/types'
import { readProblem } from '../solve/read-problem'
import { judged } from './clock'
import { percent } from './row'
import type { Limits } from './clock'
import type { Row } from './row'

export interface Instance { name: string, problem: PlanProblem, best: number | null, fields: string[] }

/** Cells of a line of a table that may quote cells with commas in them. */
const cellsOf = (line: string) => [...line.matchAll(/("([^"]*)"|[^,]*)(,|$)/g)].map(found => found[2] ?? found[1] ?? '')

/** The instances of a set, at most `most` of them spread over it. `best`: fewest minutes known, null when none are or it has no plan. */
export function readSet(folder: string, set: string, most: number, wanted = /./): Instance[] {
  const table = join(folder, set, 'best.csv')
  if (!existsSync(table)) return []
  const rows = readFileSync(table, 'utf8').trim().split('\n').slice(1).map(cellsOf).filter(row => wanted.test(row[0]!))
  const every = Math.max(1, rows.length / most)
  const chosen = rows.filter((_, i) => Math.floor(i / every) !== Math.floor((i - 1) / every))
  return chosen.map((fields) => {
    const name = fields[0]!
    return { name, problem: readProblem(join(folder, set, name.includes('.') ? name : `${name}.json`)), best: fields[2] ? Number(fields[2]) : null, fields }
  })
}

export interface Gap { mean: number, atBest: number, found: number, count: number, better: string[], missed: string[] }

/** A number of schedules is quickly built and says as much of the seed as of the search: the mean of several. */
const seedsFor = ({ seconds }: Limits): readonly number[] => (seconds === undefined ? [1, 2, 3, 4] : [1])

/** How far above the best known, over those with a best known and all seeds of the limits. */
export function gapOf(instances: readonly Instance[], limits: Limits): Gap {
  const gap: Gap = { mean: 0, atBest: 0, found: 0, count: 0, better: [], missed: [] }
  const runs = instances.flatMap(instance => seedsFor(limits).map(seed => ({ ...instance, seed })))
  for (const { name, problem, best, seed } of runs) {
    if (best === null) continue
    gap.count++
    const plan = judged(problem, { ...limits, seed })
    if (plan.unplaced.length > 0) {
      gap.missed.push(name)
      continue
    }
    gap.found++
    const over = plan.objective.makespan / best - 1
    gap.mean += over
    if (over <= 0) gap.atBest++
    if (over < 0) gap.better.push(`${name} ${plan.objective.makespan} (was ${best})`)
  }
  gap.mean /= Math.max(1, gap.found)
  return gap
}

const tell = (gap: Gap) => `${percent(gap.mean)} (${gap.atBest} of ${gap.count} at the best known${gap.found < gap.count ? `; no plan: ${gap.missed.join(', ')}` : ''}${gap.better.length > 0 ? `; better: ${gap.better.join(', ')}` : ''})`

interface Asked { set: string, measure: string, limits: Limits, bar: number, aim: number, over: string, wanted?: RegExp }

const projects: readonly Asked[] = [
  { set: 'j30', measure: 'J30, 1 s', limits: { seconds: 1 }, bar: 0.001, aim: 0.0002, over: 'over optimum' },
  { set: 'j30', measure: 'J30, 50,000 schedules, seeds 1 to 4', limits: { schedules: 50_000 }, bar: 0, aim: 0, over: 'over optimum' },
  { set: 'j60', measure: 'J60, 1 s', limits: { seconds: 1 }, bar: 0.0045, aim: 0.0025, over: 'over best known' },
  { set: 'j60', measure: 'J60, 5 s', limits: { seconds: 5 }, bar: 0.0025, aim: 0.0012, over: 'over best known' },
  { set: 'j120', measure: 'J120, 1 s', limits: { seconds: 1 }, bar: 0.03, aim: 0.02, over: 'over best known' },
  { set: 'j120', measure: 'J120, 5 s', limits: { seconds: 5 }, bar: 0.023, aim: 0.014, over: 'over best known' },
  { set: 'j120', measure: 'J120, 5,000 schedules, seeds 1 to 4', limits: { schedules: 5000 }, bar: 0.036, aim: 0.024, over: 'over best known' },
  { set: 'rcpsp-max', measure: 'RCPSP/max ubo10-50 and j10-j30, 1 s', limits: { seconds: 1 }, bar: 0.003, aim: 0.001, over: 'over best known, all with a plan', wanted: /^(ubo10_|ubo20_|ubo50_|j)/ },
  { set: 'rcpsp-max', measure: 'RCPSP/max ubo100 and ubo200, 1 s', limits: { seconds: 1 }, bar: NaN, aim: 0.001, over: 'over best known, all with a plan', wanted: /^(ubo100_|ubo200_)/ },
]

/** A row for each published set that is there. */
export function benchSets(folder: string, most: number, told: (row: Row) => void): void {
  for (const { set, measure, limits, bar, aim, over, wanted } of projects) {
    // What takes no seconds is asked of all.
    const instances = readSet(folder, set, limits.seconds === undefined ? Infinity : most, wanted)
    if (instances.length === 0) continue
    const gap = gapOf(instances, limits)
    const met = Number.isNaN(bar) ? null : gap.found === gap.count && gap.mean <= bar + 1e-9
    told({ measure, bar: Number.isNaN(bar) ? '' : `${percent(bar)} ${over}`, aim: percent(aim), measured: tell(gap), met })
  }
  benchInfeasible(readSet(folder, 'rcpsp-max', 99).filter(each => each.fields[4] === 'infeasible'), told)
}

function benchInfeasible(instances: readonly Instance[], told: (row: Row) => void): void {
  if (instances.length === 0) return
  const plans = instances.map(({ problem }) => judged(problem, { seconds: 1 }))
  const wrong = plans.filter(plan => plan.unplaced.length === 0).length
  const named = plans.filter(plan => plan.conflicts.some(conflict => conflict.kind === 'cycle')).length
  told({ measure: 'instances without any plan', bar: 'never a plan', aim: 'named where propagation shows it', measured: `${wrong} plans, ${named} of ${instances.length} named`, met: wrong === 0 })
}
