import { readFileSync } from 'node:fs'
import { BadField } from './fields'

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

/**
 * A command that works out one case, or a list of cases, from a file or from standard input and prints JSON. `place` names a case in a list ("[2]")
 * or is empty. Gives the exit code: 0, or 2 after one line naming the field that cannot be used.
 */
export function runCommand(args: readonly string[], usage: string, work: (value: unknown, place: string) => unknown): number {
  const [source] = args
  if (source === '--help' || source === '-h') {
    console.log(usage)
    return 0
  }
  try {
    if (source === undefined || args.length > 1) throw new BadField('FILE: expected one file, or - for standard input')
    const input = readInput(source)
    const result = Array.isArray(input) ? input.map((one, i) => work(one, `[${i}]`)) : work(input, '')
    process.stdout.write(`${JSON.stringify(result, null, 2)}\n`)
    return 0
  }
  catch (error) {
    if (!(error instanceof BadField)) throw error
    console.error(error.message)
    return 2
  }
}
