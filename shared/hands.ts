import { leavesFilm } from '#shared/step-kinds'
import { groupMoment } from '#shared/verdict/next'
import { turnMoment } from '#shared/verdict/piece'
import type { ReadPiece, ReadTurn } from '#shared/verdict/piece'
import type { BeginReason } from '#shared/verdict/begin'
import type { NextMoment } from '#shared/verdict/next'
import { addDays, fromLocal, localDate } from '#shared/time'
import type { Clock } from '#shared/time'
import type { MilestoneName, TurnKind } from '#shared/terms'
import type { FilmState, TurnState } from '#shared/schemas/piece-state'

const minute = 60_000
/** No time is told finer than this, ms. */
const grain = 5 * minute
/** Work planned to begin within so long counts as now. ms, planning value. */
const soonMs = 30 * minute
/** Pieces of one step that become ready further apart than this are separate jobs. ms, planning value. */
const apartMs = 60 * minute

export const sections = ['now', 'today', 'days', 'waiting'] as const
export type Section = typeof sections[number]

/** An instant (ms UTC) that goes for some of the pieces of a job. */
interface OfThem { at: number, some: number }

export interface JobPiece { read: ReadPiece, turn: ReadTurn }

/**
 * Like work on some pieces, told in one tap. `at` is when hands are wanted, ms UTC; null when nobody can say.
 * `because` stands in the way (the slowest piece speaks); `tests` is the rung a thumb may speak about.
 */
export interface Job {
  id: string
  kind: TurnKind
  turn: TurnState
  pieces: JobPiece[]
  section: Section
  may: boolean
  because: BeginReason
  at: number | null
  moment: NextMoment | null
  pressing: boolean
  /** The planned start of a coat or glue-up has passed and nobody has said whether it went on. */
  due: boolean
  /** The first planned start that passed so, ms UTC. */
  dueAt: number | null
  tests: MilestoneName | null
  /** The first start that the plan has for its pieces, and for how many of them it is. */
  first: OfThem | null
  /** The window that shuts first, and of how many pieces it does about then. */
  shuts: OfThem | null
  /** A film beneath is in doubt: tested or stripped before anything else. */
  doubtful: boolean
}

/** What kind of state a turn is in: pieces in different ones are never one job. */
function phaseOf({ turn, begin, state }: ReadTurn): string {
  if (turn.kind !== 'work') return 'timed'
  if (state === 'set aside') return `aside ${turn.step.asideReason ?? ''}`
  if (turn.status === 'doing') return `doing ${turn.doing?.by ?? ''}`
  if (begin.because.code === 'doubt' || begin.because.code === 'window shut') return begin.because.code
  return begin.from === null && !begin.may ? 'stuck' : 'timed'
}

const wantedFrom = ({ turn, begin }: ReadTurn) => (turn.kind === 'work' ? begin.from : turn.wantedAt)

/** Splits pieces of one step where their times lie far apart; what is past counts as now. */
function clusters(pieces: readonly JobPiece[], now: number): JobPiece[][] {
  const from = (each: JobPiece) => Math.max(wantedFrom(each.turn) ?? now, now)
  const sorted = [...pieces].sort((a, b) => from(a) - from(b))
  const found: JobPiece[][] = []
  for (const each of sorted) {
    const last = found.at(-1)
    const before = last?.at(-1)
    if (last && before && from(each) - from(before) <= apartMs) last.push(each)
    else found.push([each])
  }
  return found
}

/** Two sessions that windows press are two last moments: never one job, though the batch and the step are the same. */
function pressedBy({ turn: { plan } }: ReadTurn): string {
  return plan === null || plan.lastStartAt === null ? '' : `pressed ${plan.sessionId} ${plan.lastStartAt}`
}

function keyOf({ read, turn }: JobPiece, sharedSessions: ReadonlySet<string>): string {
  const { kind, step, no, plan } = turn.turn
  const session = `${plan?.sessionId} ${step.key}`
  const together = plan && plan.sessionId !== null && sharedSessions.has(session) ? `session ${session}` : `batch ${read.piece.batch.id} ${step.key}`
  return [together, kind, no, phaseOf(turn), pressedBy(turn)].join(' | ')
}

/** Sessions in which one step key comes from several batches: only those join what the batches keep apart. */
function findShared(all: readonly JobPiece[]): Set<string> {
  const batches = new Map<string, Set<number>>()
  for (const { read, turn: { turn } } of all) {
    if (!turn.plan || turn.plan.sessionId === null) continue
    const key = `${turn.plan.sessionId} ${turn.step.key}`
    batches.set(key, (batches.get(key) ?? new Set()).add(read.piece.batch.id))
  }
  return new Set([...batches].filter(([, ids]) => ids.size > 1).map(([key]) => key))
}

/** A coat or glue-up is due whose planned start has passed without a word. */
function isDue({ turn }: ReadTurn, now: number): boolean {
  const wets = turn.kind === 'work' && leavesFilm(turn.step.kind)
  return wets && turn.status === 'waiting' && turn.step.status !== 'set aside' && turn.plan !== null && turn.plan.dueAt <= now && (turn.notOnAt === null || turn.notOnAt < turn.plan.dueAt)
}

function testedRung({ turn }: ReadTurn): MilestoneName | null {
  if (turn.kind === 'release') return 'out-of-clamps'
  const wait = turn.waits.find(each => each.milestone !== null && each.films.some(film => film.hold === null && film.moment?.reachedAt === null))
  return wait?.milestone ?? null
}

/** The slowest piece speaks for all: first one that is stuck, else the one that is ready last. */
function slowest(pieces: readonly JobPiece[]): ReadTurn | undefined {
  const time = ({ begin }: ReadTurn) => (begin.may ? -Infinity : begin.from ?? Infinity)
  return pieces.map(each => each.turn).reduce<ReadTurn | undefined>((last, each) => (last === undefined || time(each) > time(last) ? each : last), undefined)
}

/** What presses before all: no beginning may stand where a window makes hands start by a time. */
function momentOf(pieces: readonly JobPiece[], now: number, heardAt: number | null): NextMoment | null {
  return groupMoment(pieces.flatMap(each => turnMoment(each.turn, now, heardAt) ?? []))
}

const least = (times: readonly number[]) => (times.length === 0 ? null : Math.min(...times))

/** The first of some instants, with all that lie at most so much behind it (ms). */
function firstOf(times: readonly number[], within: number): OfThem | null {
  const at = least(times)
  return at === null ? null : { at, some: times.filter(each => each <= at + within).length }
}

const isWork = ({ turn: { turn } }: JobPiece) => turn.kind === 'work' && turn.status === 'waiting'

/** The first planned start: members of one session follow one another and count as beginning with it. */
function firstStart(pieces: readonly JobPiece[]): OfThem | null {
  const plans = pieces.filter(isWork).flatMap(each => each.turn.turn.plan ?? [])
  const first = firstOf(plans.map(each => each.startsAt), 0)
  if (first === null) return null
  const sessions = new Set(plans.filter(each => each.startsAt === first.at).map(each => each.sessionId ?? `at ${each.startsAt}`))
  return { at: first.at, some: plans.filter(each => sessions.has(each.sessionId ?? `at ${each.startsAt}`)).length }
}

/** The window that shuts first, of pieces that may begin in it. */
const firstShut = (pieces: readonly JobPiece[], now: number) => firstOf(pieces.filter(isWork).flatMap(({ turn: { begin } }) => (begin.till !== null && begin.till > now ? [begin.till] : [])), grain)

function jobOf(id: string, pieces: JobPiece[], clock: Clock, heardAt: number | null): Job | null {
  const first = pieces[0]?.turn
  const last = slowest(pieces)
  if (!first || !last) return null
  const { now } = clock
  const phase = phaseOf(first)
  const timed = phase === 'timed'
  const may = first.turn.kind === 'work' ? pieces.every(each => each.turn.begin.may) : first.turn.wantedAt !== null && first.turn.wantedAt <= now
  const pressing = pieces.some(each => each.turn.late !== null)
  const dueAt = least(pieces.flatMap(each => (isDue(each.turn, now) && each.turn.turn.plan ? [each.turn.turn.plan.dueAt] : [])))
  const at = timed ? wantedOf(pieces, now) : null
  const urgent = pressing || dueAt !== null || phase.startsWith('doing') || phase === 'doubt' || phase === 'window shut'
  const moment = phase.startsWith('aside') || phase.startsWith('doing') ? null : momentOf(pieces, now, heardAt)
  return { id, kind: first.turn.kind, turn: first.turn, pieces, may, because: last.begin.because, at, moment, pressing, due: dueAt !== null, dueAt, first: firstStart(pieces), shuts: firstShut(pieces, now), doubtful: phase === 'doubt', tests: testedRung(last) ?? testedRung(first), section: sectionOf({ urgent, timed, may, at }, clock) }
}

/**
 * When hands are wanted: once the slowest may begin, and not before the first of their plans wants it. Null while nobody can say.
 * A check and a release are wanted at their own time, whatever else is planned.
 */
function wantedOf(pieces: readonly JobPiece[], now: number): number | null {
  const wanted = pieces.flatMap(({ turn }) => {
    const from = wantedFrom(turn) ?? (turn.begin.may ? now : null)
    return from === null ? [] : [{ from, plan: turn.turn.kind === 'work' ? turn.turn.plan?.startsAt ?? from : from }]
  })
  return wanted.length === 0 ? null : Math.max(...wanted.map(each => each.from), Math.min(...wanted.map(each => each.plan)))
}

function sectionOf({ urgent, timed, may, at }: { urgent: boolean, timed: boolean, may: boolean, at: number | null }, clock: Clock): Section {
  if (urgent) return 'now'
  if (!timed || at === null) return 'waiting'
  if (may && at <= clock.now + soonMs) return 'now'
  const tomorrow = fromLocal(addDays(localDate(clock.now, clock.zone), 1), 0, clock.zone)
  return at < tomorrow ? 'today' : 'days'
}

/** Pressing first, by the last moment that can still be kept; then what is being done; then by when hands are wanted. */
function compare(a: Job, b: Job): number {
  const rank = (job: Job) => (job.pressing ? 0 : job.due ? 1 : job.turn.status === 'doing' ? 2 : 3)
  const time = (job: Job) => (job.moment?.kind === 'start by' ? job.moment.at : job.at ?? Infinity)
  const [first, second] = [time(a), time(b)]
  return sections.indexOf(a.section) - sections.indexOf(b.section) || rank(a) - rank(b) || (first === second ? 0 : first - second) || (a.id < b.id ? -1 : 1)
}

/**
 * What needs hands, in the order to do it: turns of like work put together, each in its section.
 * @param pieces as `readPiece` reads them
 * @param heardAt as for `readPiece`
 */
export function handsJobs(pieces: readonly ReadPiece[], clock: Clock, heardAt: number | null): Job[] {
  const all = pieces.flatMap(read => read.turns.map((turn): JobPiece => ({ read, turn })))
  const shared = findShared(all)
  const groups = new Map<string, JobPiece[]>()
  for (const each of all) {
    const key = keyOf(each, shared)
    const known = groups.get(key)
    if (known) known.push(each)
    else groups.set(key, [each])
  }
  const jobs = [...groups.values()].flatMap(group => (group[0] && pressedBy(group[0].turn) !== '' ? [group] : clusters(group, clock.now))).flatMap((group) => {
    const inRow = [...group].sort((a, b) => a.read.piece.id - b.read.piece.id)
    const [head] = inRow
    return head ? jobOf(`${head.turn.turn.turnId}`, inRow, clock, heardAt) ?? [] : []
  })
  return jobs.sort(compare)
}

/** Names of other pieces in the rooms of a dusty job whose films would still catch the dust at `now` (ms UTC). */
export function wetBeside(job: Job, pieces: readonly ReadPiece[], now: number): string[] {
  if (job.kind !== 'work' || job.turn.dust === 'none') return []
  const own = new Set(job.pieces.map(each => each.read.piece.id))
  const rooms = new Set(job.pieces.flatMap(each => each.read.piece.groups.map(group => group.roomId)))
  return pieces.filter(({ piece }) => !own.has(piece.id) && piece.groups.some(group => group.roomId !== null && rooms.has(group.roomId) && group.films.some(film => film.kind !== 'glue-up' && catchesDust(film, now))))
    .map(({ piece }) => piece.name)
}

function catchesDust(film: FilmState, now: number): boolean {
  const rung = film.milestones.find(each => each.name === 'dust-free') ?? film.milestones.find(each => each.name === 'tack-free') ?? film.milestones.find(each => each.name === 'dry-to-handle')
  if (!rung) return film.milestones.length === 0
  const clear = rung.reachedAt ?? rung.p90At
  return clear === null || clear > now
}
