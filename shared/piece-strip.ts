import type { PieceStrip } from '#shared/strip'
import type { FilmState, TurnState } from '#shared/schemas/piece-state'
import type { MilestonePrediction } from '#shared/drying/types'
import { milestoneNames } from '#shared/terms'
import type { MilestoneName } from '#shared/terms'
import { milestoneText, stepLabel } from '#shared/words/steps'

const minute = 60_000
const day = 24 * 60 * minute
/** Beyond this a strip says nothing more; its last milestone then lies past the edge. */
const mostAhead = 30 * day
/** A film that has lain longer than this begins at the strip's edge. */
const mostBehind = 60 * day

const indexOf = (name: string) => milestoneNames.findIndex(each => each === name)

/** The rung a film is asked for, or the next one up its ladder. */
function rungOf(film: FilmState, wanted: MilestoneName): MilestonePrediction | null {
  return film.milestones.find(each => each.name === wanted) ?? film.milestones.find(each => indexOf(each.name) >= indexOf(wanted)) ?? film.milestones.at(-1) ?? null
}

const lastAt = (rung: MilestonePrediction | null) => rung?.reachedAt ?? rung?.p90At ?? Infinity

/** Of some films the one that keeps hands waiting longest for a rung; null when there are none. */
export function worstFilm(films: readonly FilmState[], wanted: MilestoneName): FilmState | null {
  return films.reduce<FilmState | null>((worst, film) => (worst === null || lastAt(rungOf(film, wanted)) > lastAt(rungOf(worst, wanted)) ? film : worst), null)
}

/** How a rung stands on a strip: a maker's word leaves no doubt; without a likely time there is no tick. */
const tickOf = (rung: MilestonePrediction) => {
  const likelyAt = rung.reachedAt ?? rung.likelyAt
  return likelyAt === null ? [] : [{ label: milestoneText(milestoneNames[indexOf(rung.name)] ?? 'cured'), likelyAt, giveTillAt: rung.reachedAt ?? rung.p90At }]
}

/**
 * A film that stands for several alike, with the window all of them can still keep: it shuts when the first of them shuts.
 * @param films those it stands for, itself among them
 */
export function withFirstShut(film: FilmState, films: readonly FilmState[]): FilmState {
  const alike = films.filter(each => each.step === film.step && each.material === film.material)
  return {
    ...film,
    windows: film.windows.map((window, index) => {
      const ends = alike.flatMap(each => each.windows[index]?.shutsAt ?? [])
      return ends.length === 0 ? window : { ...window, shutsAt: Math.min(...ends) }
    }),
  }
}

/**
 * The drying strip of one film as it waits for a rung, with the window a next step asks for and what is planned.
 * @param now ms UTC
 * @param zone IANA name
 */
export function filmStrip(film: FilmState, wanted: MilestoneName, turn: TurnState | null, now: number, zone: string): PieceStrip {
  const rung = rungOf(film, wanted)
  const windows = turn?.waits.some(each => each.windowed) ? film.windows.filter(each => each.shutsAt === null || each.shutsAt > now - day) : []
  const plannedAt = turn?.plan?.startsAt ?? null
  const planned = turn && plannedAt !== null && plannedAt > now ? [{ at: plannedAt, label: stepLabel(turn.step.kind, turn.step.name) }] : []
  const ends = [now + 45 * minute, ...rung ? [rung.reachedAt ?? rung.p90At ?? rung.likelyAt ?? now] : [], ...windows.flatMap(each => (each.shutsAt === null ? [] : [each.shutsAt + 30 * minute])), ...planned.map(each => each.at + 30 * minute)]
  return {
    fromAt: Math.max(film.beganAt, now - mostBehind), toAt: Math.max(film.endedAt + 30 * minute, Math.min(now + mostAhead, Math.max(...ends))) + 15 * minute, nowAt: now, zone,
    coats: [{ onAt: film.beganAt, likelyAt: rung?.reachedAt ?? rung?.likelyAt ?? null, giveTillAt: rung?.reachedAt ?? rung?.p90At ?? null }],
    milestones: rung ? tickOf(rung) : [], windows, planned,
  }
}
