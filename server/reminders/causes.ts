import { grouped } from '#shared/grouped'
import { clockTime, localDate, roughTime } from '#shared/time'
import type { Clock } from '#shared/time'
import { groupMoment } from '#shared/verdict/next'
import type { NextMoment, StartBy } from '#shared/verdict/next'
import { beginMoment, startMoment } from '#shared/verdict/piece'
import { callWords } from '#shared/words/calls'
import { fewText, momentText } from '#shared/words/moments'
import { lowerFirst } from '#shared/words/steps'
import { asSentence } from '#shared/words/verdict'
import { lastOpenMoment, nightAfter } from './hours'
import { workKey } from './state'
import type { CallState, PlannedTurn } from './state'
import type { WantedReminder } from './types'

const minute = 60_000
/** How long before the last moment the call is made, in ms. */
export const leadMs = 30 * minute
/** From the last drying-oil step to the first question, and from question to question, in ms. */
export const ragsFirstMs = 30 * minute
export const ragsAgainMs = 15 * minute
const leaveLeadMs = 30 * minute
const leaveUntilMs = 90 * minute

const clockOf = ({ hours: { zone } }: CallState, now: number): Clock => ({ now, zone })

/** Pieces of one batch that come to the same step together: one call for all of them. */
interface Group { key: string, first: PlannedTurn, turns: PlannedTurn[], failedTests: number }

/**
 * Groups turns of one step by what else tells them apart. The key names the call's cause, so it has to survive a new
 * plan: the step, the turn, the branch, and what `sign` says of the group.
 */
function groupTurns(turns: readonly PlannedTurn[], apart: (turn: PlannedTurn) => number | null, sign: (group: readonly PlannedTurn[]) => number[]): Group[] {
  const groups = grouped(turns, turn => JSON.stringify([turn.batchId, turn.branchId, turn.stepKey, turn.ordinal, apart(turn)]))
  return [...groups.values()].flatMap((members) => {
    const [first] = members
    if (!first) return []
    const key = JSON.stringify([first.stepKey, first.ordinal, first.branchId ?? 0, ...sign(members)])
    return [{ key, first, turns: members, failedTests: Math.max(0, ...members.map(turn => turn.after?.failedTests ?? 0)) }]
  })
}

const oldestAct = (turns: readonly PlannedTurn[]) => Math.min(...turns.flatMap(turn => turn.after?.actId ?? []), Infinity)

/** By session, for each has its own last moment; known by its first turn, so that the second is not taken for the first again. */
const bySession = (turns: readonly PlannedTurn[]) => groupTurns(turns, turn => turn.sessionId, group => [Number.isFinite(oldestAct(group)) ? oldestAct(group) : 0, Math.min(...group.map(turn => turn.turnId))])

/** By the act of the film beneath: what went on together is ready together, in however many sessions hands come to it. */
const byFilm = (turns: readonly PlannedTurn[]) => groupTurns(turns, turn => turn.after?.actId ?? null, group => [oldestAct(group)])

const workOf = ({ first, turns }: Group) => ({ batch: first.batchName, count: new Set(turns.map(turn => turn.pieceName)).size })

const callFor = (group: Group) => ({
  subjectType: 'batch' as const, subjectId: group.first.batchId, groupKey: group.key, repeat: group.failedTests,
  path: `/hands?turn=${group.first.turnId}${group.first.stepKind === 'coat' && group.first.kind === 'work' ? '&act=coat' : ''}`,
})

/** The last moment to start that stands for a group, as its pieces say it; null when none does, or all are past. */
function startOf(group: Group, now: number): StartBy | null {
  const moment = groupMoment(group.turns.flatMap(({ read }) => startMoment(read, now) ?? []))
  return moment?.kind === 'start by' && moment.at >= now ? moment : null
}

/** The last moment to start them all, and then the last moment for as many as could still be done. */
export function lastMoments(state: CallState, now: number): WantedReminder[] {
  const clock = clockOf(state, now)
  const words = callWords.lastMoment
  return bySession(state.turns.filter(turn => !state.underWay.has(workKey(turn)))).flatMap((group): WantedReminder[] => {
    const start = startOf(group, now)
    if (!start) return []
    const call = { ...callFor(group), kind: 'last moment to start' as const, title: words.title(roughTime(start.at, clock, 'down')) }
    const work = workOf(group)
    const says = momentText(start, clock)
    if (start.pieces !== null && start.pieces.some < start.pieces.all) {
      const allAt = Math.min(...group.turns.flatMap(({ read }) => read.turn.plan?.lastStartAt ?? []))
      return [{ ...call, stage: 'first few', dueAt: Math.max(allAt, start.at - leadMs), body: words.few(work, start.pieces.all, says) }]
    }
    return [{ ...call, stage: 'all', dueAt: leadBefore(state, start.at), body: words.all(work, says, fewOf(group, start, clock)) }]
  })
}

/** "by 14:35 for 4 of them", where as many could still be done after the last moment for all. */
function fewOf({ turns }: Group, start: StartBy, clock: Clock): string | null {
  const plan = turns.map(({ read }) => read.turn.plan).find(each => each && each.lastStartFewAt !== null && each.lastStartFewAt > start.at)
  return plan && plan.firstFew !== null && plan.lastStartFewAt !== null ? fewText(plan.firstFew, plan.lastStartFewAt, clock) : null
}

/** Half an hour before; for a moment in the night, half an hour before the studio shuts. */
function leadBefore(state: CallState, at: number) {
  return Math.min(at, lastOpenMoment(state.hours, at)) - leadMs
}

/** What waits for a film is ready by a time; what waits for hands alone needs no call. */
function waitsForFilm({ read: { turn } }: PlannedTurn): boolean {
  return turn.kind !== 'work' || turn.waits.some(each => each.films.length > 0)
}

/** From when a group may be gone on with, the slowest piece speaking; null while nobody can say, or something else comes first. */
function readyFrom(group: Group, now: number): NextMoment | null {
  const moments = group.turns.map(({ read }) => beginMoment(read, now))
  return moments.some(each => each === null) ? null : groupMoment(moments.flatMap(each => each ?? []))
}

/** The next attended turn over a film, when the plan has hands for it, in the words that its pieces have for it. */
export function readies(state: CallState, now: number): WantedReminder[] {
  const clock = clockOf(state, now)
  const open = state.turns.filter(turn => turn.after !== null && waitsForFilm(turn) && !state.underWay.has(workKey(turn)))
  return byFilm(open).flatMap((group): WantedReminder[] => {
    const planned = Math.min(...group.turns.map(turn => turn.dueAt))
    const work = workOf(group)
    const call = { ...callFor(group), kind: 'ready' as const, stage: 'ready' }
    const from = readyFrom(group, now)
    if (from) return [{ ...call, dueAt: Math.max(planned, from.at), title: asTitle(momentText(from, clock)), body: group.first.kind === 'release' ? callWords.ready.held(work) : callWords.ready.body(work) }]
    const untold = group.turns.every(({ read }) => testedFirst.includes(read.begin.because.code))
    return untold ? [{ ...call, dueAt: planned, title: callWords.ready.testTitle(lowerFirst(group.first.stepName)), body: callWords.ready.afterTest(work) }] : []
  })
}

const testedFirst = ['no promise', 'unknown film', 'doubt']
const asTitle = (words: string) => asSentence(words).slice(0, -1)

/** What to see to before the studio shuts tonight, in one call; none when there is nothing. */
export function leaving(state: CallState, now: number): WantedReminder[] {
  const night = nightAfter(state.hours, now)
  if (!night || now > night.fromAt + leaveUntilMs) return []
  const lines = leavingLines(state, night, now)
  if (lines.length === 0) return []
  return [{
    kind: 'before you leave', subjectType: 'studio', subjectId: state.studioId, groupKey: localDate(now, state.hours.zone), stage: 'evening', repeat: 0,
    dueAt: night.fromAt - leaveLeadMs, title: callWords.leaving.title(clockTime(night.fromAt, clockOf(state, now))), body: lines.join('\n'), path: '/hands?list=leaving',
  }]
}

function leavingLines(state: CallState, night: { fromAt: number, toAt: number | null }, now: number): string[] {
  const words = callWords.leaving
  const clock = clockOf(state, now)
  const shutting = bySession(state.turns).flatMap((group) => {
    const start = startOf(group, now)
    return start && start.at >= night.fromAt && start.at < (night.toAt ?? Infinity) ? [{ ...workOf(group), says: momentText(start, clock) }] : []
  })
  const isPotUsed = state.usedToday.some(used => used.kind === 'glue size' || used.libraryKey === 'hot-hide-glue')
  return [
    ...state.rags.length ? [words.rags(state.rags.map(duty => duty.roomName))] : [],
    ...shutting.map(({ batch, says }) => words.shuts(batch, says)),
    ...state.outdoors.length ? [words.outdoors(state.outdoors.map(piece => piece.pieceName))] : [],
    ...state.wetRooms.filter(room => room.solvent > 0).map(room => words.solvent(room.name)),
    // Never beside a solvent film: warmth there is no lever.
    ...state.wetRooms.filter(room => room.solvent === 0 && room.heated).map(room => words.heater(room.name, room.films)),
    ...state.usedToday.length ? [words.lids(state.usedToday.map(used => used.name))] : [],
    ...isPotUsed ? [words.pot] : [],
  ]
}

/**
 * Oily rags: half an hour after the last drying-oil step, before the studio shuts, and every quarter of an hour until
 * somebody answers. After a time without the server only the newest question is asked, not each that was missed.
 */
export function ragCalls(state: CallState, now: number): WantedReminder[] {
  const clock = clockOf(state, now)
  return state.rags.flatMap((duty): WantedReminder[] => {
    const call = { kind: 'rags' as const, subjectType: 'rag duty' as const, subjectId: duty.dutyId, groupKey: `oil ${duty.lastOilActId}`, path: `/hands?rags=${duty.dutyId}`, title: callWords.rags.title }
    const words = (repeat: number) => (repeat === 0 ? callWords.rags.body : callWords.rags.again)(duty.roomName, clockTime(duty.lastOilAt, clock))
    const firstAt = duty.lastOilAt + ragsFirstMs
    const asked = Math.max(0, Math.floor((now - firstAt) / ragsAgainMs))
    const repeats = now < firstAt ? [0] : [asked, asked + 1]
    const after = repeats.map(repeat => ({ ...call, stage: 'after the oil', repeat, dueAt: firstAt + repeat * ragsAgainMs, body: words(repeat) }))
    const night = nightAfter(state.hours, duty.lastOilAt)
    // Somebody who oils shortly before the studio shuts is gone half an hour later.
    const isLate = night !== null && duty.lastOilAt < night.fromAt && firstAt > night.fromAt - leaveLeadMs && now < night.fromAt + leaveUntilMs
    return isLate ? [...after, { ...call, stage: 'before you leave', repeat: 0, dueAt: Math.max(duty.lastOilAt, night.fromAt - leaveLeadMs), body: words(0) }] : after
  })
}
