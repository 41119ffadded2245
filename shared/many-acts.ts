import { handsJobs } from '#shared/hands'
import type { Job } from '#shared/hands'
import type { ActRequest, TellableKind } from '#shared/schemas/act'
import type { Clock } from '#shared/time'
import type { ReadPiece } from '#shared/verdict/piece'

/** One act on some of the chosen pieces. `partIds` where it is about parts of them only. */
export interface ManyPart { kind: TellableKind, body: ActRequest['body'], pieceIds: number[], partIds?: number[], step: string | null }

/** What may be told of many pieces at once, as the acts it takes; null or empty where it may not. */
export interface ManyActs { coat: ManyPart[] | null, dry: ManyPart[], tacky: ManyPart[], aside: ManyPart[], resume: ManyPart[] }

const idsOf = (job: Job) => job.pieces.map(each => each.read.piece.id)
const partsOf = (job: Job) => [...new Set(job.pieces.flatMap(each => each.turn.turn.partIds))]

/** Acts that say the same are one act on all their pieces. */
function together(parts: readonly ManyPart[]): ManyPart[] {
  const found = new Map<string, ManyPart>()
  for (const part of parts) {
    const key = JSON.stringify([part.kind, part.body, part.partIds === undefined])
    const known = found.get(key)
    if (!known) found.set(key, { ...part })
    else Object.assign(known, { pieceIds: [...new Set([...known.pieceIds, ...part.pieceIds])], ...part.partIds ? { partIds: [...new Set([...known.partIds ?? [], ...part.partIds])] } : {} })
  }
  return [...found.values()]
}

const isCoat = (job: Job) => job.kind === 'work' && job.turn.step.kind === 'coat' && job.turn.step.status !== 'set aside' && job.may

/** The next coat of each, if it may begin on every one of them. */
function coatOf(jobs: readonly Job[], count: number): ManyPart[] | null {
  const coats = jobs.filter(isCoat)
  const ids = coats.flatMap(idsOf)
  // A piece with two coats that may begin (a lid and a box) has to be told at its own page which.
  if (count === 0 || ids.length !== count || new Set(ids).size !== count) return null
  return together(coats.map(job => ({ kind: 'coat on', body: { step: job.turn.step.key }, pieceIds: idsOf(job), step: job.turn.step.name })))
}

/** A thumb on each: the rung its next step waits for, or dry to handle where a film dries and no step asks. */
function tests(pieces: readonly ReadPiece[], jobs: readonly Job[], reached: boolean): ManyPart[] {
  const asked = jobs.filter(job => job.tests !== null && job.kind !== 'check' && job.turn.step.status !== 'set aside')
  const known = new Set(asked.flatMap(idsOf))
  const others = pieces.flatMap((read) => {
    const films = known.has(read.piece.id) ? [] : read.piece.groups.flatMap(group => group.films.filter(film => film.hold === null))
    return films.length === 0 ? [] : [{ kind: 'touch test' as const, body: { milestone: 'dry-to-handle', reached }, pieceIds: [read.piece.id], partIds: [...new Set(films.flatMap(film => film.partIds))], step: null }]
  })
  return together([...asked.map(job => ({ kind: 'touch test' as const, body: { milestone: job.tests, reached }, pieceIds: idsOf(job), partIds: partsOf(job), step: null })), ...others])
}

/** What may be told of these pieces together, by the same jobs that the screen of the hands shows. */
export function manyActs(pieces: readonly ReadPiece[], clock: Clock, heardAt: number | null): ManyActs {
  const jobs = handsJobs(pieces, clock, heardAt)
  const work = jobs.filter(job => job.kind === 'work')
  const stepAct = (kind: 'set aside' | 'resumed', of: readonly Job[]) => together(of.map(job => ({ kind, body: { step: job.turn.step.key }, pieceIds: idsOf(job), step: job.turn.step.name })))
  return {
    coat: coatOf(jobs, pieces.length), dry: tests(pieces, jobs, true), tacky: tests(pieces, jobs, false),
    aside: stepAct('set aside', work.filter(job => job.turn.step.status !== 'set aside')),
    resume: stepAct('resumed', work.filter(job => job.turn.step.status === 'set aside')),
  }
}
