import { noticedShiftMs } from '#shared/moved'
import type { Job, Section } from '#shared/hands'
import type { StillToday } from '#shared/hands-today'
import type { Clock } from '#shared/time'
import { clockTime, localDate, roughTime, span } from '#shared/time'
import type { FilmState } from '#shared/schemas/piece-state'
import type { Hold, MilestoneName } from '#shared/terms'
import type { ReasonCode } from '#shared/drying/types'
import type { StartBy } from '#shared/verdict/next'
import { groupNames, listText } from '#shared/words/group'
import { aboutText, beginReason, fewText, late, momentReason, startByText } from '#shared/words/moments'
import { lowerFirst, milestoneText, titled } from '#shared/words/steps'
import { asSentence, limitText, predictionReason } from '#shared/words/verdict'

/** What the screen of the hands says by itself. */
export const handsWords = {
  title: 'Hands',
  more: 'More',
  moreOf: (title: string, names: string) => `More about ${titled(title)}, ${names}`,
  /** A key as a reader hears it: the same word stands on the keys of every job. */
  keyOf: (key: string, names: string) => `${key}, ${names}`,
  stopped: 'Stopped, not done',
  run: 'There is a run',
  runHint: 'It goes its own way: filled, levelled, then back to the others.',
  warmHint: 'The times get wider, and this coat teaches nothing about the material.',
  enoughHint: 'No more coats in this round.',
  leaveOutHint: 'Not needed on these pieces.',
  reason: 'Why it is set aside',
  reasonWanted: 'Say why in a few words, so that the next person knows.',
  reasonHint: 'Cracked, wrong colour, waiting for a handle',
  all: (count: number) => (count === 2 ? 'Both' : `All ${count}`),
  some: (count: number, of: number) => `${count} of ${of}`,
  which: 'Which of them',
  none: 'None',
  noneChosen: 'Choose at least one piece.',
  where: 'Where they go',
  asItStands: 'Stays where it stands',
  othersSteps: 'For others',
  othersSay: 'Steps the owner has not given to you.',
  empty: 'Nothing needs hands',
  emptySays: 'Nothing is drying, clamped or waiting for a step.',
  startBatch: 'Start a batch',
  loading: 'Fetching the studio',
  failed: 'The studio cannot be reached, and nothing of it is known here yet.',
  stale: 'The studio cannot be reached. This is how it stood when last heard.',
  show: (count: number) => `Show ${count} more`,
} as const

const headings: Record<Section, string> = { now: 'Now', today: 'Later today', days: 'Next days', waiting: 'Waiting for something' }
const nothing: Record<Section, string> = { now: 'Nothing needs hands now.', today: '', days: '', waiting: '' }

export const sectionTitle = (section: Section) => headings[section]
export const sectionEmpty = (section: Section) => nothing[section]

const outTitles: Record<Hold, string> = { clamps: 'Out of clamps', press: 'Out of the press', weight: 'Out from under the weight' }

/** What holds pieces, as the taking out of it is called: "Out of clamps". */
export const outTitle = (hold: Hold) => outTitles[hold]

/** "Second varnish", "Shellac, coat 3 of 8", "Out of clamps", "Change the blotters". */
export function jobTitle({ kind, turn }: Pick<Job, 'kind' | 'turn'>): string {
  const name = turn.step.name || 'Something outside the schedule'
  if (kind === 'release') return outTitle(turn.step.hold ?? 'clamps')
  if (kind === 'check') return turn.name || name
  if (turn.step.untilEnough) return `${name}, coat ${turn.no}`
  return turn.of > 1 ? `${name}, coat ${turn.no} of ${turn.of}` : name
}

/** The pieces of a job, with the part it is about where the piece has several. */
export function jobNames(job: Pick<Job, 'pieces'>): string {
  const names = groupNames(job.pieces.map(each => each.read.piece.name))
  const [first] = job.pieces
  if (!first) return names
  const parts = first.read.piece.groups.flatMap(group => group.parts)
  const own = parts.filter(part => first.turn.turn.partIds.includes(part.partId))
  return parts.length > 1 && own.length > 0 && own.length < parts.length ? `${names}: ${listText(own.map(part => lowerFirst(part.name)))}` : names
}

/** "Likely 16:20, give it till 17:05", or why no time can be given. A maker's word leaves no doubt. */
export function timesText({ likelyAt, p90At, reason, reachedAt }: { likelyAt: number | null, p90At: number | null, reason: ReasonCode | null, reachedAt: number | null }, clock: Clock): string {
  if (reachedAt !== null) return `tested ${clockTime(reachedAt, clock)}`
  if (likelyAt === null) return reason ? predictionReason(reason) : 'nobody knows when'
  if (p90At === null) return `likely ${roughTime(likelyAt, clock, 'up')}${reason ? `, ${predictionReason(reason)}` : ''}`
  // As fine as every other line says the cautious end, so that the two never differ by a rounding.
  const doubt = p90At > clock.now ? p90At - clock.now : p90At - likelyAt
  return `likely ${roughTime(likelyAt, clock, 'up', doubt)}, give it till ${roughTime(p90At, clock, 'up', doubt)}`
}

function releaseText(job: Job, film: FilmState | null, clock: Clock): string {
  const rung = film?.milestones.find(each => each.name === 'out-of-clamps')
  const strength = film?.milestones.find(each => each.name === 'full-strength')
  const until = strength ? strength.reachedAt ?? strength.p98At : null
  return [
    ...rung ? [asSentence(timesText(rung, clock))] : [],
    ...strength ? [asSentence(limitText({ kind: 'strain', until }, clock))] : [],
  ].join(' ')
}

/** The one line that says when: the last moment and its reason, from when it may begin, or what stands in the way. */
export function jobMoment(job: Job, film: FilmState | null, clock: Clock): string {
  const { moment, because, turn } = job
  if (turn.step.status === 'set aside') return asSentence(turn.step.asideReason ? `set aside: ${turn.step.asideReason}` : 'set aside')
  if (turn.doing) return asSentence(`${turn.doing.by || 'somebody'} has been at it since ${clockTime(turn.doing.sinceAt, clock)}`)
  if (job.kind === 'release') return releaseText(job, film, clock)
  if (job.kind === 'check') return turn.wantedAt === null ? asSentence(beginReason(because)) : asSentence(turn.wantedAt <= clock.now ? `wanted since ${clockTime(turn.wantedAt, clock)}` : `wanted at ${clockTime(turn.wantedAt, clock)}`)
  const start = moment?.kind === 'start by' ? startOf(moment, job, clock) : null
  if (job.dueAt !== null) return [asSentence(`due since ${clockTime(job.dueAt, clock)}: is it on`).replace(/\.$/, '?'), ...start ? [start] : []].join(' ')
  if (start) return start
  if (job.may) return asSentence([plannedText(job, clock) ?? 'may begin', ...shutText(job, clock)].join('; '))
  if (moment && because.code !== 'role') return asSentence([`${aboutText(moment, clock)}${laterDayText(job, clock)}`, ...shutText(job, clock), beginReason(because)].join('; '))
  return asSentence(beginReason(because))
}

/** The last moment, as every screen says it, with its reason; and how many of the session's pieces this job is about. */
function startOf(moment: StartBy, job: Job, clock: Clock): string {
  const why = momentReason(moment, clock, job.pieces.flatMap(each => each.turn.begin.till ?? []))
  const here = moment.pieces !== null && moment.pieces.all > job.pieces.length ? `, ${job.pieces.length} of them here` : ''
  const waits = job.may || job.because.code === 'role' ? [] : [beginReason(job.because)]
  const plan = job.pieces.map(each => each.turn.turn.plan).find(each => each && each.firstFew !== null && each.lastStartFewAt !== null && each.lastStartFewAt > moment.at)
  const few = moment.at >= clock.now && plan?.firstFew && plan.lastStartFewAt ? `, ${fewText(plan.firstFew, plan.lastStartFewAt, clock)}` : ''
  return asSentence([`${startByText(moment, clock)}${few}${here}`, ...why ? [why] : [], ...waits].join('; '))
}

/** "may begin; planned for 14:00, 2 of 6 then": pieces of one step may lie in several plans, and the first of them speaks. */
function plannedText({ first, pieces }: Job, clock: Clock): string | null {
  if (first === null || first.at <= clock.now) return null
  return `may begin; planned for ${roughTime(first.at, clock, 'down')}${first.some < pieces.length ? `, ${first.some} of ${pieces.length} then` : ''}`
}

/** " today, planned for Fri 8:30": under the next days a bare clock time would be read as tomorrow's. */
function laterDayText({ section, moment, first }: Job, clock: Clock): string {
  if (section !== 'days' || moment?.kind !== 'may begin' || moment.open || localDate(moment.at, clock.zone) !== localDate(clock.now, clock.zone)) return ''
  return ` today${first === null || first.at <= clock.now ? '' : `, planned for ${roughTime(first.at, clock, 'down')}`}`
}

/** "the window of 2 of 6 shuts at 15:05": the first that shuts, where one presses and no last moment to start says it already. */
function shutText({ shuts, pressing, pieces }: Job, clock: Clock): string[] {
  if (!pressing || shuts === null) return []
  return [`the window${shuts.some < pieces.length ? ` of ${shuts.some} of ${pieces.length}` : ''} shuts at ${roughTime(shuts.at, clock, 'down')}`]
}

/** "Start by 15:20 to do all 12 before 17:00.", or how many there is still time for. */
export function todayText({ pieces, allAt, few, shutsAt }: StillToday, clock: Clock): string {
  const shut = clockTime(shutsAt, clock)
  // Closing is no prediction: it is told as finely as it is known.
  if (allAt !== null) return `Start by ${roughTime(allAt, clock, 'down', 0)} to ${pieces === 1 ? 'finish' : pieces === 2 ? 'do both' : `do all ${pieces}`} before ${shut}.`
  return few === null ? 'There is no longer time for it today.' : `There is no longer time for all ${pieces} today: start ${fewText(few.count, few.at, clock, 0)}.`
}

/** "25 min" of attended work for the whole job. */
export function jobMinutes({ turn, pieces, kind }: Job): string {
  const minutes = (kind === 'work' ? turn.setupMin + turn.cleanMin : 0) + turn.pieceMin * pieces.length
  return minutes === 0 ? '' : span(minutes)
}

/** A caution before sanding: whose film would catch the dust. */
export function dustText(names: readonly string[]): string {
  return names.length === 1 ? `${names[0]} is wet in the same room: sand at the extractor, wet, or elsewhere.` : `${groupNames(names)} are wet in the same room: sand at the extractor, wet, or elsewhere.`
}

/** What an act did to a time, with what it was before: "Ready to recoat: likely 16:20, give it till 17:05; before, likely 15:50". */
export interface Effect { milestone: MilestoneName, likelyAt: number | null, p90At: number | null, reachedAt: number | null, reason: ReasonCode | null }

/** Whether a time has moved so far that it is told; one that came or went always is. */
const isShift = (before: number | null, after: number | null) => (before === null || after === null ? before !== after : Math.abs(after - before) >= noticedShiftMs)

export function effectText(after: Effect, before: Effect | null, clock: Clock): string {
  const said = asSentence(`${milestoneText(after.milestone)}: ${timesText(after, clock)}`)
  const moved = before !== null && before.milestone === after.milestone && before.reachedAt === null && (isShift(before.likelyAt, after.likelyAt) || isShift(before.p90At, after.p90At))
  if (!moved) return said
  const was = timesText(before, clock)
  return was === timesText(after, clock) ? said : `${said} It was ${was}.`
}

/** What a test on one piece did to others of its material: "It teaches 4 other films: the most by 25 min later." */
export function fellowsText(count: number, mostMs: number): string {
  if (count === 0) return ''
  const by = `${span(Math.abs(mostMs) / 60_000)} ${mostMs > 0 ? 'later' : 'sooner'}`
  return count === 1 ? `It teaches one other film: give it till moves by ${by}.` : `It teaches ${count} other films: give it till moves by up to ${by}.`
}

/** The sheet that says what was told. */
export const toldWords = {
  label: 'Told',
  at: (fact: string, names: string, time: string) => `${asSentence(fact)} ${names}, ${time}.`,
  together: (facts: readonly string[], names: string, time: string, undone: boolean) => (undone ? `Taken back: ${listText([...new Set(facts)])}. ${names}.` : `${asSentence(listText([...new Set(facts)]))} ${names}, ${time}.`),
  undo: 'Undo',
  another: 'Another time',
  move: 'Move it',
  close: 'Close',
  undone: (fact: string, names: string) => `Taken back: ${fact}. ${names}.`,
  later: 'The studio was not reached. It is kept on this device and told as soon as it can be.',
  again: 'Say it again',
  leave: 'Leave it',
  next: (moment: string) => (moment.startsWith(late) ? asSentence(moment) : `Next: ${moment}.`),
  notReached: 'The studio was not reached. Nothing has changed; try again in a moment.',
  drop: 'Take back',
  dropLabel: (fact: string, names: string) => `Take back: ${fact}, ${names}`,
  untold: (count: number) => (count === 1 ? 'One tap is not told yet.' : `${count} taps are not told yet.`),
  untoldSays: 'They are kept on this device and told in their order as soon as the studio is reached.',
  tellNow: 'Tell them now',
  refusedSays: (names: string, message: string) => `${names}: ${message}`,
} as const
