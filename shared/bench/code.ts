import { tagLetters } from '#shared/tag-code'

/** A pairing code has so many letters of those that no eye takes for another: 23^8 of them, good for a few minutes. */
export const pairLength = 8
export const pairMinutes = 15

/**
 * A new pairing code.
 * @param chance gives numbers from 0 up to 1, none of which may be foreseen
 */
export const makePairCode = (chance: () => number) => Array.from({ length: pairLength }, () => tagLetters.charAt(Math.floor(chance() * tagLetters.length))).join('')

/** What was typed as the letters of a code: blanks, dashes and small letters do not matter. Null when it cannot be one. */
export function readPairCode(typed: string): string | null {
  const letters = typed.toUpperCase().replace(/[\s-]/g, '')
  return letters.length === pairLength && [...letters].every(letter => tagLetters.includes(letter)) ? letters : null
}

/** `CDF3 - GH47`: in two halves, as it is read out. */
export const pairCodeText = (code: string) => `${code.slice(0, pairLength / 2)}-${code.slice(pairLength / 2)}`
