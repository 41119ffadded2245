import * as z from 'zod/mini'

/** Weather of one instant: ms UTC, degrees Celsius, a share 0..1. */
export interface WeatherHour { at: number, tempC: number, rh: number }

/** Where the weather outside comes from: hours that were and hours that are foretold, in no order. Whatever serves it is behind this. */
interface WeatherSource { hours(): Promise<WeatherHour[]> }

const answerMs = 10_000
const mostHours = 1000

const answer = z.object({
  hours: z.array(z.object({ at: z.iso.datetime(), tempC: z.number().check(z.gte(-40), z.lte(60)), rh: z.number().check(z.gte(0), z.lte(1)) })).check(z.maxLength(mostHours)),
})

/**
 * Weather from an address that answers with `{ "hours": [{ "at": "2026-04-07T10:00:00Z", "tempC": 11.2, "rh": 0.71 }] }`, at most 1,000 of them. A service that speaks
 * otherwise goes behind a small translator of the studio's own. Throws an Error with one sentence when there is no such answer.
 */
export function addressSource(address: string): WeatherSource {
  return {
    async hours() {
      const response = await fetch(address, { signal: AbortSignal.timeout(answerMs), headers: { accept: 'application/json' } })
      if (!response.ok) throw new Error(`The weather's address answered with ${response.status}.`)
      const read = answer.safeParse(await response.json())
      if (!read.success) throw new Error('The weather\'s address answered with something else than hours of temperature and humidity.')
      return read.data.hours.map(({ at, tempC, rh }) => ({ at: Date.parse(at), tempC, rh }))
    },
  }
}
