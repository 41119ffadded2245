import type { AirTables } from '#shared/air/tables'
import { tabledSaturation } from '#shared/air/tables'
import { offsetAt } from '#shared/air/zone'
import type { RoomClock, Spell } from '#shared/drying/clock'
import { dewMarginC } from '#shared/air/margin'

const dayMs = 86_400_000

/** By how much the air meets a condition: it does while this is over 0. `limit` is the condition's own figure. */
type Excess = (tempC: number, rh: number, limit: number, air: AirTables) => number

/** The past and two days ahead: the days after that repeat the second. */
function spellsOf(clock: RoomClock, key: string, excess: Excess, limit: number): Spell[] {
  const known = clock.spells.get(key)
  if (known) return known
  const { times, past, ahead, tools } = clock
  const spells: Spell[] = []
  let from = Infinity
  let before = 0
  let beforeAt = clock.since
  const all = times.length + ahead.times.length
  for (let i = 0; i < all; i++) {
    const j = i - times.length
    const at = j < 0 ? times[i]! : ahead.times[j]!
    const now = j < 0 ? excess(past.temps[i]!, past.rhs[i]!, limit, tools.air) : excess(ahead.air.temps[j]!, ahead.air.rhs[j]!, limit, tools.air)
    const crossing = i === 0 ? at : beforeAt + (at - beforeAt) * before / (before - now)
    if (now > 0 && from === Infinity) from = crossing
    if (now <= 0 && from < Infinity) {
      spells.push({ from, to: crossing })
      from = Infinity
    }
    before = now
    beforeAt = at
  }
  if (from < Infinity) spells.push({ from, to: beforeAt })
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

const underLimit: Excess = (tempC, _rh, limit) => limit - tempC
// "At or over": a hair under the ceiling counts as on it, so that a reading of just the ceiling is not lost to rounding.
const atCeiling: Excess = (_tempC, rh, limit) => rh - limit + 1e-6
const nearDew: Excess = (tempC, rh, limit, air) => rh * tabledSaturation(air, tempC) - tabledSaturation(air, tempC - limit)

/** First instant at or after `from` (ms UTC) at which the room is under a temperature, read or projected; Infinity when none comes. */
export function firstCold(clock: RoomClock, minTempC: number, from: number): number {
  return firstSpell(clock, spellsOf(clock, `cold ${minTempC}`, underLimit, minTempC), from, 0)
}

/** Start of the first half hour in a row, from `from` on, with RH at or over a ceiling (0..1); Infinity when none comes. */
export function firstDampHalfHour(clock: RoomClock, ceiling: number, from: number): number {
  return firstSpell(clock, spellsOf(clock, `damp ${ceiling}`, atCeiling, ceiling), from, 30 * 60_000)
}

/** First instant from `from` on at which the air is less than 3 degrees above its dew point; Infinity when none comes. */
export function firstThinDewMargin(clock: RoomClock, from: number): number {
  return firstSpell(clock, spellsOf(clock, 'dew', nearDew, dewMarginC), from, 0)
}
