import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import type { BenchTest } from '#shared/drying/learn'
import { learnBench } from '#shared/drying/learn'
import type { PreparedMaterial } from '#shared/drying/material'
import { withLearned } from '#shared/drying/material'
import { nightShape } from '#shared/air/shape'
import { checkpoints } from './benches'
import { chanceOf } from './chance'
import type { Cell } from './table'
import { atCheckpoint, earlyShare } from './table'
import type { World } from './worlds'

const width = 640
const height = 280
const left = 56
const bottom = 236
const ink = '#20303a'
const lines: Record<string, string> = { offset: '', scatter: '7 5', tins: '2 4' }

const text = (x: number, y: number, says: string, anchor = 'start') => `<text x="${x}" y="${y}" text-anchor="${anchor}" fill="${ink}">${says}</text>`
const frame = (title: string, inside: readonly string[]) => `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${width} ${height}" role="img" font-family="sans-serif" font-size="13"><title>${title}</title><rect width="${width}" height="${height}" fill="#f7f4ec"/>${inside.join('')}</svg>\n`

/** How often give-till came too early on tested rungs, by coats, one line a world, over the bar's band. */
export function earlyPicture(cells: readonly Cell[], worlds: readonly World[]): string {
  const x = (i: number) => left + 40 + i * 96
  const y = (share: number) => bottom - share * 1200
  const inside = [`<rect x="${left}" y="${y(0.13)}" width="${width - left - 20}" height="${y(0.07) - y(0.13)}" fill="#d8dfd3"/>`, text(width - 24, y(0.075), 'bar 7 to 13 %', 'end')]
  for (const share of [0, 0.05, 0.1, 0.15]) inside.push(text(left - 8, y(share) + 4, `${share * 100} %`, 'end'))
  for (const [i, coats] of checkpoints.entries()) inside.push(text(x(i), bottom + 20, String(coats), 'middle'))
  inside.push(text(width / 2, height - 6, 'coats of this bench, each rung tested once a coat by somebody who happened by', 'middle'))
  for (const [w, world] of worlds.entries()) {
    const points = checkpoints.map((_, c) => `${x(c)},${y(earlyShare(atCheckpoint(cells.filter(cell => cell.world === world), 'tested', c))?.share ?? 0)}`)
    inside.push(`<polyline points="${points.join(' ')}" fill="none" stroke="${ink}" stroke-width="2.5" stroke-dasharray="${lines[world.name] ?? ''}"/>`)
    inside.push(`<line x1="${left + 20 + w * 120}" x2="${left + 56 + w * 120}" y1="20" y2="20" stroke="${ink}" stroke-width="2.5" stroke-dasharray="${lines[world.name] ?? ''}"/>`, text(left + 62 + w * 120, 24, world.name))
  }
  return frame('How often give-till came too early', inside)
}

/** One rung of one slow, even bench: the sheet's band and the bench's after so many coats, and each test as a bound. */
export function bandPicture(sheet: PreparedMaterial, rung: number): string {
  const chance = chanceOf(4)
  const x = (log: number) => left + 40 + (log + 1.3) * 185
  const tests: BenchTest[] = []
  const rows = [0, 1, 3, 6, 12].map((coats) => {
    while (tests.length < coats) {
      const log = chance.between(Math.log(0.3), Math.log(4))
      tests.push({ rung, coat: tests.length, log, reached: 0.4 + 0.12 * chance.normal() <= log, weight: 1, extra: 0.01 })
    }
    const bench = learnBench(sheet.rungs.map(r => r.quantiles), tests)
    return { coats, values: (bench.kind === 'learned' ? withLearned(sheet, bench) : sheet).rungs[rung]!.quantiles.values.map(row => row[0]!) }
  })
  const inside = rows.flatMap(({ coats, values }, i) => {
    const y = 26 + i * 30
    return [text(left + 26, y + 13, `${coats} coats`, 'end'), `<rect x="${x(values[0]!)}" y="${y}" width="${x(values[2]!) - x(values[0]!)}" height="18" fill="#b9b2a0"/>`, `<rect x="${x(values[1]!) - 2}" y="${y - 3}" width="4" height="24" fill="${ink}"/>`]
  })
  for (const { log, reached } of tests) inside.push(`<path d="M${x(log)} 190 l${reached ? -9 : 9} 8 l${reached ? 9 : -9} 8 Z" fill="${reached ? ink : '#f7f4ec'}" stroke="${ink}" stroke-width="2"/>`)
  inside.push(`<line x1="${x(0.4)}" x2="${x(0.4)}" y1="20" y2="210" stroke="#9a3324" stroke-width="2" stroke-dasharray="4 4"/>`, text(x(0.4) + 6, 222, 'what this bench really takes'))
  for (const factor of [0.5, 1, 2, 4]) inside.push(text(x(Math.log(factor)), bottom + 14, `${factor} x`, 'middle'))
  inside.push(text(width / 2, height - 6, 'time over the sheet\'s typical; filled: reached by then, open: not yet', 'middle'))
  return frame('A slow, even bench learns from bounds', inside)
}

/** The night of an unheated room as it is taken before the room has a pattern of its own: a reading at five, 14 C, a drop of 4. */
export function nightPicture(): string {
  const shape = nightShape(4)
  const at = (hour: number) => 14 + shape[(hour % 24) * 4]! - shape[17 * 4]!
  const x = (hour: number) => left + 10 + (hour - 17) * 24
  const y = (tempC: number) => 30 + (15 - tempC) * 26
  const hours = Array.from({ length: 24 }, (_, i) => 17 + i)
  const inside = [`<polyline points="${hours.map(h => `${x(h)},${y(at(h))}`).join(' ')}" fill="none" stroke="${ink}" stroke-width="2.5" stroke-dasharray="7 5"/>`, `<circle cx="${x(17)}" cy="${y(14)}" r="5" fill="${ink}"/>`]
  for (const tempC of [9, 11, 13, 15]) inside.push(text(left - 8, y(tempC) + 4, `${tempC} °C`, 'end'), `<line x1="${left}" x2="${width - 20}" y1="${y(tempC)}" y2="${y(tempC)}" stroke="#d5cfc0"/>`)
  for (const hour of [18, 21, 24, 27, 30, 33, 36, 39]) inside.push(text(x(hour), bottom + 20, `${String(hour % 24).padStart(2, '0')}:00`, 'middle'))
  return frame('The night ahead of one reading', inside)
}

export function writePictures(folder: string, pictures: Record<string, string>) {
  for (const [name, picture] of Object.entries(pictures)) writeFileSync(join(folder, name), picture)
}
