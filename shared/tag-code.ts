/**
 * The letters of a tag's code: none that a hand or an eye takes for another (no B, I, L, O, S, U, Z, 0, 1, 2, 5) and no vowels, so that no word
 * comes about. Twenty-three of them, a prime, which the check letter rests on.
 */
export const tagLetters = '346789CDFGHJKMNPQRTVWXY'
export const tagLength = 5

const valueOf = (letter: string) => tagLetters.indexOf(letter)

/** Every place weighs differently, so one wrong letter or two that changed places never come out even. ISO 7064 rests on the same thought. */
const weighed = (letters: string) => [...letters].reduce((sum, letter, place) => sum + (place + 1) * valueOf(letter), 0)

/** The check letter of four others. */
function checkLetter(letters: string): string {
  const wanted = [...tagLetters].find(letter => weighed(letters + letter) % tagLetters.length === 0)
  return wanted ?? ''
}

/**
 * A new code of five letters, the last of them a check.
 * @param chance gives numbers from 0 up to 1, as Math.random does
 */
export function makeTagCode(chance: () => number): string {
  const letters = Array.from({ length: tagLength - 1 }, () => tagLetters.charAt(Math.floor(chance() * tagLetters.length))).join('')
  return letters + checkLetter(letters)
}

/** Why typed letters are no code: how many are wanted, a letter that no code has, or letters that do not fit together. */
export type TagMistake = { why: 'length', count: number } | { why: 'letter', letter: string } | { why: 'check' }

/** What somebody typed or a tag's path holds, as a code: blanks, dashes and small letters do not matter. */
export function readTagCode(typed: string): { code: string } | TagMistake {
  const letters = typed.toUpperCase().replace(/[\s-]/g, '')
  const stray = [...letters].find(letter => valueOf(letter) < 0)
  if (stray !== undefined) return { why: 'letter', letter: stray }
  if (letters.length !== tagLength) return { why: 'length', count: letters.length }
  return weighed(letters) % tagLetters.length === 0 ? { code: letters } : { why: 'check' }
}

export const isTagCode = (text: string) => 'code' in readTagCode(text) && text.length === tagLength && text === text.toUpperCase()

/** Where a tag leads: a path of this installation, so that a phone's camera opens it. */
export const tagPath = (code: string) => `/tag/${code}`
