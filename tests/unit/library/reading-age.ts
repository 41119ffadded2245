/** Words of the trade that the rules below count wrong. */
const counted: Record<string, number> = { area: 3, areas: 3, isocyanate: 5, isocyanates: 5, safety: 2 }

/** Syllables of an English word: runs of vowels, without a silent e at the end and with the endings that are said. At least one. */
export function syllables(word: string): number {
  const letters = word.toLowerCase().replace(/[^a-z]/g, '')
  if (counted[letters] !== undefined) return counted[letters]
  if (letters.length <= 3) return 1
  const said = letters
    .replace(/([^laeiouy]|[aeiou]l)es$|([^td]|^)ed$|([^l])e$/, (_, es = '', ed = '', e = '') => es + ed + e)
    .replace(/^y/, '')
  const runs = said.match(/[aeiouy]+/g)?.length ?? 1
  return Math.max(1, runs + (said.match(/(?<![cst])i[ao](?!u)|(?<=[aeiou])ing|ua/g)?.length ?? 0))
}

/**
 * Reading age in years: the Flesch-Kincaid grade plus the five years before school.
 * Grade = 0.39 words/sentences + 11.8 syllables/words - 15.59: Kincaid, Fishburne, Rogers and Chissom,
 * "Derivation of new readability formulas for Navy enlisted personnel", Research Branch Report 8-75 (1975).
 */
export function readingAge(text: string): number {
  const sentences = text.split(/[.:;?]+(?:\s|$)/).filter(part => /[a-z]/i.test(part)).length
  const words = text.split(/[\s-]+/).filter(part => /[a-z0-9]/i.test(part))
  const spoken = words.reduce((sum, word) => sum + syllables(word), 0)
  return 0.39 * words.length / sentences + 11.8 * spoken / words.length - 15.59 + 5
}
