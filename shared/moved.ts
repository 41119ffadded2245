import type { FilmState, StudioState } from '#shared/schemas/piece-state'

/** One rung of films of one step, before and after. `coatId` is one of them. */
export interface MovedRung { coatId: number, names: string[], step: string, before: Rung, after: Rung }

/** How many films a new reading moved, the largest shift in ms (later above 0), and what it did to the newest of them. */
export interface Moved { count: number, mostMs: number, newest: MovedRung[] }

type Rung = FilmState['milestones'][number]

/** A shift of less is not told: times are said to five minutes, and nobody at a bench does otherwise for less. ms, planning value. */
export const noticedShiftMs = 5 * 60_000

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

/** The rungs that work waits for, before those that only handling does. */
const asked = ['out-of-clamps', 'dry-to-sand-lightly', 'ready-to-recoat', 'dry-to-sand-flat', 'dry-to-handle']
const mostSaid = 3

/** The rung that says best what moved: the first asked for that did. */
function movedRung(before: FilmState, after: FilmState): { before: Rung, after: Rung } | null {
  const was = new Map(before.milestones.map(each => [each.name, each]))
  const moved = after.milestones.flatMap((now) => {
    const then = was.get(now.name)
    return then && now.reachedAt === null && then.p90At !== null && now.p90At !== null && Math.abs(now.p90At - then.p90At) >= noticedShiftMs ? [{ before: then, after: now }] : []
  })
  return asked.flatMap(name => moved.find(each => each.after.name === name) ?? [])[0] ?? moved[0] ?? null
}

/** The newest films that moved, those of one step and one row together. */
function newestMoved(before: StudioState, after: StudioState): MovedRung[] {
  const known = films(before)
  const found = after.pieces.flatMap(piece => piece.groups.flatMap(group => group.films.flatMap((film) => {
    const then = known.get(film.coatId)
    const rung = then && movedRung(then, film)
    return rung ? [{ film, name: piece.name, rung }] : []
  }))).sort((a, b) => b.film.endedAt - a.film.endedAt)
  const groups = new Map<string, MovedRung>()
  for (const { film, name, rung } of found) {
    const key = `${film.actId} ${film.step}`
    const group = groups.get(key)
    if (group) group.names.push(name)
    else groups.set(key, { coatId: film.coatId, names: [name], step: film.step ?? film.material ?? '', ...rung })
  }
  return [...groups.values()].slice(0, mostSaid)
}

/** What changed in the times of the films that both states know. */
export function movedFilms(before: StudioState, after: StudioState): Moved {
  const known = films(before)
  const shifts = [...films(after).values()].flatMap((film) => {
    const then = known.get(film.coatId)
    const shift = then ? shiftOf(then, film) : 0
    return Math.abs(shift) >= noticedShiftMs ? [shift] : []
  })
  return { count: shifts.length, mostMs: shifts.reduce((most, each) => Math.abs(each) > Math.abs(most) ? each : most, 0), newest: newestMoved(before, after) }
}
