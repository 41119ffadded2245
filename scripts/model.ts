import { readFileSync } from 'node:fs'
import { dryingTools } from '#shared/drying/tools'
import { BadField } from './model/fields'
import { readCase } from './model/read-case'
import { runCase } from './model/run-case'

const usage = `npm run --silent model -- FILE.json | -

Predicts when a coat dries: reads one case, or a list of cases, from a file or from standard input (-),
and prints the result, or the list of results, as one JSON value. Uses no database.

A case: { "material": "<starter id>" or a material written out, "appliedAt": ISO, "coat": "thin|normal|full|flood",
  "ground": "porous|primed|sealed|non-absorbent", "airSpeed": m/s, "zone": IANA, "heated": true, "nightDropC": 4,
  "readings": [{ "at": ISO, "tempC": 20, "rh": 0..1 }], "usual": { "tempC", "rh" },
  "tests": [{ "at": ISO, "milestone", "reached" }], "history": [earlier coats], "theta": fixed log speed, "now": ISO }

Ends with 0, or with 2 and one line naming the field that cannot be used.`

function readInput(source: string): unknown {
  let text: string
  try {
    text = readFileSync(source === '-' ? 0 : source, 'utf8')
  }
  catch {
    throw new BadField(`${source}: expected a file that can be read`)
  }
  try {
    return JSON.parse(text)
  }
  catch {
    throw new BadField(`${source === '-' ? 'standard input' : source}: expected JSON`)
  }
}

function main(args: readonly string[]): number {
  const [source] = args
  if (source === '--help' || source === '-h') {
    console.log(usage)
    return 0
  }
  try {
    if (source === undefined || args.length > 1) throw new BadField('FILE: expected one file, or - for standard input')
    const input = readInput(source)
    const tools = dryingTools()
    const cases = Array.isArray(input) ? input.map((one, i) => readCase(one, `[${i}]`)) : [readCase(input, '')]
    const results = cases.map(one => runCase(one, tools))
    process.stdout.write(`${JSON.stringify(Array.isArray(input) ? results : results[0], null, 2)}\n`)
    return 0
  }
  catch (error) {
    if (!(error instanceof BadField)) throw error
    console.error(error.message)
    return 2
  }
}

process.exitCode = main(process.argv.slice(2))
