import { bandRank } from '#shared/vapour/bands'
import { givesVapour, isSolventBorne, readCoat, roomInputs, ventilated } from '#shared/vapour/facts'
import type { CoatFacts, ReadCoat, RoomSetUp, UsedInput } from '#shared/vapour/facts'
import { roomVapour } from '#shared/vapour/room'
import type { VapourPeriod } from '#shared/vapour/room'
import type { RoomVapour, VentilatedRoom, WetCoat } from '#shared/vapour/types'

/** A coat that is on or planned, with the words to show it by. */
export interface NamedCoat extends CoatFacts { id: string, piece: string, material: string, planned: boolean }

/** What one coat adds: its grams, and its share of the limits at their worst (0..1 of all of them together). */
export interface Contribution { id: string, piece: string, material: string, planned: boolean, at: number, grams: number, share: number, inputs: UsedInput[] }

/** What a room's coats do to its air, with the likely figures and with the cautious ends of their doubt. mg/m3, m3/h. */
export interface RoomSums {
  likely: RoomVapour
  cautious: RoomVapour
  nowMgM3: { likely: number, cautious: number }
  /** Air that the room has, m3/h; null when nobody said. */
  hasM3PerHour: number | null
  contributions: Contribution[]
  inputs: UsedInput[]
  /** A vapour in it is spoken of in words only: whom to ask, and no figure of air. */
  askFirst: boolean
  /** Limits the sums are held against: the strictest of the coats. */
  limitMgM3: number | null
  ceilingMgM3: number | null
}

const instant = 0.01
const dayMs = 24 * 3_600_000
/** A solvent film has given off all but a ten-thousandth after four times its touch-dry (first order), and none of it is counted after a day more. */
function spent({ at, solvent, sheet, sheetTouchMinutes, foretoldTouchMinutes }: CoatFacts, now: number): boolean {
  const touch = sheet?.touchDryMinutes ?? sheetTouchMinutes
  return isSolventBorne(solvent) && touch !== null && now - at > dayMs + 4 * Math.max(touch, foretoldTouchMinutes ?? 0) * 60_000
}

const least = (values: (number | null)[]) => {
  const known = values.filter(value => value !== null)
  return known.length > 0 ? Math.min(...known) : null
}

const run = (air: VentilatedRoom, read: readonly ReadCoat[], end: 'likely' | 'cautious', period: VapourPeriod) => roomVapour(air, read.map(each => each[end]), period)

/** Shares of what is given off, each over its own limit, or of the mass where a limit is not known. */
function shares(coats: readonly WetCoat[]): number[] {
  const byLimit = coats.every(({ limits }) => limits.limitMgM3 !== null)
  const weights = coats.map(({ massGrams, limits }) => massGrams / (byLimit ? limits.limitMgM3 ?? 1 : 1))
  const sum = weights.reduce((total, weight) => total + weight, 0)
  return weights.map(weight => sum > 0 ? weight / sum : 0)
}

/**
 * The air of one room from what the studio's rows tell. Coats that give off nothing are left out.
 * @param exhaustRuns whether somebody has said that the exhaust runs: else it does not count
 * @returns null when nothing in it gives off vapour
 */
export function roomSums(setUp: RoomSetUp, exhaustRuns: boolean, all: readonly NamedCoat[], period: VapourPeriod): RoomSums | null {
  const coats = all.filter(each => givesVapour(each) && !spent(each, period.from))
  if (coats.length === 0) return null
  const air = ventilated(setUp, exhaustRuns)
  const read = coats.map(readCoat)
  const likely = run(air, read, 'likely', period)
  const doubtful = read.some(each => each.likely.massGrams !== each.cautious.massGrams)
  const atOnce = { from: period.from, hours: instant }
  const likelyNow = run(air, read, 'likely', atOnce).peakMgM3
  const parts = shares(read.map(each => each.cautious))
  return {
    likely, cautious: doubtful ? run(air, read, 'cautious', period) : likely,
    nowMgM3: { likely: likelyNow, cautious: doubtful ? run(air, read, 'cautious', atOnce).peakMgM3 : likelyNow },
    hasM3PerHour: air.airChangesPerHour === null || air.volumeM3 === null ? null : air.airChangesPerHour * air.volumeM3,
    contributions: coats.map(({ id, piece, material, planned, at }, i) => ({ id, piece, material, planned, at, grams: read[i]!.grams, share: parts[i]!, inputs: read[i]!.inputs })).sort((a, b) => b.share - a.share),
    inputs: roomInputs(setUp, air),
    askFirst: read.some(each => each.cautious.limits.textOnly !== null),
    limitMgM3: least(read.map(each => each.likely.limits.limitMgM3)),
    ceilingMgM3: least(read.map(each => each.likely.limits.ceilingMgM3)),
  }
}

/** The worst share of a health limit, mixing factor counted. */
export const worstShare = ({ healthShare, shortShare }: RoomVapour) => Math.max(healthShare, shortShare)

/** Above this share people stay out between tasks (the band "strong exhaust"). */
const stayOutShare = 0.5

/**
 * Whether a wet film keeps people out of its room until somebody has opened it: always in a spray area or a booth, else from the band that asks them
 * to stay out between tasks on, reckoned with the cautious ends, or where a vapour is spoken of in words only. A room without a ceiling never shuts.
 */
export function keepsOut(room: { outdoor: boolean, sprayArea: boolean }, coats: readonly CoatFacts[], sums: RoomSums | null): boolean {
  if (room.outdoor || !coats.some(each => isSolventBorne(each.solvent))) return false
  if (room.sprayArea || sums === null) return true
  const { cautious } = sums
  return worstShare(cautious) > stayOutShare || cautious.fire === 'sources-off' || cautious.fire === 'stop' || bandRank(cautious.band) === 2
}

/** What would bring a room's air down, as far as a figure can say it. */
export interface Levers {
  /** m3/h of rated exhaust that the sums ask for, where the room has less. */
  exhaustM3PerHour: number | null
  /** How many of the coats at once stay in the band "open up and exhaust". */
  atMost: number | null
  /** Rooms in which the same coats would ask for less. */
  rooms: string[]
  /** When what is wet now is not expected to count much any more, ms UTC. */
  after: number | null
}

/** @param others the other rooms, with what is wet in each, and whether anybody sleeps there */
export function leversFor(sums: RoomSums, coats: readonly NamedCoat[], others: readonly { name: string, outdoor: boolean, sleptIn: boolean, sums: (added: readonly NamedCoat[]) => RoomSums | null }[], wetClearAt: number | null): Levers {
  const share = worstShare(sums.cautious)
  const rank = bandRank(sums.cautious.band)
  const planned = coats.filter(coat => coat.planned)
  const needed = sums.cautious.neededM3PerHour
  const elsewhere = rank < 2 ? [] : others.filter(({ sleptIn, outdoor, sums: of }) => !sleptIn && (outdoor || bandRank(of(coats)?.cautious.band ?? 'keep-moving') < rank))
  const few = share > stayOutShare ? Math.floor(coats.length * stayOutShare / share) : null
  return {
    exhaustM3PerHour: needed !== null && (sums.hasM3PerHour === null || needed > sums.hasM3PerHour) ? needed : null,
    atMost: few !== null && few >= 1 && few < coats.length ? few : null,
    rooms: elsewhere.map(each => each.name),
    after: planned.length > 0 && planned.length < coats.length && rank >= 1 ? wetClearAt : null,
  }
}
