import { positive, within } from '#shared/vapour/ranges'

/** Shares of their limits of vapours breathed together, added up: sum of C / L. Above 1 the mixture is over, though no part of it may be. */
export function mixtureShare(parts: readonly { mgM3: number, limitMgM3: number }[]): number {
  return parts.reduce((sum, { mgM3, limitMgM3 }) => sum + within('mgM3', mgM3, 0, Infinity) / positive('limitMgM3', limitMgM3), 0)
}

/**
 * Lower explosive limit of a mixed vapour by Le Chatelier: 1 / sum(y / LEL), y the share by volume of the vapour, LEL in one unit throughout.
 * Where a limit or a share is not known (null), the lowest of those known and of `lowest` stands for the whole.
 * @throws RangeError when the known shares do not add up to 1 (within a hundredth)
 */
export function mixedExplosiveLimit(parts: readonly { share: number | null, lel: number | null }[], lowest: number): number {
  positive('lowest', lowest)
  const known: { share: number, lel: number }[] = []
  for (const { share, lel } of parts) {
    if (share !== null && lel !== null) known.push({ share: within('share', share, 0, 1), lel: positive('lel', lel) })
  }
  if (parts.length === 0 || known.length < parts.length) return Math.min(lowest, ...parts.flatMap(({ lel }) => lel ?? []))
  within('shares together', known.reduce((sum, { share }) => sum + share, 0), 0.99, 1.01)
  return 1 / known.reduce((sum, { share, lel }) => sum + share / lel, 0)
}
