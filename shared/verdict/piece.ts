import { leavesFilm } from '#shared/step-kinds'
import { lateness, mayBegin, stepState } from '#shared/verdict/begin'
import type { MayBegin, StepState, Who } from '#shared/verdict/begin'
import { groupFacts } from '#shared/verdict/facts'
import type { Whereabouts } from '#shared/verdict/facts'
import { nextMoment } from '#shared/verdict/next'
import type { Beginning, DueCheck, LastStart, NextMoment, StartBy } from '#shared/verdict/next'
import { groupVerdict, pieceVerdict } from '#shared/verdict/verdict'
import type { Verdict } from '#shared/verdict/types'
import type { GroupState, PieceState, TurnState } from '#shared/schemas/piece-state'

/** A turn with what may be done about it now. */
export interface ReadTurn { turn: TurnState, begin: MayBegin, late: 'shut' | 'shutting' | null, state: StepState }

/** One group of parts with the verdict on it. */
export interface ReadGroup { group: GroupState, verdict: Verdict }

/** All that any screen, feed or message says of a piece. */
export interface ReadPiece { piece: PieceState, verdict: Verdict, groups: ReadGroup[], turns: ReadTurn[], next: NextMoment | null }

const noVerdict = { betterAt: null, betterKind: null, betterGrip: null }
const nowhere: Verdict = pieceVerdict([], 0, null)

/**
 * Reads one piece at `now` (ms UTC): the verdict, what may begin, and its next moment. Every screen, feed, message and
 * print asks this function and no other, so that one piece has one verdict and one next moment everywhere.
 * @param heardAt when this page last heard from the studio, ms UTC; null where the studio itself asks
 * @param who for whom `begin` is asked; null asks for anybody who may. It never changes verdict or next moment.
 */
export function readPiece(piece: PieceState, where: Whereabouts, now: number, heardAt: number | null, who: Who | null = null): ReadPiece {
  const groups = piece.groups.map((group): ReadGroup => ({ group, verdict: pieceVerdict(groupFacts(piece, group, where), now, heardAt) }))
  const verdict = groupVerdict(groups.map(each => each.verdict)) ?? nowhere
  const turns = piece.turns.map(turn => readTurn(piece, turn, where, now, heardAt, who))
  const anybody = who === null ? turns : piece.turns.map(turn => readTurn(piece, turn, where, now, heardAt, null))
  const next = nextMoment({ verdict, lastStarts: lastStarts(anybody), mayBegins: beginnings(anybody, now, where.sessions ?? []), checks: checks(anybody) }, now, heardAt)
  return { piece, verdict, groups, turns, next }
}

/** The parts that a verdict on several groups is about; none where it is about all of them. */
export function speakingParts(groups: readonly ReadGroup[], { kind }: Verdict): string[] {
  const own = groups.filter(each => each.verdict.kind === kind)
  return own.length === groups.length ? [] : own.flatMap(({ group }) => group.parts.map(part => part.name))
}

function readTurn(piece: PieceState, turn: TurnState, where: Whereabouts, now: number, heardAt: number | null, who: Who | null): ReadTurn {
  const group = piece.groups.find(each => each.parts.some(part => turn.partIds.includes(part.partId)))
  const films = group?.films.filter(film => film.partIds.some(id => turn.partIds.includes(id))) ?? []
  const room = where.rooms.find(each => each.id === group?.roomId)
  const begin = mayBegin({
    status: turn.status === 'waiting' && turn.step.status !== 'set aside' ? 'waiting' : turn.step.status,
    kind: turn.step.kind,
    links: turn.kind === 'work' ? turn.waits : [],
    doubt: films.flatMap(film => film.doubts)[0]?.cause ?? null,
    keepOut: room?.keepOut ? { room: room.name } : null,
  }, now, heardAt, who && { ...who, equipped: who.equipped || goesOn(turn, room?.keepOut?.operatorId ?? null, who) })
  const late = lateness(begin, turn.plan?.lastStartAt ?? null, now)
  const own = films.filter(film => film.step === turn.step.name)
  const state = stepState({ status: turn.step.status, hold: own.find(film => film.hold !== null)?.hold ?? null, doubtful: own.some(film => film.doubts.length > 0), begin, late })
  return { turn, begin, late, state }
}

/** Whether somebody may go on in a shut room: the one who began there, with the exhaust running, and only with solvent coats. */
function goesOn({ step }: TurnState, operatorId: number | null, who: Who): boolean {
  return operatorId !== null && who.memberId === operatorId && step.solventBorne && leavesFilm(step.kind)
}

/** The next moment of one turn alone, for a list of work: chosen as a piece's own is, without its verdict. */
export function turnMoment(turn: ReadTurn, now: number, heardAt: number | null): NextMoment | null {
  const facts = { verdict: noVerdict, lastStarts: lastStarts([turn]), mayBegins: beginnings([turn], now, null), checks: checks([turn]) }
  return nextMoment(facts, now, heardAt)
}

/** The last moment to start one turn that stands now, or the last of them that has passed; null when nothing presses. */
export function startMoment(turn: ReadTurn, now: number): StartBy | null {
  const facts = { verdict: noVerdict, lastStarts: lastStarts([turn]), mayBegins: [], checks: [] }
  const moment = nextMoment(facts, now, null)
  return moment?.kind === 'start by' ? moment : null
}

/** From when one turn may be gone on with, whatever presses it; null while nobody can say. ms as for `readPiece`. */
export function beginMoment(turn: ReadTurn, now: number): NextMoment | null {
  const facts = { verdict: noVerdict, lastStarts: [], mayBegins: beginnings([turn], now, null), checks: checks([turn]) }
  return nextMoment(facts, now, null)
}

/** No time is to read as leave where a room is shut, or before a doubt has been tested. */
const barred = ['keep out', 'doubt']

function lastStarts(turns: readonly ReadTurn[]): LastStart[] {
  return turns.flatMap(({ turn, begin }): LastStart[] => {
    const { plan } = turn
    if (turn.kind !== 'work' || turn.status !== 'waiting' || turn.step.status === 'set aside' || !plan || plan.lastStartAt === null || barred.includes(begin.because.code)) return []
    const common = { stepId: turn.step.id, stepKind: turn.step.kind, what: turn.step.name, shutsAt: begin.till }
    const few = plan.lastStartFewAt === null || plan.firstFew === null ? [] : [{ ...common, at: plan.lastStartFewAt, pieces: { some: plan.firstFew, all: plan.sessionSize } }]
    return [{ ...common, at: plan.lastStartAt, pieces: plan.sessionSize > 1 ? { some: plan.sessionSize, all: plan.sessionSize } : null }, ...few]
  })
}

/** `sessions` null: what the plan has in mind is not asked. Like work of one session is planned as one, so that pieces alike are told alike. */
function beginnings(turns: readonly ReadTurn[], now: number, sessions: NonNullable<Whereabouts['sessions']> | null): Beginning[] {
  return turns.flatMap(({ turn, begin }) => {
    if (turn.kind !== 'work' || turn.status !== 'waiting') return []
    const at = begin.may ? Math.min(begin.from ?? now, now) : begin.from
    return at === null ? [] : [{ stepId: turn.step.id, stepKind: turn.step.kind, at, what: turn.step.name, plannedAt: sessions && turn.plan && (sessions.find(each => each.id === turn.plan?.sessionId) ?? turn.plan).startsAt }]
  })
}

function checks(turns: readonly ReadTurn[]): DueCheck[] {
  return turns.flatMap(({ turn }) => (turn.kind === 'work' || turn.wantedAt === null ? [] : [{ stepId: turn.step.id, at: turn.wantedAt, what: turn.name || turn.step.name, out: turn.kind === 'release' ? turn.step.hold ?? 'clamps' : null }]))
}
