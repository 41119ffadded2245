const minute = 60_000
const day = 24 * 60 * minute

export const pinLength = { least: 4, most: 8 } as const
/** So many wrong PINs in a row lock one, each further one for twice as long as the last. */
export const wrongPins = 5

/** Why some digits are no PIN; null when they are one. */
export function pinProblem(pin: string): 'length' | 'digits' | 'guessed' | null {
  if (!/^\d*$/.test(pin)) return 'digits'
  if (pin.length < pinLength.least || pin.length > pinLength.most) return 'length'
  const steps = [...pin].slice(1).map((digit, at) => Number(digit) - Number(pin[at]))
  const [first] = steps
  // All the same, or a run up or down: what everybody tries first.
  return first !== undefined && Math.abs(first) <= 1 && steps.every(step => step === first) ? 'guessed' : null
}

/**
 * For how long a PIN is locked after so many wrong ones in a row, ms: not at all before the fifth, then a quarter of an hour,
 * twice as long with each further one, a day at most.
 * @param wrong 0 and up, this one counted
 */
export function pinLockMs(wrong: number): number {
  if (wrong < wrongPins) return 0
  return Math.min(day, 15 * minute * 2 ** Math.min(wrong - wrongPins, 10))
}
