import type { DryingMaterial } from '#shared/drying/types'
import { checkpoints } from './benches'
import type { CellResult, Tally } from './cell'
import { fullCoats } from './cell'
import type { World } from './worlds'

export interface Cell { world: World, material: DryingMaterial, name: string, result: CellResult }

const sum = (tallies: readonly Tally[]) => tallies.reduce((all, t) => ({ times: all.times + t.times, early: all.early + t.early, none: all.none + t.none, likelier: all.likelier + t.likelier, ratio: all.ratio + t.ratio }), { times: 0, early: 0, none: 0, likelier: 0, ratio: 0 })
const percent = (share: number) => `${(100 * share).toFixed(1).padStart(5)}%`
const within = (value: number, low: number, high: number) => value >= low && value <= high ? ' ' : '!'
const earlyOf = (tallies: readonly Tally[]) => {
  const { times, early } = sum(tallies)
  return times === 0 ? '     - ' : `${percent(early / times)}${within(early / times, 0.07, 0.13)}`
}

/** Share of coats for which give-till came too early. */
export function earlyShare(tallies: readonly Tally[]): number {
  const { times, early } = sum(tallies)
  return early / times
}

/** Bars of mean give-till over likely after 20 fully tested coats; the third world has none. */
const ratioBars: Record<string, number> = { offset: 1.35, scatter: 1.65 }

/** Share of coats for which give-till came too early, by world: the table the bars are about. "!" marks a miss. */
export function summaryLines(cells: readonly Cell[], worlds: readonly World[]): string[] {
  const lines = [`give-till too early (bar 7 to 13 %), after coats:        ${checkpoints.map(n => String(n).padStart(6)).join(' ')}`]
  for (const world of worlds) {
    const own = cells.filter(c => c.world === world)
    for (const kind of ['tested', 'untested'] as const) {
      lines.push(`  ${world.name.padEnd(8)} ${kind.padEnd(9)}${' '.repeat(35)}${checkpoints.map((_, c) => earlyOf(own.flatMap(cell => cell.result[kind][c]!))).join('')}`)
    }
  }
  for (const world of worlds) {
    const own = cells.filter(c => c.world === world)
    const { ratio, times, early, none } = sum(own.flatMap(c => c.result.full))
    const bar = ratioBars[world.name]
    const { learner, sheet, mean, times: errors } = own.reduce((all, { result: { errors: e } }) => ({ times: all.times + e.times, learner: all.learner + e.learner, sheet: all.sheet + e.sheet, mean: all.mean + e.mean }), { times: 0, learner: 0, sheet: 0, mean: 0 })
    lines.push(`  ${world.name.padEnd(8)} give-till/likely after ${fullCoats} fully tested coats ${(ratio / times).toFixed(2)}${bar === undefined ? '' : ` (bar ${bar})${within(ratio / times, 0, bar)}`}, too early ${percent(early / times)}, without a time ${none}`)
    lines.push(`  ${world.name.padEnd(8)} likely off after 12 coats ${percent(learner / errors)}, sheet ${percent(sheet / errors)}, sheet x mean ${percent(mean / errors)}${world.name === 'scatter' ? '' : ` (bar half of the sheet, and below the mean)${learner <= sheet / 2 && learner < mean ? ' ' : '!'}`}`)
  }
  return lines
}

/** The same by material and rung: tested | untested at each checkpoint. */
export function rungLines(cells: readonly Cell[]): string[] {
  return cells.flatMap(({ world, material, name, result }) => [
    `${world.name}, ${name}: tested | untested, after ${checkpoints.join(', ')} coats; ratio after ${fullCoats}`,
    ...material.milestones.map((rung, k) => {
      const row = (kind: 'tested' | 'untested') => checkpoints.map((_, c) => earlyOf([result[kind][c]![k]!])).join('')
      const { ratio, times } = result.full[k]!
      return `  ${rung.name.padEnd(20)} ${row('tested')} | ${row('untested')}  ${(ratio / times).toFixed(2)}`
    }),
  ])
}
