import type { PlanFacts } from '~~/server/planning/facts'
import { activityId } from '~~/server/planning/ids'
import type { LagInput, StepWork } from '~~/server/planning/lags'
import type { WaitsToCome } from '~~/server/planning/waits'
import { minutesFrom, reachedAt, rungFor } from '#shared/drying/waits'
import type { PlanInput } from '#shared/planning/problem'

/** Much dust settles for half an hour before a film may lie in the same room (planning value). */
const settling = 30
/** A film minds dust while it is being laid and for an hour after, however fast it is free of dust (planning value). */
const openFilm = 60
/** A film that nobody can name, or that gets nowhere in this air, keeps much dust off for a day (planning value): longer would lose the work from sight. */
const unknownFilm = 24 * 60

function byRoom(works: readonly StepWork[]): Map<number, StepWork[]> {
  const rooms = new Map<number, StepWork[]>()
  for (const work of works) if (work.roomId !== null) rooms.set(work.roomId, [...rooms.get(work.roomId) ?? [], work])
  return rooms
}

/** In one room, work that makes much dust and coats to come stay apart: till the dust has settled, and till the film is free of dust at 90 %. */
export function dustApart(works: readonly StepWork[], toCome: WaitsToCome): NonNullable<PlanInput['apart']> {
  return [...byRoom(works)].flatMap(([roomId, own]) => {
    const members = (of: readonly StepWork[], after: (work: StepWork) => number) => of.flatMap(work => work.turns.filter(turn => turn.kind === 'work').map(turn => ({ activity: activityId(turn.id), after: after(work) })))
    const free = ({ step }: StepWork) => Math.max(openFilm, step.materialVersionId === null ? unknownFilm : toCome.wait(step, roomId, 'dust-free', 'p90', false).minutes ?? unknownFilm)
    const one = members(own.filter(work => work.step.dust === 'much'), () => settling)
    const other = one.length > 0 ? members(own.filter(work => work.step.kind === 'coat'), free) : []
    return other.length > 0 ? [{ id: `dust ${roomId}`, one, other }] : []
  })
}

/** Work that makes much dust waits till the films that lie in its room on other pieces are free of it. Its own films have their links. */
export function dustKeptOff(works: readonly StepWork[], facts: PlanFacts, zeroAt: number): LagInput[] {
  const dusty = works.filter(work => work.roomId !== null && work.step.dust === 'much')
  if (dusty.length === 0) return []
  const lying = facts.films.filter(film => film.kind === 'coat').map((film) => {
    const rung = rungFor(facts.rungs.filter(each => each.coatId === film.coatId).map(each => ({ ...each, name: each.milestone })), 'dust-free')
    const at = (rung && reachedAt(rung, 'p90', film.endedAt).at) ?? film.endedAt + unknownFilm * 60_000
    return { pieceId: film.pieceId, min: minutesFrom(zeroAt, at, Math.ceil), rooms: new Set(facts.stays.filter(stay => stay.pieceId === film.pieceId).map(stay => stay.roomId)) }
  }).filter(film => film.min > 0)
  return dusty.flatMap((work) => {
    const min = Math.max(0, ...lying.filter(film => film.pieceId !== work.step.pieceId && work.roomId !== null && film.rooms.has(work.roomId)).map(film => film.min))
    return min === 0 ? [] : work.turns.filter(turn => turn.kind === 'work' && turn.status === 'waiting').map(turn => ({ from: null, to: activityId(turn.id), min }))
  })
}
