import type { Ground } from '#shared/terms'
import type { CoatCase } from '#shared/drying/types'
import type { RateTable, RoomClock } from '#shared/drying/clock'
import { gainedBy, momentOf, rateTable } from '#shared/drying/clock'
import type { PreparedMaterial } from '#shared/drying/material'
import { windShare } from '#shared/drying/rates'

/** A coat's stay in one room's air, ms UTC; the last span has `toAt` null. Spans follow one another and start at the application. */
export interface AirSpan { clock: RoomClock, fromAt: number, toAt: number | null }

/** Speed taken for "the air moves" when nobody measured it, m/s: a planning value. */
export const movingAirSpeed = 1

/** How thick a coat of each size lies, as a multiple of a normal one (planning values). */
export const coatFactor = { thin: 0.7, normal: 1, full: 1.5, flood: 2.5 } as const
const groundFactor: Record<Ground, number> = { 'porous': 0.35, 'primed': 1, 'sealed': 1.8, 'non-absorbent': 1.8 }

/** A stretch of one coat's life with one room, one wind and one lid: sheet minutes gained per unit of the table's force. */
interface Stretch { table: RateTable, pace: number, from: number, to: number, start: number }

/** How many times slower than a normal coat on a primed ground each rung goes: the model's h. */
export function rungSlowness(material: PreparedMaterial, coat: CoatCase): number[] {
  return material.rungs.map((rung, i) => {
    const thick = coatFactor[coat.size] ** rung.exponent
    const soaks = i === 0 && (rung.driver === 'water' || rung.driver === 'solvent')
    const waits = rung.name === 'cured' ? 1 + 0.3 * (coat.uncuredBeneath ?? 0) : 1
    return thick * (soaks ? groundFactor[coat.ground] : 1) * waits
  })
}

interface Piece { clock: RoomClock, from: number, to: number, airSpeed: number, covered: boolean }

function piecesOf(coat: CoatCase, spans: readonly AirSpan[]): Piece[] {
  const pieces: Piece[] = []
  const cuts: number[] = []
  for (const note of coat.notes ?? []) {
    if (note.kind !== 'moving' && note.kind !== 'covered') continue
    cuts.push(note.fromAt)
    if (note.toAt !== null) cuts.push(note.toAt)
  }
  const inForce = (kind: string, at: number) => (coat.notes ?? []).some(n => n.kind === kind && n.fromAt <= at && (n.toAt === null || at < n.toAt))
  for (const span of spans) {
    const from = Math.max(span.fromAt, coat.appliedAt)
    const to = span.toAt ?? Infinity
    if (to <= from) continue
    const edges = [from, ...cuts.filter(at => at > from && at < to).sort((a, b) => a - b), to]
    for (let i = 0; i + 1 < edges.length; i++) {
      const start = edges[i]!
      const still = coat.airSpeed ?? 0.1
      const airSpeed = inForce('moving', start) ? Math.max(still, movingAirSpeed) : still
      pieces.push({ clock: span.clock, from: start, to: edges[i + 1]!, airSpeed, covered: inForce('covered', start) })
    }
  }
  return pieces
}

/** One coat climbing its ladder: for every rung its stretches, its slowness, and when the ladder arrives at its top. */
export interface Climb {
  material: PreparedMaterial
  appliedAt: number
  slowness: number[]
  stretches: Stretch[][]
  /** ms UTC at which the common path reaches each rung's typical at log speed 0; Infinity when never. */
  reach: number[]
  /** Force gained, on the rung's own stretches, when the rung began. */
  began: number[]
}

function gained(stretches: readonly Stretch[], at: number): number {
  let sum = 0
  for (const s of stretches) {
    if (at <= s.from) break
    sum += (gainedBy(s.table, at < s.to ? at : s.to) - s.start) * s.pace
  }
  return sum
}

function arrival(stretches: readonly Stretch[], amount: number): number {
  let left = amount
  for (const s of stretches) {
    if (s.pace > 0) {
      const at = Math.max(s.from, momentOf(s.table, s.start + left / s.pace))
      if (at <= s.to) return at
      left -= (gainedBy(s.table, s.to) - s.start) * s.pace
    }
  }
  return Infinity
}

/** Sets a coat on its ladder in the air it stands in. Throws RangeError when no span covers the application onwards. */
export function climb(material: PreparedMaterial, coat: CoatCase, spans: readonly AirSpan[]): Climb {
  const pieces = piecesOf(coat, spans)
  if (pieces.length === 0) throw new RangeError('spans: expected the air the coat stands in from its application on')
  const slowness = rungSlowness(material, coat)
  const stretches: Stretch[][] = []
  const reach: number[] = []
  const began: number[] = []
  let at = coat.appliedAt
  let below = 0
  for (const [i, rung] of material.rungs.entries()) {
    const own = pieces.map(({ clock, from, to, airSpeed, covered }): Stretch => {
      const table = rateTable(clock, rung.driver, material)
      const pace = covered && rung.driver === 'oxidation' ? 0 : windShare(rung.driver, airSpeed) / rung.referenceForce / 60_000
      return { table, pace, from, to, start: gainedBy(table, from) }
    })
    const start = at === Infinity ? Infinity : gained(own, at)
    at = start === Infinity ? Infinity : Math.max(at, arrival(own, start + (rung.typical - below) * slowness[i]!))
    below = rung.typical
    stretches.push(own)
    began.push(start)
    reach.push(at)
  }
  return { material, appliedAt: coat.appliedAt, slowness, stretches, reach, began }
}

/** Instant at which the clock that stays on `rung` for ever shows `minutes` reference minutes; Infinity when never. */
export function instantOf(way: Climb, minutes: number, rung: number): number {
  if (!(minutes > 0)) return way.appliedAt
  const { rungs } = way.material
  let i = 0
  while (i < rung && rungs[i]!.typical < minutes) i++
  const below = i > 0 ? rungs[i - 1]!.typical : 0
  if (way.began[i] === Infinity) return Infinity
  const at = arrival(way.stretches[i]!, way.began[i]! + (minutes - below) * way.slowness[i]!)
  return i > 0 ? Math.max(at, way.reach[i - 1]!) : at
}

/** Reference minutes the clock that stays on `rung` for ever shows at an instant: 0 at the application. */
export function minutesAt(way: Climb, at: number, rung: number): number {
  let i = 0
  while (i < rung && way.reach[i]! < at) i++
  const below = i > 0 ? way.material.rungs[i - 1]!.typical : 0
  if (at <= way.appliedAt) return 0
  return below + Math.max(0, gained(way.stretches[i]!, at) - way.began[i]!) / way.slowness[i]!
}
