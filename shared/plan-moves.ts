import { grouped } from '#shared/grouped'
import { openSpans } from '#shared/open-hours'
import type { OpenHours } from '#shared/open-hours'
import type { PlaceKind, StepKind } from '#shared/terms'
import { localDate, startOfLocalDay } from '#shared/time'
import type { StudioZone } from '#shared/time'

/**
 * Why a turn lies elsewhere than people last heard. Only what the plan's own facts prove is named; else it says that it fits better now.
 * Instants are ms UTC; `tempC` is the coldest the room is foretold to become before the film is ready. Dust without a step: a film that lies open in the room.
 * Ended: it moved for that reason, which has gone since, and has not been moved back.
 */
export type MoveCause =
  | { code: 'pinned', by: string | null }
  | { code: 'window missed' }
  | { code: 'recovery', step: string }
  | { code: 'shut room', room: string }
  | { code: 'film later' | 'film sooner', step: string, readyAt: number, room: string | null, tempC: number | null }
  | { code: 'not told', step: string, dueAt: number }
  | { code: 'follows', step: string, startsAt: number, because: MoveCause | null }
  | { code: 'step added', step: string }
  | { code: 'hours', name: string | null }
  | { code: 'not theirs', name: string }
  | { code: 'hands', name: string | null, step: string, batch: string, added: boolean, because?: MoveCause | null }
  | { code: 'opened', name: string | null }
  | { code: 'freed', name: string | null, step: string, batch: string, gone?: 'done' | 'dropped' | null }
  | { code: 'done before', step: string }
  | { code: 'place', kind: PlaceKind }
  | { code: 'dust', step: string | null }
  | { code: 'vapour', step: string }
  | { code: 'ended', because: MoveCause }
  | { code: 'fits better' }

/** One turn that moved, as it is kept and as it is told. ms UTC. */
export interface MovedTurn { turnId: number, pieceId: number, piece: string, batchId: number, stepKind: StepKind, step: string, wasAt: number, isAt: number, movedAt: number, why: MoveCause }

const minute = 60_000
const hour = 60 * minute
const day = 24 * hour

/** Where nobody works for so long, a move is told for a day (planning value). */
export const farthestTold = 14 * day

/** Until when a move is told, ms UTC: to the end of the first working day that begins after it, so that whoever comes to work meets it once. */
export function toldTill(movedAt: number, hours: OpenHours, zone: StudioZone): number {
  const spans = openSpans(hours, zone, startOfLocalDay(movedAt, zone), movedAt + farthestTold)
  const days = [...grouped(spans, span => localDate(span.fromAt, zone)).values()]
  return days.find(own => own[0]!.fromAt >= movedAt)?.at(-1)?.toAt ?? movedAt + day
}

/**
 * Whether a move is worth telling (planning values): half an hour for what was or is to begin within a day, four hours
 * within a week, a day beyond. Nobody arranges anything by less.
 */
export function isNoticed(wasAt: number, isAt: number, now: number): boolean {
  const soonest = Math.min(wasAt, isAt) - now
  const least = soonest < day ? hour / 2 : soonest < 7 * day ? 4 * hour : day
  return Math.abs(isAt - wasAt) >= least
}

/** Like moves of one batch for one reason are told once, the soonest first. */
export function likeMoves(moves: readonly MovedTurn[]): MovedTurn[][] {
  const sorted = [...moves].sort((a, b) => Math.min(a.wasAt, a.isAt) - Math.min(b.wasAt, b.isAt) || a.turnId - b.turnId)
  return [...grouped(sorted, ({ batchId, step, wasAt, isAt, why }) => JSON.stringify([batchId, step, aboutThen(wasAt), aboutThen(isAt), why.code])).values()]
}

/** Members of one row lie minutes apart: to two hours they are the same. */
const aboutThen = (at: number) => Math.round(at / (hour * 2))
