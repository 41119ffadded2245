import { existsSync, writeFileSync } from 'node:fs'
import { cpus } from 'node:os'
import { parseArgs } from 'node:util'
import { benchClassics } from './bench-plan/classics'
import { benchLag } from './bench-plan/lag'
import { benchMemory } from './bench-plan/memory'
import { benchReplan } from './bench-plan/replan'
import { tableOf } from './bench-plan/row'
import { benchSets } from './bench-plan/sets'
import { benchFirstPlans } from './bench-plan/studio'
import { benchWeeks } from './bench-plan/weeks'
import type { Row } from './bench-plan/row'

const usage = `npm run bench:plan [-- --data FOLDER] [--most N] [--write]

Measures the planner against the published sets of FOLDER (or of STILLWET_PLANNING_DATA, or ../shared/data/planning) and on invented
studios, and prints a table with bars and aims. --most: at most so many instances of each set. --write: also to docs/benchmarks.md.
Without the folder the classic instances kept here are used. Seconds are seconds of processor. Run it on a quiet machine.`

const target = 'docs/benchmarks.md'

function document(rows: readonly Row[], folder: string | null, most: number): string {
  const machine = `${cpus()[0]?.model ?? 'unknown'} x ${cpus().length}, one used, node ${process.version}, seed 1 unless said`
  const sets = folder === null ? 'The published sets were not there.' : `Published sets: ${most >= 99 ? 'every instance of the open half' : `at most ${most} instances of each, spread over it; every one where schedules are counted`}.`
  return `# Benchmarks of the planner\n\nMade by \`npm run bench:plan -- --write\`. Machine: ${machine}. Seconds are seconds of processor. Every plan passed the judge. ${sets}\n\n${tableOf(rows)}\n`
}

async function main(args: string[]): Promise<number> {
  const { values } = parseArgs({ args, options: { data: { type: 'string' }, most: { type: 'string' }, write: { type: 'boolean' }, help: { type: 'boolean', short: 'h' } } })
  if (values.help) {
    console.log(usage)
    return 0
  }
  const asked = values.data ?? process.env.STILLWET_PLANNING_DATA ?? '../shared/data/planning'
  const folder = existsSync(asked) ? asked : null
  if (folder === null) console.log(`${asked}: there is no such folder; only the classic instances kept here are measured.`)
  const most = Number(values.most ?? 99)
  const rows: Row[] = []
  const told = (row: Row) => {
    rows.push(row)
    console.log(`${row.met === null ? '-' : row.met ? 'kept' : 'MISSED'} ${row.measure}: ${row.measured} (bar ${row.bar}, aim ${row.aim})`)
  }
  benchFirstPlans(told)
  benchMemory(told)
  benchReplan(told)
  await benchLag(told)
  benchClassics(told)
  benchWeeks(folder, told)
  if (folder !== null) benchSets(folder, most, told)
  if (values.write) writeFileSync(target, document(rows, folder, most))
  console.log(`\n${tableOf(rows)}`)
  return 0
}

process.exitCode = await main(process.argv.slice(2))
