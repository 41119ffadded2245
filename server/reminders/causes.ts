import { grouped } from '#shared/grouped'
import { clockTime, localDate, roughTime } from '#shared/time'
import { callWords } from '#shared/words/calls'
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

/** How the calls of one studio say a time: `by` is never later than it is, `from` never earlier, `clock` to the minute. */
function timeWords({ hours: { zone } }: CallState, now: number) {
  const clock = { now, zone }
  return {
    by: (at: number) => roughTime(at, clock, 'down'),
    from: (at: number) => roughTime(at, clock, 'up'),
    clock: (at: number) => clockTime(at, clock),
  }
}

/** Pieces of one batch that come to the same step in the same session: one call for all of them. */
interface Group { key: string, first: PlannedTurn, turns: PlannedTurn[], failedTests: number }

/** The group key survives a new plan: it names the step, the turn, the branch and the act of the oldest film under it. */
function groupTurns(turns: readonly PlannedTurn[]): Group[] {
  const groups = grouped(turns, turn => JSON.stringify([turn.batchId, turn.branchId, turn.stepKey, turn.ordinal, turn.sessionId]))
  return [...groups.values()].flatMap((members) => {
    const [first] = members
    if (!first) return []
    const acts = members.flatMap(turn => turn.after ? [turn.after.actId] : [])
    const key = JSON.stringify([first.stepKey, first.ordinal, first.branchId ?? 0, acts.length ? Math.min(...acts) : 0])
    return [{ key, first, turns: members, failedTests: Math.max(0, ...members.map(turn => turn.after?.failedTests ?? 0)) }]
  })
}

const least = (values: (number | null)[]) => {
  const known = values.filter(value => value !== null)
  return known.length ? Math.min(...known) : null
}

const workOf = ({ first, turns }: Group) => ({ step: first.turnName || first.stepName, batch: first.batchName, count: new Set(turns.map(turn => turn.pieceName)).size })

const callFor = (group: Group) => ({
  subjectType: 'batch' as const, subjectId: group.first.batchId, groupKey: group.key, repeat: group.failedTests,
  path: `/hands?turn=${group.first.turnId}${group.first.stepKind === 'coat' && group.first.kind === 'work' ? '&act=coat' : ''}`,
})

/** The last moment to start them all, and then the last moment for as many as could still be done. */
export function lastMoments(state: CallState, now: number): WantedReminder[] {
  const { by } = timeWords(state, now)
  return groupTurns(state.turns.filter(turn => turn.lastStartAt !== null && !state.underWay.has(workKey(turn)))).flatMap((group): WantedReminder[] => {
    const allAt = least(group.turns.map(turn => turn.lastStartAt))
    if (allAt === null) return []
    const fewAt = least(group.turns.map(turn => turn.lastStartFewAt))
    const count = least(group.turns.map(turn => turn.firstFew))
    const few = fewAt !== null && count !== null && fewAt > allAt ? { count, by: by(fewAt) } : null
    const call = { ...callFor(group), kind: 'last moment to start' as const }
    const work = workOf(group)
    if (now < allAt) {
      return [{ ...call, stage: 'all', dueAt: leadBefore(state, allAt), title: callWords.lastMoment.title(by(allAt)), body: callWords.lastMoment.all(work, by(allAt), few) }]
    }
    if (few && fewAt !== null && now < fewAt) {
      return [{ ...call, stage: 'first few', dueAt: Math.max(allAt, fewAt - leadMs), title: callWords.lastMoment.title(few.by), body: callWords.lastMoment.few(work, few) }]
    }
    return []
  })
}

/** Half an hour before; for a moment in the night, half an hour before the studio shuts. */
function leadBefore(state: CallState, at: number) {
  return Math.min(at, lastOpenMoment(state.hours, at)) - leadMs
}

/** The next attended turn over a film, when the plan has hands for it. */
export function readies(state: CallState, now: number): WantedReminder[] {
  const { from } = timeWords(state, now)
  return groupTurns(state.turns.filter(turn => turn.after !== null && !state.underWay.has(workKey(turn)))).map((group) => {
    const dueAt = Math.min(...group.turns.map(turn => turn.dueAt))
    const work = workOf(group)
    const body = group.turns.some(turn => turn.afterTest) ? callWords.ready.afterTest(work) : callWords.ready.body(work)
    return { ...callFor(group), kind: 'ready' as const, stage: 'ready', dueAt, title: callWords.ready.title(work.step, from(dueAt)), body }
  })
}

/** What to see to before the studio shuts tonight, in one call; none when there is nothing. */
export function leaving(state: CallState, now: number): WantedReminder[] {
  const night = nightAfter(state.hours, now)
  if (!night || now > night.fromAt + leaveUntilMs) return []
  const lines = leavingLines(state, night, now)
  if (lines.length === 0) return []
  return [{
    kind: 'before you leave', subjectType: 'studio', subjectId: state.studioId, groupKey: localDate(now, state.hours.zone), stage: 'evening', repeat: 0,
    dueAt: night.fromAt - leaveLeadMs, title: callWords.leaving.title(timeWords(state, now).clock(night.fromAt)), body: lines.join('\n'), path: '/hands?list=leaving',
  }]
}

function leavingLines(state: CallState, night: { fromAt: number, toAt: number | null }, now: number): string[] {
  const words = callWords.leaving
  const { by } = timeWords(state, now)
  const shutting = groupTurns(state.turns.filter(turn => turn.lastStartAt !== null && turn.lastStartAt >= night.fromAt && turn.lastStartAt < (night.toAt ?? Infinity)))
  const isPotUsed = state.usedToday.some(used => used.kind === 'glue size' || used.libraryKey === 'hot-hide-glue')
  return [
    ...state.rags.length ? [words.rags(state.rags.map(duty => duty.roomName))] : [],
    ...shutting.map(({ first, turns }) => words.shuts(first.turnName || first.stepName, first.batchName, by(least(turns.map(turn => turn.lastStartAt)) ?? night.fromAt))),
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
  const { clock } = timeWords(state, now)
  return state.rags.flatMap((duty): WantedReminder[] => {
    const call = { kind: 'rags' as const, subjectType: 'rag duty' as const, subjectId: duty.dutyId, groupKey: `oil ${duty.lastOilActId}`, path: `/hands?rags=${duty.dutyId}`, title: callWords.rags.title }
    const words = (repeat: number) => (repeat === 0 ? callWords.rags.body : callWords.rags.again)(duty.roomName, clock(duty.lastOilAt))
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
