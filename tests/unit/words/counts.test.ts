import { resolve } from 'node:path'
import { pathToFileURL } from 'node:url'
import { describe, expect, it } from 'vitest'
import { filesBelow } from '../codebase/files'

type Says = (...numbers: number[]) => unknown

/** Every function of the catalogue by file and name, those inside of its objects too. */
async function catalogue(): Promise<{ name: string, says: Says }[]> {
  const found = await Promise.all(filesBelow('shared/words', /\.ts$/).map(async (file) => {
    const module = await import(/* @vite-ignore */ pathToFileURL(resolve(file)).href) as Record<string, unknown>
    const inside = Object.entries(module).flatMap(([name, value]) => typeof value === 'object' && value !== null ? Object.entries(value).map(([key, each]): [string, unknown] => [`${name}.${key}`, each]) : [[name, value] as [string, unknown]])
    return inside.flatMap(([name, value]) => typeof value === 'function' ? [{ name: `${file}: ${name}`, says: value as Says }] : [])
  }))
  return found.flat()
}

/** What it says of some numbers; null for what takes something else. */
function said(says: Says, numbers: readonly number[]): string | null {
  try {
    const text = says(...numbers)
    return typeof text === 'string' && /\d/.test(text) ? text : null
  }
  catch {
    return null
  }
}

const nouns = 'piece|step|batch|layer|act|material|reading|line|test|film|coat|place|hook|tag|sheet|part|day|window|minute|figure|room|thing|caution|tap|reason|square|photograph|name|tablet|person|shelf|way'
const severals = nouns.split('|').map(noun => noun === 'batch' ? 'batches' : noun === 'person' ? 'people' : noun === 'shelf' ? 'shelves' : `${noun}s`).join('|')
/** "1 pieces", "1 more windows", "1 data sheets". */
const oneAsMany = new RegExp(`(?<![\\d.:,])1 (?:[a-z]+ )?(?:${severals})\\b`)
/** "2 piece" and "0 step", where the noun ends the phrase. */
const manyAsOne = new RegExp(`(?<![\\d.:,])[02] (?:more |other |earlier )?(?:${nouns})\\b(?! [a-z]+s\\b)`)
const isWrong = (text: string) => oneAsMany.test(text) || manyAsOne.test(text)

describe('counts', () => {
  it('are heard when they are wrong', () => {
    expect(['1 steps are done', '1 of 1 data sheets', '2 piece.', '0 more batch', '1 step is done', '2 of 2 pieces', '11 steps', '0 steps'].map(isWrong)).toEqual([true, true, true, true, false, false, false, false])
  })
  it('of one are told as one, of none and of two as several', async () => {
    const all = (await catalogue()).filter(({ says }) => says.length > 0 && says.length <= 3)
    const texts = [[1, 1, 1], [0, 0, 0], [2, 2, 2], [1, 2, 2], [2, 1, 1]].flatMap(numbers => all.flatMap(({ name, says }) => {
      const text = said(says, numbers)
      return text === null ? [] : [{ name, text }]
    }))
    expect(texts.length).toBeGreaterThan(300)
    expect(texts.filter(({ text }) => isWrong(text)).map(({ name, text }) => `${name}: ${text}`)).toEqual([])
  })
})
