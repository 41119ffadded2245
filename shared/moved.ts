import type { FilmState, StudioState } from '#shared/schemas/piece-state'

/** How many films a new reading moved, and the largest shift in ms: later above 0. */
export interface Moved { count: number, mostMs: number }

/** Nobody plans by less. */
const noticedMs = 60_000

const films = (state: StudioState) => new Map(state.pieces.flatMap(piece => piece.groups.flatMap(group => group.films)).map(film => [film.coatId, film]))

/** The largest shift of one film's times that are still to come: the cautious one, which work is planned by. */
function shiftOf(before: FilmState, after: FilmState): number {
  const was = new Map(before.milestones.map(each => [each.name, each]))
  const shifts = after.milestones.flatMap((now) => {
    const then = was.get(now.name)
    return then?.p90At == null || now.p90At === null || now.reachedAt !== null ? [] : [now.p90At - then.p90At]
  })
  return shifts.reduce((most, each) => Math.abs(each) > Math.abs(most) ? each : most, 0)
}

/** What changed in the times of the films that both states know. */
export function movedFilms(before: StudioState, after: StudioState): Moved {
  const known = films(before)
  const shifts = [...films(after).values()].flatMap((film) => {
    const then = known.get(film.coatId)
    const shift = then ? shiftOf(then, film) : 0
    return Math.abs(shift) >= noticedMs ? [shift] : []
  })
  return { count: shifts.length, mostMs: shifts.reduce((most, each) => Math.abs(each) > Math.abs(most) ? each : most, 0) }
}
