import type { Film, Moment, PartFacts } from '#shared/verdict/types'

export const minute = 60_000
/** An instant of the test day by its hour: `hour(14.5)` is half past two. */
export const hour = (hours: number) => Date.UTC(2026, 2, 3) + hours * 60 * minute

/** A rung whose likely and 90 % times lie before its 98 % time. */
export function moment(p98At: number, changes: Partial<Moment> = {}): Moment {
  return { likelyAt: p98At - 60 * minute, p90At: p98At - 20 * minute, p98At, reachedAt: null, reason: null, ...changes }
}

/** A rung that cannot be promised: too damp, with or without a likely time. */
export function unpromised(likelyAt: number | null): Moment {
  return { likelyAt, p90At: null, p98At: null, reachedAt: null, reason: 'too-damp' }
}

/** A coat of paint: set to touch 12:00, tack-free 13:00, dry to handle 14:00, hard 16:00, cured 20:00. */
export function film(changes: Partial<Film> = {}): Film {
  return {
    coatId: 1, material: 'a paint', kind: 'coat',
    touch: moment(hour(12)), tackFree: moment(hour(13)), handle: moment(hour(14)), hard: moment(hour(16)), cured: moment(hour(20)), strength: null,
    mustLieLevel: false, gloves: false, hold: null, doubt: null, ...changes,
  }
}

/** A part standing where it should be, with nothing on it. */
export function part(changes: Partial<PartFacts> = {}): PartFacts {
  return { partId: 1, name: 'whole', films: [], grip: null, doing: null, due: null, place: { room: 'Bench room', place: 'Shelf A' }, missing: null, intake: null, keepOut: null, ...changes }
}
