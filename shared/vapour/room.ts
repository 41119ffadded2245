import { lowestExplosiveGramsPerM3 } from '#shared/library/solvents'
import type { WeightedAir } from '#shared/vapour/air'
import { closedAirChanges, mixingFactorOf, neededFlow } from '#shared/vapour/airflow'
import { bandOf, clearShare, fireStageOf, sourcesOffShare } from '#shared/vapour/bands'
import type { Source } from '#shared/vapour/emission'
import { bendsOf, countedRate, sourceOf } from '#shared/vapour/emission'
import { positive, within } from '#shared/vapour/ranges'
import type { FireStage, RoomVapour, VapourBand, VapourInput, VentilatedRoom, WetCoat } from '#shared/vapour/types'
import { lastAbove, worstMean, worstPeak } from '#shared/vapour/worst'

const hourMs = 3_600_000
const quarterMs = 900_000
const workday = 8
const shortHours = 0.25
/** A room nobody measured counts as a small one, and a film nobody knows gives off all at once, in a minute: planning values on the cautious side. */
const assumedVolumeM3 = 20
const atOnceHours = 1 / 60

/** From an instant (ms UTC), so many hours on. `hours` above 0, up to a year. */
export interface VapourPeriod { from: number, hours: number }

interface Asked { coats: readonly WetCoat[], sources: Source[], volumeM3: number, n: number, mixing: number, assumed: VapourInput[] }

/** Completes what nobody gave, each time on the side of caution, and says what was completed. Coats that go on after the period are not counted. */
function ask(room: VentilatedRoom, all: readonly WetCoat[], { from, hours }: VapourPeriod): Asked {
  const coats = all.filter(coat => coat.at <= from + hours * hourMs)
  const assumed: VapourInput[] = []
  const known = <T>(input: VapourInput, value: T | null, otherwise: T): T => {
    if (value === null && !assumed.includes(input)) assumed.push(input)
    return value ?? otherwise
  }
  const volumeM3 = positive('volumeM3', known('volume', room.volumeM3, assumedVolumeM3))
  const n = within('airChangesPerHour', known('air changes', room.airChangesPerHour, closedAirChanges), 0, 10_000)
  const mixing = within('mixingFactor', known('mixing', room.mixingFactor, mixingFactorOf(null)), 1, 100)
  const sources = coats.map(({ at, carrier, massGrams, touchDryMinutes, limits, assumed: stoodIn }) => {
    for (const input of stoodIn ?? []) known(input, null, 0)
    known('limit', limits.limitMgM3, 0)
    known('explosive limit', limits.lelGramsM3, 0)
    const dryMinutes = known('touch-dry', touchDryMinutes, null)
    return dryMinutes === null
      ? sourceOf('solvent', massGrams, (at - from) / hourMs, atOnceHours)
      : sourceOf(carrier, massGrams, (at - from) / hourMs, dryMinutes / 60)
  })
  return { coats, sources, volumeM3, n, mixing, assumed }
}

type Weigh = (coat: WetCoat) => number

/** Shares of each kind of limit: the mixture rule adds the shares of the parts. */
const perLimit: Weigh = ({ limits }) => limits.limitMgM3 === null ? 0 : 1 / positive('limitMgM3', limits.limitMgM3)
const perCeiling: Weigh = ({ limits }) => limits.ceilingMgM3 === null ? 0 : 1 / positive('ceilingMgM3', limits.ceilingMgM3)
const perExplosive: Weigh = ({ limits }) => 1 / (1000 * positive('lelGramsM3', limits.lelGramsM3 ?? lowestExplosiveGramsPerM3))

/** The air of a room weighed by a kind of limit, mg/m3 over mg/m3. */
function weighed({ coats, sources, volumeM3, n }: Asked, weigh: Weigh): WeightedAir {
  return { sources, weights: coats.map(coat => weigh(coat) * 1000 / volumeM3), n }
}

/** A figure of a weighted sum: where all coats weigh the same, that of the plain concentration scaled, so that it is not sought again. */
function scaled(asked: Asked, weigh: Weigh, plain: number, seek: (air: WeightedAir) => number): number {
  const weights = asked.coats.map(weigh)
  const one = weights[0] ?? 0
  return weights.every(weight => weight === one) ? one * plain : seek(weighed(asked, weigh))
}

/** The most that has to be carried off at once, m3/h: coats that are wet together add up, each over its own limit, times the mixing factor. */
function airflowOf({ coats, sources, mixing }: Asked, hours: number): number {
  const bends = sources.flatMap(source => [...bendsOf(source), source.start + source.touchDry]).filter(at => at > 0 && at <= hours)
  const at = (t: number) => coats.reduce((sum, { limits }, i) => sum + (limits.limitMgM3 === null ? 0 : neededFlow(countedRate(sources[i]!, t), limits.limitMgM3, mixing)), 0)
  return Math.max(...[0, ...bends].map(at))
}

function bandFor({ coats, assumed }: Asked, share: number, fire: FireStage): VapourBand {
  const unknown: readonly VapourInput[] = ['volume', 'air changes', 'touch-dry', 'limit', 'area', 'VOC', 'spread rate']
  if (unknown.some(input => assumed.includes(input))) return 'unknown'
  const band = fire === 'stop' ? 'not-here' : bandOf(share)
  // A vapour that a sum does not speak for is never let into a milder band.
  return band !== 'not-here' && coats.some(({ limits }) => limits.textOnly !== null) ? 'unknown' : band
}

/** The later of touch-dry and of the moment the air stays under its shares, mixing factor counted once; up to the next quarter of an hour. */
function clearOf(asked: Asked, { from }: VapourPeriod): number | null {
  if (asked.coats.length === 0 || asked.assumed.includes('touch-dry') || asked.assumed.includes('limit')) return null
  let latest = Math.max(...asked.coats.map(({ at, touchDryMinutes }) => at + (touchDryMinutes ?? 0) * 60_000))
  for (const [weigh, share] of [[perLimit, clearShare], [perExplosive, sourcesOffShare]] as const) {
    const hour = lastAbove(weighed(asked, weigh), share / asked.mixing, 0)
    if (hour === null) return null
    latest = Math.max(latest, from + hour * hourMs)
  }
  return Math.ceil(latest / quarterMs) * quarterMs
}

/**
 * What all wet coats of a room together do to its air: well mixed, each coat in closed form, the sum's worst points sought stretch by stretch.
 * Coats laid before the period count with what is left of them. The worst eight hours may begin anywhere that ends in the period, and at its start
 * when it is shorter. Needed air is null, and the band unknown, when nobody said how the room's air changes; both also for a vapour that is spoken
 * of in words only, unless it is worse. `notClearBefore` is a floor, never leave to enter; null when it cannot be told or lies beyond a year.
 * @throws RangeError naming the figure that cannot be used
 */
export function roomVapour(room: VentilatedRoom, all: readonly WetCoat[], period: VapourPeriod): RoomVapour {
  within('hours', positive('hours', period.hours), 0, 366 * 24)
  const asked = ask(room, all, period)
  const { coats, mixing, assumed } = asked
  const plain = weighed(asked, () => 1)
  const lastStart = Math.max(0, period.hours - workday)
  const { at: peakHour, amount: peakMgM3, mean: peak15MgM3 } = worstPeak(plain, 0, period.hours, shortHours)
  const mean8hMgM3 = worstMean(plain, workday, 0, lastStart)
  const lelShare = scaled(asked, perExplosive, peakMgM3, air => worstPeak(air, 0, period.hours, 0).amount)
  const healthShare = mixing * scaled(asked, perLimit, mean8hMgM3, air => worstMean(air, workday, 0, lastStart))
  const shortShare = mixing * scaled(asked, perCeiling, peak15MgM3, air => worstPeak(air, 0, period.hours, shortHours).mean)
  const rated = fireStageOf(mixing * lelShare)
  const fire = rated !== 'stop' && lelShare > 0 && (['volume', 'air changes', 'touch-dry', 'area', 'VOC', 'spread rate'] as const).some(input => assumed.includes(input)) ? 'unknown' : rated
  const figure = assumed.every(input => input === 'mixing' || input === 'explosive limit') && coats.every(({ limits }) => limits.textOnly === null)
  return {
    massGrams: coats.reduce((sum, { massGrams }) => sum + massGrams, 0),
    peakMgM3,
    peakAt: peakMgM3 > 0 ? Math.round(period.from + peakHour * hourMs) : null,
    peak15MgM3,
    mean8hMgM3,
    lelShare,
    healthShare,
    shortShare,
    neededM3PerHour: figure ? airflowOf(asked, period.hours) : null,
    notClearBefore: clearOf(asked, period),
    band: bandFor(asked, Math.max(healthShare, shortShare), fire),
    fire,
    assumed,
  }
}
