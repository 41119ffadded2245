import { positive, within } from '#shared/vapour/ranges'

/** A well-mixed room with a steady release: grams an hour, cubic metres, cubic metres an hour, and how many times slower than mixed its air really changes. */
export interface SteadyRoom { gramsPerHour: number, volumeM3: number, flowM3PerHour: number, mixingFactor: number }

/** Air changes an hour: flow over volume. */
export function airChanges(flowM3PerHour: number, volumeM3: number): number {
  return within('flowM3PerHour', flowM3PerHour, 0, Infinity) / positive('volumeM3', volumeM3)
}

/** mg/m3 after `hours` from clean air: C = G / Q' (1 - e^(-Q' t / V)), Q' = Q / K, and G t / V without any flow. */
export function buildUp({ gramsPerHour, volumeM3, flowM3PerHour, mixingFactor }: SteadyRoom, hours: number): number {
  const changed = airChanges(flowM3PerHour, volumeM3) / within('mixingFactor', mixingFactor, 1, 100) * within('hours', hours, 0, Infinity)
  const given = 1000 * within('gramsPerHour', gramsPerHour, 0, Infinity) * hours / volumeM3
  return changed === 0 ? given : given * -Math.expm1(-changed) / changed
}

/**
 * Hours until an empty room with no source has thinned from `from` to `to` (one unit): t = -(V / Q) ln(C2 / C1) K. A figure for an empty room only;
 * it says nothing of a room with a coat in it, and is no leave to go in. Null when no air moves. 0 when it is there already.
 */
export function purgeHours(airChangesPerHour: number, from: number, to: number, mixingFactor: number): number | null {
  positive('to', to)
  positive('from', from)
  within('mixingFactor', mixingFactor, 1, 100)
  if (within('airChangesPerHour', airChangesPerHour, 0, Infinity) === 0) return null
  return Math.max(0, Math.log(from / to)) / airChangesPerHour * mixingFactor
}

/** Cubic metres an hour that a room changes when a puff of something harmless takes `halfLifeHours` to fall to half: Q = ln 2 V / t. */
export function flowFromHalfLife(volumeM3: number, halfLifeHours: number): number {
  return Math.LN2 * positive('volumeM3', volumeM3) / positive('halfLifeHours', halfLifeHours)
}
