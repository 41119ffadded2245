import { fleschKincaid } from 'flesch-kincaid'
import { syllable } from 'syllable'

/** Words that the package gives a syllable too many or too few. */
const heard: Record<string, number> = { safety: 2, isocyanate: 5 }
const syllablesOf = (word: string) => heard[word.toLowerCase().replace(/[^a-z]/g, '')] ?? Math.max(1, syllable(word))

/**
 * Reading age in years: the Flesch-Kincaid grade, with syllables counted by the same well-kept family of packages, plus the five years before school.
 * A colon or semicolon ends a sentence here, as it does for somebody reading in a workshop.
 */
export function readingAge(text: string): number {
  const sentence = text.split(/[.:;?]+(?:\s|$)/).filter(part => /[a-z]/i.test(part)).length
  const words = text.split(/[\s-]+/).filter(part => /[a-z0-9]/i.test(part))
  return fleschKincaid({ sentence, word: words.length, syllable: words.reduce((sum, word) => sum + syllablesOf(word), 0) }) + 5
}
