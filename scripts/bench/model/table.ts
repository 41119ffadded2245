import type { DryingMaterial } from '#shared/drying/types'
import { checkpoints } from './benches'
import type { CellResult, Tally } from './cell'
import { fullCoats } from './cell'
import type { World } from './worlds'

export interface Cell { world: World, material: DryingMaterial, name: string, rooms: readonly CellResult[] }

const sum = (tallies: readonly Tally[]) => tallies.reduce((all, t) => ({ times: all.times + t.times, early: all.early + t.early, none: all.none + t.none, likelier: all.likelier + t.likelier, ratio: all.ratio + t.ratio }), { times: 0, early: 0, none: 0, likelier: 0, ratio: 0 })
const percent = (share: number) => `${(100 * share).toFixed(1).padStart(5)}%`
const within = (value: number, low: number, high: number) => value >= low && value <= high ? ' ' : '!'
/** Share of coats for which give-till came too early, from tallies by room, and its standard error: benches of one room go wrong together, so rooms are counted, not coats. */
export function earlyShare(rooms: readonly (readonly Tally[])[]): { share: number, error: number } | null {
  const { times, early } = sum(rooms.flat())
  if (times === 0) return null
  const share = early / times
  const squares = rooms.map(sum).reduce((all, room) => all + (room.early - share * room.times) ** 2, 0)
  return { share, error: Math.sqrt(squares * rooms.length / (rooms.length - 1)) / times }
}

const earlyOf = (rooms: readonly (readonly Tally[])[], withError: boolean) => {
  const found = earlyShare(rooms)
  if (!found) return '     - '
  return `${percent(found.share)}${withError ? ` ±${(100 * found.error).toFixed(1)}` : ''}${within(found.share, 0.07, 0.13)}`
}

/** Tallies of some cells by room: of tested or untested rungs at a checkpoint. */
export const atCheckpoint = (cells: readonly Cell[], kind: 'tested' | 'untested', checkpoint: number) => cells.flatMap(cell => cell.rooms.map(room => room[kind][checkpoint]!))

/** Bars of mean give-till over likely after 20 fully tested coats; the third world has none. */
const ratioBars: Record<string, number> = { offset: 1.35, scatter: 1.65 }

/** Share of coats for which give-till came too early, by world: the table the bars are about. "!" marks a miss. */
export function summaryLines(cells: readonly Cell[], worlds: readonly World[]): string[] {
  const lines = [`give-till too early, ± its standard error (bar 7 to 13 %), after coats: ${checkpoints.map(n => String(n).padStart(11)).join(' ')}`]
  for (const world of worlds) {
    const own = cells.filter(c => c.world === world)
    for (const kind of ['tested', 'untested'] as const) {
      lines.push(`  ${world.name.padEnd(8)} ${kind.padEnd(9)}${' '.repeat(50)}${checkpoints.map((_, c) => earlyOf(atCheckpoint(own, kind, c), true)).join('')}`)
    }
  }
  for (const world of worlds) {
    const own = cells.filter(c => c.world === world)
    const { ratio, times, none } = sum(own.flatMap(c => c.rooms.flatMap(room => room.full)))
    const bar = ratioBars[world.name]
    const { learner, sheet, mean, times: errors } = own.flatMap(c => c.rooms).reduce((all, { errors: e }) => ({ times: all.times + e.times, learner: all.learner + e.learner, sheet: all.sheet + e.sheet, mean: all.mean + e.mean }), { times: 0, learner: 0, sheet: 0, mean: 0 })
    lines.push(`  ${world.name.padEnd(8)} give-till/likely after ${fullCoats} fully tested coats ${(ratio / times).toFixed(3)}${bar === undefined ? '' : ` (bar ${bar})${within(ratio / times, 0, bar)}`}, too early ${earlyOf(own.flatMap(c => c.rooms.map(room => room.full)), true)}, without a time ${none}`)
    lines.push(`  ${world.name.padEnd(8)} likely off after 12 coats ${percent(learner / errors)}, sheet ${percent(sheet / errors)}, sheet x mean ${percent(mean / errors)}${world.name === 'scatter' ? '' : ` (bar half of the sheet, and below the mean)${learner <= sheet / 2 && learner < mean ? ' ' : '!'}`}`)
  }
  return lines
}

/** The same by material and rung: tested | untested at each checkpoint. */
export function rungLines(cells: readonly Cell[]): string[] {
  return cells.flatMap(({ world, material, name, rooms }) => [
    `${world.name}, ${name}: tested | untested, after ${checkpoints.join(', ')} coats; ratio after ${fullCoats}`,
    ...material.milestones.map((rung, k) => {
      const row = (kind: 'tested' | 'untested') => checkpoints.map((_, c) => earlyOf(rooms.map(room => [room[kind][c]![k]!]), false)).join('')
      const { ratio, times } = sum(rooms.map(room => room.full[k]!))
      return `  ${rung.name.padEnd(20)} ${row('tested')} | ${row('untested')}  ${(ratio / times).toFixed(2)}`
    }),
  ])
}
