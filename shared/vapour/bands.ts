import { within } from '#shared/vapour/ranges'
import type { FireStage, VapourBand } from '#shared/vapour/types'

/** Shares of the lowest explosive limit: above the first, ignition sources off; above the second, stop (planning values, stricter than the quarter that codes allow). */
export const sourcesOffShare = 0.025
export const stopShare = 0.1

/** The share of a health limit under which a room is no longer expected to hold much (planning value). */
export const clearShare = 0.1

/** The band of a share of the limits, mixing factor counted (planning values). `share` 0 or more. @throws RangeError for NaN and below 0 */
export function bandOf(share: number): VapourBand {
  within('share', share, 0, Infinity)
  if (share < 0.1) return 'keep-moving'
  if (share <= 0.5) return 'open-exhaust'
  return share <= 1 ? 'strong-exhaust' : 'not-here'
}

/** What a share of the lowest explosive limit asks for, mixing factor counted. @throws RangeError for NaN and below 0 */
export function fireStageOf(share: number): FireStage {
  within('share', share, 0, Infinity)
  if (share > stopShare) return 'stop'
  return share > sourcesOffShare ? 'sources-off' : 'none'
}

/** How much a band asks for, 0 to 3: what is unknown asks for as much as the worst. */
export const bandRank = (band: VapourBand) => ({ 'keep-moving': 0, 'open-exhaust': 1, 'strong-exhaust': 2, 'not-here': 3, 'unknown': 3 })[band]
