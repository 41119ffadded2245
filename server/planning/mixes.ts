import type { StepWork } from '~~/server/planning/lags'
import type { WaitsToCome } from '~~/server/planning/waits'
import { piecesOfMix } from '~~/server/work/pots'
import { grouped } from '#shared/grouped'

/** Minutes to mix once more, planning value: to weigh and to stir. What is laid out for the first mix lies there still. */
const mixAgainMin = 5

const toDo = ({ turns }: StepWork) => turns.filter(turn => turn.kind === 'work' && turn.status === 'waiting')

/**
 * The same work with the minutes of mixing anew, where what is mixed goes off before all like work in a room is done: a pot is enough
 * for so many pieces, and the minutes of the next are shared out over them, to the whole minute. Where one pot is not enough for a
 * single piece, its minutes are the schedule's, which know of it.
 * @param likeWork a key that has in common what is done in one go: a first coat is not mixed with the last
 */
export function withMixing(works: readonly StepWork[], toCome: Pick<WaitsToCome, 'pot'>, likeWork: (work: StepWork) => string): StepWork[] {
  const more = new Map<StepWork, number>()
  for (const alike of grouped(works, likeWork).values()) {
    // Coats of one piece lie hours apart: each is mixed for with the coats of others, not with the next of its own.
    const waiting = alike.filter(work => toDo(work).length > 0)
    const [first] = waiting
    const pot = first && waiting.length > 1 ? toCome.pot(first.step, first.roomId) : null
    const each = pot && piecesOfMix(pot, Math.max(...waiting.flatMap(toDo).map(turn => turn.minutes)))
    if (!each || each >= waiting.length) continue
    for (const work of waiting) more.set(work, Math.round(mixAgainMin / each))
  }
  return works.map((work) => {
    const added = more.get(work) ?? 0
    const mixed = new Set(added > 0 ? toDo(work) : [])
    return mixed.size === 0 ? work : { ...work, turns: work.turns.map(turn => (mixed.has(turn) ? { ...turn, minutes: turn.minutes + added } : turn)) }
  })
}
