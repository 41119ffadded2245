import { temperatureText } from '#shared/units'
import { milestoneText } from '#shared/words/steps'
import type { RateWire } from '#shared/schemas/rate'

export const fields = { coats: 'Name the coats by their numbers, such as 3,4.' } as const

const percent = (share: number) => `${Math.round(share * 100)} % humidity`

/** Within a twentieth of 1 nobody notices the difference. */
const counts = (factor: number) => Math.abs(Math.log(factor)) > Math.log(1.05)

/** "0.41 of sheet speed: 78 % humidity": what the times rest on now. A factor of 0 stands still. */
export function rateText(rate: RateWire, units: 'metric' | 'us' = 'metric'): string {
  const air = rate.assumed ? ' (nobody has read the air here: the studio’s usual is taken)' : ''
  const head = `${rate.material}, towards ${milestoneText(rate.towards)}`
  if (rate.factor <= 0.005) return `${head}: stands still at ${temperatureText(rate.tempC, units)}, ${percent(rate.rh)}${air}.`
  const pulls = (part: number) => counts(part) && Math.sign(Math.log(part)) === Math.sign(Math.log(rate.factor))
  const causes = [
    ...pulls(rate.warmth) ? [temperatureText(rate.tempC, units)] : [],
    ...pulls(rate.damp) ? [percent(rate.rh)] : [],
  ]
  if (!counts(rate.factor) || causes.length === 0) return `${head}: as fast as its sheet says, at ${temperatureText(rate.tempC, units)}, ${percent(rate.rh)}${air}.`
  return `${head}: ${rate.factor.toFixed(2)} of sheet speed: ${causes.join(', ')}${air}.`
}

export const rateWords = {
  ask: 'Why these times',
  wait: 'Asking the studio',
  failed: 'The reasons could not be fetched.',
  none: 'Nothing on it has times to explain.',
} as const
