import type { SessionState, StudioState } from '#shared/schemas/piece-state'
import type { DayPeg } from '#shared/shelf'
import { addDays, clockTime, fromLocal, localDate, span } from '#shared/time'
import type { Clock } from '#shared/time'
import { aboutToShutMs } from '#shared/verdict/begin'
import { groupMoment } from '#shared/verdict/next'
import type { NextMoment, StartBy } from '#shared/verdict/next'
import { startMoment, turnMoment } from '#shared/verdict/piece'
import type { ReadPiece, ReadTurn } from '#shared/verdict/piece'
import { boardWords, dayNote, dueSince } from '#shared/words/board'
import { groupNames } from '#shared/words/group'
import { outTitle } from '#shared/words/hands'
import { checkTimeText, startByText } from '#shared/words/moments'
import { stepLabel } from '#shared/words/steps'
import { asSentence } from '#shared/words/verdict'

/** The day ruler: what needs hands until the day ends, pegged to its hours. Instants in ms UTC. */
export interface DayPlan { fromAt: number, toAt: number, note: string, pegs: DayPeg[] }

const hour = 3_600_000
/** Rags are asked about so long after the last oil, and again before anybody leaves. */
const ragsAfter = hour / 2

interface Member { piece: ReadPiece, turn: ReadTurn }

function membersOf(session: SessionState, byTurn: ReadonlyMap<number, Member>): Member[] {
  return session.turnIds.flatMap(id => byTurn.get(id) ?? [])
}

const minutesOf = (members: readonly Member[]) => {
  const setup = Math.max(0, ...members.map(({ turn }) => turn.turn.setupMin + turn.turn.cleanMin))
  return setup + members.reduce((sum, { turn }) => sum + turn.turn.pieceMin, 0)
}

function plainly(at: number, members: readonly Member[], clock: Clock): { says: string, urgent: boolean } {
  const length = span(minutesOf(members))
  return { says: at < clock.now ? `${dueSince(at, clock)}, ${length}` : `${clockTime(at, clock)}, ${length}`, urgent: false }
}

function sessionPegs(state: StudioState, byTurn: ReadonlyMap<number, Member>, clock: Clock, until: number): DayPeg[] {
  const works = state.sessions.flatMap((session): Work[] => {
    const members = membersOf(session, byTurn).filter(({ turn }) => turn.turn.status === 'waiting')
    const first = members[0]
    if (!first || session.startsAt >= until) return []
    const { step } = first.turn.turn
    const start = startOf(members, clock.now)
    const pressed = start !== null && start.at < until
    return [{ key: `${step.kind} ${stepLabel(step.kind, step.name)} ${pressed ? session.id : ''}`, session, members, start: pressed ? start : null }]
  })
  return [...alike(works)].map(([key, { session, members, start }]): DayPeg => {
    const { step } = members[0]!.turn.turn
    return {
      key, at: Math.max(session.startsAt, clock.now), title: titled(stepLabel(step.kind, step.name), members.map(({ piece }) => piece.piece.name)),
      ...start ? { says: startByText(start, clock), urgent: start.at - clock.now <= aboutToShutMs } : plainly(session.startsAt, members, clock),
    }
  })
}

interface Work { key: string, session: SessionState, members: Member[], start: StartBy | null }

/** The last moment to start that stands for a session, as its pieces say it. */
function startOf(members: readonly Member[], now: number): StartBy | null {
  const moment = groupMoment(members.flatMap(({ turn }) => startMoment(turn, now) ?? []))
  return moment?.kind === 'start by' ? moment : null
}

/** Sessions of the day that do the same, under the first of them; one that a window presses stands alone. */
function alike(works: readonly Work[]): Map<string, Work> {
  const found = new Map<string, Work>()
  for (const work of works) {
    const known = found.get(work.key)
    found.set(work.key, known ? { ...known, members: [...known.members, ...work.members] } : work)
  }
  return found
}

const titled = (what: string, names: readonly string[]) => `${asSentence(what).slice(0, -1)}, ${groupNames(names)}`

type Check = Extract<NextMoment, { kind: 'check' }>
interface Checks { what: string, moments: Check[], names: string[], minutes: number }

/** Checks inside rests and takings-out that no session holds, those alike in name together. */
function checkPegs(pieces: readonly ReadPiece[], inSession: ReadonlySet<number>, clock: Clock, until: number): DayPeg[] {
  const groups = new Map<string, Checks>()
  for (const piece of pieces) {
    for (const read of piece.turns) {
      const moment = turnMoment(read, clock.now, null)
      if (moment?.kind !== 'check' || moment.at >= until || inSession.has(read.turn.turnId)) continue
      const what = moment.out === null ? moment.what : outTitle(moment.out)
      const known = groups.get(what) ?? { what, moments: [], names: [], minutes: 0 }
      groups.set(what, { what, moments: [...known.moments, moment], names: [...known.names, piece.piece.name], minutes: known.minutes + read.turn.pieceMin })
    }
  }
  return [...groups].flatMap(([key, { what, moments, names, minutes }]): DayPeg[] => {
    const moment = groupMoment(moments)
    if (moment?.kind !== 'check') return []
    const says = [moment.due ? dueSince(moment.at, clock) : checkTimeText(moment, clock), ...minutes > 0 ? [span(minutes)] : []].join(', ')
    return [{ key: `check ${key}`, at: Math.max(moment.at, clock.now), title: titled(what, names), urgent: false, says }]
  })
}

function ragPegs(state: StudioState, clock: Clock): DayPeg[] {
  return state.rags.filter(each => each.sinceAt + ragsAfter <= clock.now)
    .map(each => ({ key: `rags ${each.id}`, at: clock.now, title: boardWords.rags(each.room), says: boardWords.ragsAsk, urgent: true }))
}

/** What needs hands today, from the plan's sessions, checks, rags and the end of the day. */
export function dayPlan(state: StudioState, pieces: readonly ReadPiece[], clock: Clock): DayPlan {
  const { now, zone } = clock
  const midnight = fromLocal(addDays(localDate(now, zone), 1), 0, zone)
  const closesAt = state.hours.filter(each => each.closesAt > now).at(-1)?.closesAt ?? null
  const byTurn = new Map(pieces.flatMap(piece => piece.turns.map((turn): [number, Member] => [turn.turn.turnId, { piece, turn }])))
  const inSession = new Set(state.sessions.flatMap(session => session.turnIds))
  const work = [...ragPegs(state, clock), ...sessionPegs(state, byTurn, clock, midnight), ...checkPegs(pieces, inSession, clock, midnight)]
  const leave: DayPeg[] = closesAt === null ? [] : [{ key: 'leave', at: Math.max(now, closesAt - hour / 4), title: boardWords.leave, says: state.rags.length > 0 ? boardWords.ragsOut : boardWords.lids, urgent: false }]
  const pegs = [...work, ...leave]
  const toAt = Math.min(midnight, Math.max(closesAt ?? now + 3 * hour, ...pegs.map(each => each.at + hour / 4)))
  const minutes = state.sessions.filter(each => each.startsAt < midnight).reduce((sum, each) => sum + minutesOf(membersOf(each, byTurn).filter(({ turn }) => turn.turn.status === 'waiting')), 0)
  return { fromAt: now - hour / 4, toAt: Math.max(toAt, now + hour), note: dayNote(closesAt, minutes, clock), pegs }
}
