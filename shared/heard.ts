/** A device whose clock is off by more than this is read by the studio's clock. ms. */
const clockSlackMs = 60_000

/** What the studio says over the live stream with every change and every 20 seconds: its revision, and its clock in ms UTC. */
export interface Word { revision: number, at: number }

/**
 * By how much the studio's clock is before (positive) or behind a device's, ms; 0 within a minute. A clock that is
 * right has the answer's own time between question and answer, however long a sleeping device took to read it.
 * @param askedAt by the device's clock, ms UTC
 * @param at by the studio's clock, ms UTC
 * @param answeredAt by the device's clock, ms UTC
 */
export function clockShift(askedAt: number, at: number, answeredAt: number): number {
  if (at - askedAt < -clockSlackMs) return at - askedAt
  return at - answeredAt > clockSlackMs ? at - answeredAt : 0
}

/**
 * When a page that shows `shown` has heard from the studio by this word, ms UTC by the device's clock; null when the
 * word proves nothing about what is shown: the studio has moved on since, or a sleeping device or a proxy held the word
 * back. Then the state has to be asked for.
 * @param shown revision and time of the state on the page
 * @param now ms UTC by the device's clock
 * @param shift as from `clockShift`
 */
export function heardBy(word: Word, shown: Word | null, now: number, shift: number): number | null {
  const saidAt = word.at - shift
  const isShown = shown !== null && (word.revision === shown.revision || word.at <= shown.at)
  return isShown && Math.abs(now - saidAt) <= clockSlackMs ? Math.min(now, saidAt) : null
}
