import type { RoomClock, Spell } from '#shared/drying/clock'
import { trackDewPoint, trackTemp } from '#shared/air/room'
import { tabledSaturation } from '#shared/air/tables'
import { offsetAt } from '#shared/air/zone'

const quarterMs = 900_000
const dayMs = 86_400_000

function gather(times: readonly number[], excess: readonly number[]): Spell[] {
  const spells: Spell[] = []
  const crossing = (i: number) => times[i - 1]! + (times[i]! - times[i - 1]!) * excess[i - 1]! / (excess[i - 1]! - excess[i]!)
  let from: number | null = null
  for (let i = 0; i < times.length; i++) {
    const inside = excess[i]! > 0
    if (inside && from === null) from = i === 0 ? times[0]! : crossing(i)
    if (!inside && from !== null) {
      spells.push({ from, to: crossing(i) })
      from = null
    }
  }
  if (from !== null) spells.push({ from, to: times.at(-1)! })
  return spells
}

/** The past and two days ahead: the days after that repeat the second. */
function spellsOf(clock: RoomClock, key: string, excess: (tempC: number, rh: number) => number): Spell[] {
  const known = clock.spells.get(key)
  if (known) return known
  const times = [...clock.times]
  const over = times.map((_, i) => excess(clock.past.temps[i]!, clock.past.rhs[i]!))
  for (let i = 1; i <= 192; i++) {
    const at = clock.turnAt + i * quarterMs
    const tempC = trackTemp(clock.track, at)
    times.push(at)
    over.push(excess(tempC, Math.min(1, tabledSaturation(clock.air, trackDewPoint(clock.track, at)) / tabledSaturation(clock.air, tempC))))
  }
  const spells = gather(times, over)
  clock.spells.set(key, spells)
  return spells
}

/** Start of the first spell that still has `length` ms to run at or after `from`; Infinity when none comes. */
function firstSpell(clock: RoomClock, spells: readonly Spell[], from: number, length: number): number {
  if (spells.length === 0) return Infinity
  const back = Math.max(0, Math.floor((from - clock.turnAt) / dayMs)) * dayMs
  const shift = back > 0 ? back + offsetAt(clock.track.zone, from - back) - offsetAt(clock.track.zone, from) : 0
  const at = from - shift
  let low = -1
  let high = spells.length
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (spells[middle]!.to >= at) high = middle
    else low = middle
  }
  for (let i = high; i < spells.length; i++) {
    const start = Math.max(at, spells[i]!.from)
    if (spells[i]!.to - start >= length) return start + shift
  }
  return Infinity
}

/** First instant at or after `from` (ms UTC) at which the room is under a temperature, read or projected; Infinity when none comes. */
export function firstCold(clock: RoomClock, minTempC: number, from: number): number {
  const spells = spellsOf(clock, `cold ${minTempC}`, tempC => minTempC - tempC)
  return firstSpell(clock, spells, from, 0)
}

/** Start of the first half hour in a row, from `from` on, with RH at or over a ceiling (0..1); Infinity when none comes. */
export function firstDampHalfHour(clock: RoomClock, ceiling: number, from: number): number {
  // "At or over": a hair under the ceiling counts as on it, so that a reading of just the ceiling is not lost to rounding.
  const spells = spellsOf(clock, `damp ${ceiling}`, (_, rh) => rh - ceiling + 1e-6)
  return firstSpell(clock, spells, from, 30 * 60_000)
}

/** Degrees a surface must stay above the dew point for a coat to go on, or to stay on while wet (ISO 8502-4 practice). */
export const dewMarginC = 3

/** First instant from `from` on at which the air is less than 3 degrees above its dew point; Infinity when none comes. */
export function firstThinDewMargin(clock: RoomClock, from: number): number {
  const spells = spellsOf(clock, 'dew', (tempC, rh) => rh * tabledSaturation(clock.air, tempC) - tabledSaturation(clock.air, tempC - dewMarginC))
  return firstSpell(clock, spells, from, 0)
}
