import { equilibriumMoisture } from '#shared/air/equilibrium'

const dayMs = 86_400_000
/** How fast a part takes on the moisture of the air around it: the rest of the way falls to 1/e in so long. Planning value; sources ask for one to two weeks. */
export const settlingMs = 7 * dayMs
/** Percentage points of moisture from which glue joints are to wait. Planning value: some 10 points of humidity. */
const apartPoints = 2
const coldest = -5

/** Air a part has lain in from an instant (ms UTC) on, up to the next. Degrees Celsius, a share 0..1. */
export interface LainIn { fromAt: number, tempC: number, rh: number }

/**
 * Moisture of wood or board at `now`, per cent of the dry weight: it began at rest in the first air and has followed each since, by an exponential of seven days.
 * Null when nothing is known. Air under -5 °C counts as -5 °C, where the published equation ends.
 */
export function boardMoistureNow(lain: readonly LainIn[], now: number): number | null {
  const known = lain.filter(each => each.fromAt <= now).sort((a, b) => a.fromAt - b.fromAt)
  return known.reduce<number | null>((moisture, { fromAt, tempC, rh }, i) => {
    const rest = equilibriumMoisture(Math.max(coldest, tempC), rh)
    if (moisture === null) return rest
    const hours = (known[i + 1]?.fromAt ?? now) - fromAt
    return rest + (moisture - rest) * Math.exp(-hours / settlingMs)
  }, null)
}

/** When parts that far from rest are near enough for glue, ms UTC; null when they are already. Percentage points. */
export function readyForGlue(moisture: number, rest: number, now: number): number | null {
  const apart = Math.abs(moisture - rest)
  return apart < apartPoints ? null : now + settlingMs * Math.log(apart / apartPoints)
}
