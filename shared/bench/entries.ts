import { nextRung } from '#shared/effects'
import type { Job } from '#shared/hands'
import { worstFilm } from '#shared/piece-strip'
import type { FilmState, PieceState } from '#shared/schemas/piece-state'
import type { MilestoneName } from '#shared/terms'
import type { ReadPiece } from '#shared/verdict/piece'

/** A film of some pieces that no job asks about, to be felt by hand. `film` is the slowest of them. */
export interface LooseTest { pieces: PieceState[], partIds: number[], film: FilmState, wanted: MilestoneName }

/** One line of a bench tablet: work that wants hands, or wet films to be felt. */
export type BenchEntry = { id: string, kind: 'job', job: Job } | { id: string, kind: 'test', test: LooseTest }

/** The part of a job that is about pieces standing in a room; null where none of them does. What stands nowhere belongs to every room. */
function jobIn(job: Job, roomId: number): Job | null {
  const pieces = job.pieces.filter(({ read, turn }) => read.piece.groups.some(group => group.parts.some(part => turn.turn.partIds.includes(part.partId)) && (group.roomId === roomId || group.roomId === null)))
  return pieces.length > 0 ? { ...job, pieces } : null
}

interface WetFilm { piece: PieceState, film: FilmState, wanted: MilestoneName }

/** The newest wet film of each group in the room whose rung no job asks about. */
function wetFilms(pieces: readonly ReadPiece[], roomId: number | null, asked: ReadonlySet<number>): WetFilm[] {
  return pieces.flatMap(({ piece }) => piece.groups.filter(group => roomId === null || group.roomId === roomId || group.roomId === null).flatMap((group) => {
    const film = group.films.filter(each => each.hold === null && each.actId > 0).at(-1)
    const wanted = film && !asked.has(film.coatId) ? nextRung(piece, film) : null
    return film && wanted ? [{ piece, film, wanted }] : []
  }))
}

/** Films put on by one act are felt together: one line, one test for all of them. */
function looseTests(films: readonly WetFilm[]): LooseTest[] {
  const byAct = new Map<string, WetFilm[]>()
  for (const each of films) byAct.set(`${each.film.actId} ${each.wanted}`, [...byAct.get(`${each.film.actId} ${each.wanted}`) ?? [], each])
  return [...byAct.values()].flatMap((group) => {
    const wanted = group[0]?.wanted
    const film = wanted ? worstFilm(group.map(each => each.film), wanted) : null
    return wanted && film ? [{ wanted, film, pieces: [...new Map(group.map(each => [each.piece.id, each.piece])).values()], partIds: [...new Set(group.flatMap(each => each.film.partIds))] }] : []
  })
}

/**
 * What a bench tablet lists, in the order to do it: the work of its room that wants hands today or waits for a thumb, then
 * what is wet besides.
 * @param jobs as `handsJobs` puts them
 * @param roomId null lists all rooms
 */
export function benchEntries(jobs: readonly Job[], pieces: readonly ReadPiece[], roomId: number | null): BenchEntry[] {
  const here = jobs.flatMap(job => (roomId === null ? job : jobIn(job, roomId)) ?? []).filter(job => job.section === 'now' || job.section === 'today' || job.may || job.tests !== null)
  const asked = new Set(here.filter(job => job.tests !== null).flatMap(job => job.pieces.flatMap(({ read, turn }) => read.piece.groups.flatMap(group => group.films.filter(film => film.partIds.some(id => turn.turn.partIds.includes(id))).map(film => film.coatId)))))
  return [
    ...here.map((job): BenchEntry => ({ id: `job ${job.id}`, kind: 'job', job })),
    ...looseTests(wetFilms(pieces, roomId, asked)).map((test): BenchEntry => ({ id: `test ${test.film.actId} ${test.wanted}`, kind: 'test', test })),
  ]
}
