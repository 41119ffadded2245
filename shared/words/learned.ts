import type { BandWire, LearnedRungWire, LearnedWire } from '#shared/schemas/learned'
import { sheetTime } from '#shared/words/materials'
import { milestoneText } from '#shared/words/steps'

export const learnedFields = { forget: 'Say whether the tests so far are forgotten or counted again.' } as const

const tests = (count: number) => count === 1 ? '1 touch test' : `${count} touch tests`

export const learnedWords = {
  title: 'What your bench has taught',
  failed: 'What the tests teach could not be fetched.',
  waiting: 'Fetching what the tests teach',
  none: 'Nobody has touch-tested it here yet: the times are the sheet’s. After a dozen coats they are your own.',
  key: 'Pale bar: the sheet. Dark bar: your bench. Each mark is a touch test: a filled one says reached by then, an open one not yet. Ages are at the sheet’s climate.',
  sheet: 'sheet',
  bench: 'your bench',
  reset: 'Forget the tests so far',
  resetAsk: 'Forget what the tests so far have taught?',
  resetSays: 'The times go back to the sheet’s. The tests stay on their pieces, and you can count them again.',
  countAgain: 'Count the earlier tests again',
  tin: 'A new tin is open',
  tinAsk: 'Is a new tin open?',
  tinSays: 'Tests of the tins before then count half: the next tin may be quicker or slower.',
  resetSince: (when: string) => `Tests before ${when} are forgotten.`,
  tinSince: (when: string) => `Newest tin ${when}.`,
} as const

const times = (factor: number) => (factor < 1 ? 1 / factor : factor).toFixed(1)

/** "Your bench: 1.3 times slower than the sheet, from 14 touch tests." Within a twentieth nobody notices the difference. */
export function speedText({ tests: count, speed }: Pick<LearnedWire, 'tests' | 'speed'>): string {
  if (speed === null || count === 0) return learnedWords.none
  const way = Math.abs(Math.log(speed.median)) < Math.log(1.05) ? 'about as fast as the sheet' : `${times(speed.median)} times ${speed.median > 1 ? 'slower' : 'faster'} than the sheet`
  return `Your bench: ${way}, from ${tests(count)}.`
}

/** "Give it till was too early 1 time in 14": of the tests made at or after it. Null while nobody has tested so late. */
export function coverageText({ early, of }: LearnedWire['coverage']): string | null {
  if (of === 0) return null
  if (early === 0) return of === 1 ? 'The one test made at or after “give it till” found it reached.' : `All ${of} tests made at or after “give it till” found it reached.`
  return `“Give it till” was too early ${early} ${early === 1 ? 'time' : 'times'} in ${of} tests made at or after it.`
}

const band = ({ low, typical, high }: BandWire) => `${sheetTime(typical)}, ${sheetTime(low)} to ${sheetTime(high)}`

/** The picture of one rung in words: both bands and every test. */
export function rungWords({ name, sheet, bench, tests: bounds }: LearnedRungWire): string {
  const own = bench === null ? '' : ` Your bench: ${band(bench)}.`
  const told = bounds.map(test => `${test.reached ? 'reached by' : 'not yet at'} ${sheetTime(test.minutes)}${test.weight < 0.5 ? ' (counts little)' : ''}`)
  return `${milestoneText(name)}. Sheet: ${band(sheet)}.${own}${told.length > 0 ? ` Tests: ${told.join('; ')}.` : ' No tests.'}`
}
