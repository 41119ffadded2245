import { and, eq, gt, isNull, or } from 'drizzle-orm'
import { airNote, part } from '~~/db/schema'
import type { Asked, Said } from '~~/server/services/advice/films'
import { aboutTurn } from '~~/server/services/advice/soon'
import type { SoonTurn } from '~~/server/services/advice/soon'
import { scoped } from '~~/server/utils/scoped'
import { roomsOfParts } from '~~/server/work/rooms-of-parts'
import { namesLeaf } from '#shared/words/leaf'
import { startAdviceText } from '#shared/words/advice-start'

/** Leaf that is about to be laid where somebody said that the air moves: on the piece itself, or on anything in its room. */
export function leafAdvice(asked: Asked, soon: readonly SoonTurn[]): Said[] {
  const leaf = soon.filter(laysLeaf)
  if (leaf.length === 0) return []
  const moves = airMoves(asked)
  return leaf.filter(moves).map((each): Said => ({ ...aboutTurn(each), code: 'still-air', text: startAdviceText({ code: 'still-air' }, asked.owner.units) }))
}

/** Leaf goes on a size that has come to its tack, or on wetted bole, which nothing waits for: there only the step's own name tells. A glue at its tack is joined, not leafed. */
function laysLeaf({ turn, group }: SoonTurn): boolean {
  if (turn.step.kind !== 'bench work') return false
  const sized = turn.waits.some(wait => wait.milestone === 'at-tack' && group?.films.some(film => film.kind === 'size' && film.step === wait.step))
  return sized || namesLeaf(turn.step.name)
}

/** Whether the air will still move where a turn is done when it may begin, by what was said of parts. */
function airMoves({ db, owner, now }: Asked): (each: SoonTurn) => boolean {
  const notes = db.select({ partId: part.id, pieceId: part.pieceId, toAt: airNote.toAt }).from(airNote).innerJoin(part, eq(part.id, airNote.partId))
    .where(and(scoped(airNote, owner.id, eq(airNote.kind, 'moving'), or(isNull(airNote.toAt), gt(airNote.toAt, now))))).all()
  const roomOf = roomsOfParts(db, owner.id, [...new Set(notes.map(each => each.pieceId))])
  return ({ turn, at, group }) => notes.some(note => (note.toAt === null || note.toAt > at)
    && (turn.partIds.includes(note.partId) || (group?.roomId != null && roomOf(note.partId)?.id === group.roomId)))
}
