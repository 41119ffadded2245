import { readFileSync } from 'node:fs'
import { extname } from 'node:path'
import { fromContract } from '#shared/planning/contract'
import { PlanError } from '#shared/planning/refuse'
import type { PlanProblem } from '#shared/planning/types'
import { BadField } from '../model/fields'
import { readProgen } from './read-progen'
import { readPsplib } from './read-psplib'

/** Kinds of files that hold a problem, by their ending. */
const readers: Readonly<Record<string, (text: string) => PlanProblem>> = { '.sm': readPsplib, '.sch': readProgen, '.json': text => fromContract(JSON.parse(text)) }

export const isProblemFile = (file: string): boolean => extname(file) in readers

/** Reads a problem from a file of a known kind. @throws BadField with one line that names the field or line. */
export function readProblem(file: string): PlanProblem {
  const read = readers[extname(file)]
  if (!read) throw new BadField(`${file}: expected a file ending in ${Object.keys(readers).join(', ')}`)
  let text: string
  try {
    text = readFileSync(file, 'utf8')
  }
  catch {
    throw new BadField(`${file}: expected a file that can be read`)
  }
  try {
    return read(text)
  }
  catch (error) {
    if (error instanceof SyntaxError) throw new BadField(`${file}: expected JSON`)
    if (error instanceof PlanError || error instanceof BadField) throw new BadField(`${file}: ${error.message}`)
    throw error
  }
}
