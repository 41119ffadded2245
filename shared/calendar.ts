import type { StepKind } from '#shared/terms'
import type { Clock } from '#shared/time'
import type { ReadPiece } from '#shared/verdict/piece'
import { calendarWords } from '#shared/words/calendar'
import { groupNames } from '#shared/words/group'
import { momentText } from '#shared/words/moments'
import { stepLabel } from '#shared/words/steps'
import { asSentence } from '#shared/words/verdict'

/** One planned turn of a piece, with who is to do it. Instants in ms UTC. */
export interface PlannedTurn {
  turnId: number
  sessionId: number | null
  /** Whose hands it takes. */
  memberIds: number[]
  step: string
  kind: StepKind
  /** A check's or release's own name; null for the step's work itself. */
  check: string | null
  piece: string
  place: string | null
  startsAt: number
  endsAt: number
  lastStartAt: number | null
}

/** One entry of a calendar. `to` null: a moment without a length. `key` stays the same however the plan moves. */
export interface CalendarEntry { key: string, from: number, to: number | null, title: string, says: string, place: string | null }

const quarter = 15 * 60_000
const week = 7 * 24 * 60 * 60_000
const title = (what: string, names: readonly string[]) => `${asSentence(what).slice(0, -1)}, ${groupNames(names)}`

/**
 * Planned work as entries, like work of one session together.
 * @param memberId only theirs; null for everybody's
 */
export function workEntries(turns: readonly PlannedTurn[], memberId: number | null, clock: Clock): CalendarEntry[] {
  const sessions = new Map<string, PlannedTurn[]>()
  for (const turn of turns) {
    if (memberId !== null && !turn.memberIds.includes(memberId)) continue
    const key = turn.sessionId === null ? `turn ${turn.turnId}` : `session ${turn.sessionId}`
    sessions.set(key, [...sessions.get(key) ?? [], turn])
  }
  return [...sessions.values()].flatMap((members): CalendarEntry[] => {
    const first = members[0]
    if (!first) return []
    const starts = members.flatMap(each => each.lastStartAt ?? [])
    const places = [...new Set(members.map(each => each.place))]
    return [{
      key: `work-${Math.min(...members.map(each => each.turnId))}`,
      from: Math.min(...members.map(each => each.startsAt)), to: Math.max(...members.map(each => each.endsAt)),
      title: title(first.check ?? stepLabel(first.kind, first.step), members.map(each => each.piece)),
      says: calendarWords.work(starts.length > 0 ? Math.min(...starts) : null, clock),
      place: places.length === 1 ? places[0] ?? null : null,
    }]
  }).sort((a, b) => a.from - b.from)
}

/** What time alone will bring about in the coming week, as moments: a verdict that gets better, a step that may begin. Alike at one time together. */
export function readyEntries(pieces: readonly ReadPiece[], clock: Clock): CalendarEntry[] {
  const alike = new Map<string, { at: number, says: string, what: string, kind: string, members: ReadPiece[] }>()
  for (const read of pieces) {
    const { next } = read
    if (!next || (next.kind !== 'better' && next.kind !== 'may begin') || next.at <= clock.now || next.at > clock.now + week) continue
    const at = Math.ceil(next.at / quarter) * quarter
    const says = momentText(next, clock)
    const key = `${says} ${at}`
    const known = alike.get(key) ?? { at, says, what: `${next.what}`, kind: next.kind, members: [] }
    alike.set(key, { ...known, members: [...known.members, read] })
  }
  return [...alike.values()].map(({ at, says, what, kind, members }) => ({
    key: `ready-${members[0]!.piece.id}-${kind} ${what}`.replace(/[^\w-]+/g, '-'), from: at, to: null,
    title: calendarWords.ready(groupNames(members.map(each => each.piece.name)), says), says: calendarWords.note, place: null,
  })).sort((a, b) => a.from - b.from)
}
