import { readdirSync, statSync } from 'node:fs'
import { basename, join } from 'node:path'
import { parseArgs } from 'node:util'
import { BadField } from './model/fields'
import { isProblemFile, readProblem } from './solve/read-problem'
import { lineOf, solveWithin } from './solve/solve-file'
import type { SolveLimits } from './solve/solve-file'

const usage = `npm run --silent solve -- FILE|FOLDER [--seconds 1] [--schedules N] [--seed 1]

Plans a problem and prints one line of JSON for each file: { "file", "status", "makespan", "starts", "bound", "schedules", "seconds" }.
FILE is a project of the scheduling library (.sm), one with longest waits (.sch), or our own .json; of a FOLDER, all of these in it.
"starts" is in the file's own order of activities; for .json an object by id, with "objective".
"status": optimal, feasible, infeasible (certain, with "conflicts"), or unknown (no plan was found).

Ends with 0, or with 2 and one line naming what cannot be used.`

function filesOf(path: string | undefined): string[] {
  const stat = path === undefined ? undefined : statSync(path, { throwIfNoEntry: false })
  if (path === undefined || !stat) throw new BadField(`FILE: expected a file or a folder, got ${path === undefined ? 'nothing' : JSON.stringify(path)}`)
  if (!stat.isDirectory()) return [path]
  const files = readdirSync(path).filter(isProblemFile).sort((a, b) => a.localeCompare(b, 'en', { numeric: true })).map(name => join(path, name))
  if (files.length === 0) throw new BadField(`${path}: expected a folder with .sm, .sch or .json files`)
  return files
}

function numberOf(name: string, text: string | undefined, whole: boolean, least: number): number | null {
  if (text === undefined) return null
  const value = Number(text)
  if (text.trim() === '' || !Number.isFinite(value) || value < least || (whole && !Number.isInteger(value))) throw new BadField(`--${name}: expected a ${whole ? 'whole ' : ''}number of at least ${least}, got "${text}"`)
  return value
}

function main(args: string[]): number {
  try {
    const { values, positionals } = parseArgs({
      args, allowPositionals: true, options: { seconds: { type: 'string' }, schedules: { type: 'string' }, seed: { type: 'string' }, help: { type: 'boolean', short: 'h' } },
    })
    if (values.help) {
      console.log(usage)
      return 0
    }
    if (positionals.length > 1) throw new BadField(`FILE: expected one file or folder, got ${positionals.length}`)
    const limits: SolveLimits = {
      seconds: numberOf('seconds', values.seconds, false, 0), schedules: numberOf('schedules', values.schedules, true, 1), seed: numberOf('seed', values.seed, true, 0) ?? 1,
    }
    for (const file of filesOf(positionals[0])) {
      const problem = readProblem(file)
      console.log(lineOf(basename(file), problem, solveWithin(problem, limits)))
    }
    return 0
  }
  catch (error) {
    const bad = error instanceof BadField || (error instanceof TypeError && 'code' in error)
    if (!bad) throw error
    console.error(error.message.split('\n')[0])
    return 2
  }
}

process.exitCode = main(process.argv.slice(2))
