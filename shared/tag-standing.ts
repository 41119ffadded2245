import { standings } from '#shared/board'
import type { Standing } from '#shared/board'
import type { Job } from '#shared/hands'
import type { TagFound } from '#shared/schemas/tag'
import type { ReadPiece } from '#shared/verdict/piece'

type Tag = Pick<Exclude<TagFound, { kind: 'elsewhere' }>, 'kind' | 'id' | 'name'>

/** What stands on a shelf or a carrier: parts of a piece that stand elsewhere are left out. */
export function standingsAt(tag: Tag, pieces: readonly ReadPiece[]): Standing[] {
  const all = standings(pieces)
  return tag.kind === 'place' ? all.get(tag.id) ?? [] : [...all.values()].flat().filter(each => each.groups.some(({ group }) => group.carrier === tag.name))
}

/** The pieces of which anything stands on a shelf or a carrier, in their order. */
export function standsAt(tag: Tag, pieces: readonly ReadPiece[]): ReadPiece[] {
  return pieces.filter(read => read.piece.groups.some(group => tag.kind === 'place' ? group.placeId === tag.id : group.carrier === tag.name))
}

/** The work on what stands there: of a piece whose parts stand in several places, only that on the parts here. */
export function jobsAt(tag: Tag, jobs: readonly Job[]): Job[] {
  return jobs.flatMap((job) => {
    const pieces = job.pieces.filter(({ read, turn: { turn } }) => turn.partIds.length === 0 || partsAt(tag, [read]).some(id => turn.partIds.includes(id)))
    return pieces.length > 0 ? [{ ...job, pieces }] : []
  })
}

/** The parts of those pieces that stand there, to be moved without what stands elsewhere. */
export function partsAt(tag: Tag, reads: readonly ReadPiece[]): number[] {
  return reads.flatMap(read => read.piece.groups.filter(group => tag.kind === 'place' ? group.placeId === tag.id : group.carrier === tag.name).flatMap(group => group.parts.map(part => part.partId)))
}

/** The names of the parts that stand there, where parts of those pieces stand elsewhere: what is put on there goes on these alone. None where all stand there whole. */
export function partNamesAt(tag: Tag, reads: readonly ReadPiece[]): string[] {
  const here = new Set(partsAt(tag, reads))
  const parts = reads.map(read => read.piece.groups.flatMap(group => group.parts)).filter(own => own.length > 1).flat()
  return parts.every(part => here.has(part.partId)) ? [] : [...new Set(parts.filter(part => here.has(part.partId)).map(part => part.name))]
}
