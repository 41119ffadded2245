import type { StepWork } from '~~/server/planning/lags'
import { activityId } from '~~/server/planning/ids'
import { grouped } from '#shared/grouped'
import type { Fixed, Interval } from '#shared/planning/types'

/** Minutes from the problem's zero that hands need around what is pinned: the set-up before a row and the clean-up after it. `activity`: whose. */
export interface Reserved { hand: string, activity: string, start: number, end: number }

interface Pinned { id: string, start: number, end: number, setup: number, cleanup: number }

/**
 * The set-up and clean-up of pinned work: a pin is the start of the work itself, and its hands are taken before and after. Members of a row,
 * one straight after another by the same hands, are set up for once.
 * @param rowOf what may be one row: like work in one room
 */
export function reservedFor(works: readonly StepWork[], fixed: readonly Fixed[], rowOf: (work: StepWork) => string): Reserved[] {
  const workOf = new Map(works.flatMap(work => work.turns.flatMap(turn => (turn.kind === 'work' && turn.status === 'waiting' ? [[activityId(turn.id), { work, minutes: Math.max(1, turn.minutes) }] as const] : []))))
  const pinned = fixed.flatMap(({ activity, start, resources }) => {
    const found = workOf.get(activity)
    return found ? [{ id: activity, start, end: start + found.minutes, setup: found.work.step.setupMin, cleanup: found.work.step.cleanMin, key: `${rowOf(found.work)} | ${resources.join(' ')}`, resources }] : []
  })
  return [...grouped(pinned, each => each.key).values()].flatMap(own => rowsOf(own).flatMap((row) => {
    const [first, last] = [row[0]!, row[row.length - 1]!]
    const spans = [{ activity: first.id, start: first.start - first.setup, end: first.start }, { activity: last.id, start: last.end, end: last.end + last.cleanup }]
    return spans.filter(span => span.end > span.start).flatMap(span => own[0]!.resources.map(hand => ({ hand, ...span })))
  }))
}

function rowsOf(pinned: readonly Pinned[]): Pinned[][] {
  const rows: Pinned[][] = []
  for (const each of [...pinned].sort((a, b) => a.start - b.start)) {
    const row = rows[rows.length - 1]
    if (row && row[row.length - 1]!.end === each.start) row.push(each)
    else rows.push([each])
  }
  return rows
}

/** Open time without what is reserved. */
export function openWithout(open: readonly Interval[], reserved: readonly Pick<Reserved, 'start' | 'end'>[]): readonly Interval[] {
  return reserved.reduce<readonly Interval[]>((left, { start, end }) => left.flatMap(([from, to]): Interval[] => ([[from, Math.min(to, start)], [Math.max(from, end), to]] as Interval[]).filter(([begins, ends]) => ends > begins)), open)
}
