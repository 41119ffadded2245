import { evaporatingGrams } from '#shared/vapour/emission'
import type { VapourPeriod } from '#shared/vapour/room'
import type { VapourLimits, VentilatedRoom, WetCoat } from '#shared/vapour/types'
import { carriers } from '#shared/vapour/types'
import { findSolvent, librarySolvents, limitsOf } from '#shared/library/solvents'
import { coatSizes } from '#shared/terms'
import { BadField, instantAt, listAt, numberAt, objectAt, oneOfAt, optional } from '../model/fields'

/** One room of the contract, read and checked. */
export interface RoomCase { room: VentilatedRoom, coats: WetCoat[], period: VapourPeriod }

const tiny = 1e-6

function readLimits(field: string, value: unknown): VapourLimits {
  if (typeof value === 'string') {
    const found = findSolvent(value)
    if (!found) throw new BadField(`${field}: expected one of ${librarySolvents.map(({ key }) => key).join(', ')} or an object with limits, got "${value}"`)
    return limitsOf(found)
  }
  const fields = objectAt(field, value)
  const limit = (name: string, high: number) => optional(fields[name], null, v => numberAt(`${field}.${name}`, v, tiny, high))
  if (fields.limitMgM3 === undefined) throw new BadField(`${field}.limitMgM3: expected a number, or null when nobody knows it, got nothing`)
  return { limitMgM3: limit('limitMgM3', 1e9), ceilingMgM3: limit('ceilingMgM3', 1e9), lelGramsM3: limit('lelGramsM3', 1e6), textOnly: null }
}

function readCoat(field: string, value: unknown): WetCoat {
  const fields = objectAt(field, value)
  const number = (name: string, low: number, high: number) => numberAt(`${field}.${name}`, fields[name], low, high)
  return {
    at: instantAt(`${field}.at`, fields.at),
    carrier: oneOfAt(`${field}.carrier`, fields.carrier, carriers),
    massGrams: evaporatingGrams({
      vocGramsPerLitre: number('vocGramsPerLitre', 0, 2000),
      exemptGramsPerLitre: 0,
      areaM2: number('areaM2', 0, 100_000),
      spreadM2PerLitre: number('spreadM2PerLitre', 0.01, 1000),
      coat: optional(fields.coat, 'normal', v => oneOfAt(`${field}.coat`, v, coatSizes)),
      thinnerGrams: optional(fields.thinnerGrams, 0, v => numberAt(`${field}.thinnerGrams`, v, 0, 1_000_000)),
    }),
    touchDryMinutes: optional(fields.touchDryMinutes, null, () => number('touchDryMinutes', 0.1, 525_600)),
    limits: readLimits(`${field}.solvent`, fields.solvent),
  }
}

/** Reads one room of the contract. `place` names it in a list ("[2]") or is empty. Throws BadField with one line for the first field that cannot be used. */
export function readRoom(value: unknown, place: string): RoomCase {
  const at = (name: string) => [place, name].filter(Boolean).join('.') || 'case'
  const fields = objectAt(at(''), value)
  const room = objectAt(at('room'), fields.room)
  const maybe = (name: string, low: number, high: number) => optional(room[name], null, v => numberAt(at(`room.${name}`), v, low, high))
  return {
    room: { volumeM3: numberAt(at('room.volumeM3'), room.volumeM3, 0.01, 1e7), airChangesPerHour: maybe('airChangesPerHour', 0, 10_000), mixingFactor: maybe('mixingFactor', 1, 100) },
    coats: listAt(at('coats'), fields.coats).map((coat, i) => readCoat(at(`coats[${i}]`), coat)),
    period: { from: instantAt(at('from'), fields.from), hours: optional(fields.hours, 24, v => numberAt(at('hours'), v, tiny, 366 * 24)) },
  }
}
