import { grouped } from '#shared/grouped'
import type { Job } from '#shared/hands'
import type { PieceMarks } from '#shared/schemas/piece-list'
import type { StudioState } from '#shared/schemas/piece-state'
import { filmFacts } from '#shared/verdict/facts'
import { isWet } from '#shared/verdict/films'
import { groupMoment } from '#shared/verdict/next'
import type { NextMoment } from '#shared/verdict/next'
import type { ReadPiece } from '#shared/verdict/piece'
import { verdictKinds } from '#shared/verdict/types'
import type { VerdictKind } from '#shared/verdict/types'

export const pieceSorts = ['moment', 'name', 'place', 'due'] as const
export type PieceSort = typeof pieceSorts[number]

/** What is looked for, as the address of the page says it. */
export interface PieceFilter {
  find: string
  place: number | null
  room: number | null
  batch: number | null
  verdict: VerdictKind | null
  hands: boolean
  wet: boolean
  gone: boolean
  sort: PieceSort
}

/** The values of one key of an address, as the router gives them. */
type Given = Readonly<Record<string, unknown>>

const first = (value: unknown) => (Array.isArray(value) ? value[0] : value) as unknown
const asText = (value: unknown) => (typeof value === 'string' ? value : '')
const asId = (value: unknown) => (/^[1-9]\d{0,14}$/.test(asText(value)) ? Number(value) : null)

/** Reads a filter from an address; what it does not understand asks for nothing. */
export function readFilter(given: Given): PieceFilter {
  const at = (key: string) => first(given[key])
  return {
    find: asText(at('find')).slice(0, 80), place: asId(at('place')), room: asId(at('room')), batch: asId(at('batch')),
    verdict: verdictKinds.find(kind => kind === at('verdict')) ?? null,
    hands: at('hands') === '1', wet: at('wet') === '1', gone: at('gone') === '1', sort: pieceSorts.find(sort => sort === at('sort')) ?? 'moment',
  }
}

/** The address of a filter: only what it asks for stands in it. */
export function filterQuery(filter: PieceFilter): Record<string, string> {
  const said = { find: filter.find.trim(), place: filter.place, room: filter.room, batch: filter.batch, verdict: filter.verdict, hands: filter.hands ? 1 : null, wet: filter.wet ? 1 : null, gone: filter.gone ? 1 : null, sort: filter.sort === 'moment' ? null : filter.sort }
  return Object.fromEntries(Object.entries(said).flatMap(([key, value]) => (value === null || value === '' ? [] : [[key, String(value)]])))
}

/** How many things are asked for, the search and the order aside. */
export const countAsked = (filter: PieceFilter) => [filter.place, filter.room, filter.batch, filter.verdict].filter(each => each !== null).length + [filter.hands, filter.wet, filter.gone].filter(Boolean).length

const plain = (text: string) => text.toLocaleLowerCase('en').normalize('NFD').replace(/\p{M}/gu, '')

/** All that a piece can be found by, in one line. */
function wordsOf({ piece }: ReadPiece, marks: PieceMarks | undefined): string {
  const films = piece.groups.flatMap(group => group.films.map(film => film.material ?? ''))
  const carriers = piece.groups.map(group => group.carrier ?? '')
  return plain([piece.name, piece.batch.name, piece.order?.name ?? '', ...films, ...carriers, ...marks?.materials ?? [], ...marks?.codes ?? []].join(' \n '))
}

/** Whether any film of a piece is wet, as the verdict has it. `now` in ms UTC. */
export const isWetPiece = ({ piece }: ReadPiece, now: number) => piece.groups.some(group => group.films.some(film => isWet(filmFacts(film), now)))

/** The pieces that hands are wanted for now, as the screen of the hands has it. */
export const waitingForHands = (jobs: readonly Job[]) => new Set(jobs.filter(job => job.section === 'now').flatMap(job => job.pieces.map(each => each.read.piece.id)))

/** What the finding goes by beside the pieces themselves. `hands` is asked only when it is looked for. */
export interface Looking { now: number, marks: ReadonlyMap<number, PieceMarks>, hands: () => ReadonlySet<number> }

/** The pieces a filter leaves, in the order they came. Each word of the search has to be somewhere in what a piece is found by. */
export function findPieces(pieces: readonly ReadPiece[], filter: PieceFilter, looking: Looking): ReadPiece[] {
  const words = plain(filter.find).split(/\s+/).filter(Boolean)
  const hands = filter.hands ? looking.hands() : null
  return pieces.filter((read) => {
    const { piece, verdict } = read
    const stands = (wanted: number | null, of: (group: (typeof piece.groups)[number]) => number | null) => wanted === null || piece.groups.some(group => of(group) === wanted)
    if (!stands(filter.place, group => group.placeId) || !stands(filter.room, group => group.roomId)) return false
    if (filter.batch !== null && piece.batch.id !== filter.batch) return false
    if (filter.verdict !== null && verdict.kind !== filter.verdict) return false
    if (hands && !hands.has(piece.id)) return false
    if (filter.wet && !isWetPiece(read, looking.now)) return false
    if (words.length === 0) return true
    const own = wordsOf(read, looking.marks.get(piece.id))
    return words.every(word => own.includes(word))
  })
}

/** Pieces that stand together in the list, under one heading: a batch, a place, or an order. `key` is the same from one reading to the next. */
export interface PieceGroup { key: string, name: string, dueAt: number | null, pieces: ReadPiece[], worst: VerdictKind, next: NextMoment | null }

const byName = new Intl.Collator('en', { numeric: true, sensitivity: 'base' })
const late = Number.MAX_SAFE_INTEGER
const momentAt = (read: ReadPiece, now: number) => (read.next === null ? late : Math.max(read.next.at, now))

interface Heading { key: string, name: string, dueAt: number | null }
type Headings = (read: ReadPiece) => Heading

function headingsFor(sort: PieceSort, state: Pick<StudioState, 'places'>, words: { nowhere: string, noOrder: string }): Headings {
  const places = new Map(state.places.map(place => [place.id, place.name]))
  if (sort === 'place') return ({ piece }) => {
    const id = piece.groups[0]?.placeId ?? null
    const name = id === null ? undefined : places.get(id)
    return { key: `place ${name === undefined ? 0 : id}`, name: name ?? words.nowhere, dueAt: null }
  }
  if (sort === 'due') return ({ piece }) => ({ key: `order ${piece.order?.id ?? 0}`, name: piece.order?.name ?? words.noOrder, dueAt: piece.order?.dueAt ?? null })
  return ({ piece }) => ({ key: `batch ${piece.batch.id}`, name: piece.batch.name, dueAt: null })
}

/**
 * The list: by place under the places in their order, by due date under the orders, else under the batches; those first
 * that are named first, due first or whose next moment comes first, and within each the pieces likewise.
 */
export function groupPieces(pieces: readonly ReadPiece[], sort: PieceSort, state: Pick<StudioState, 'places'>, now: number, words: { nowhere: string, noOrder: string }): PieceGroup[] {
  const heading = headingsFor(sort, state, words)
  const compare = (a: ReadPiece, b: ReadPiece) => (sort === 'moment' ? momentAt(a, now) - momentAt(b, now) : 0) || byName.compare(a.piece.name, b.piece.name) || a.piece.id - b.piece.id
  const rank = new Map(state.places.map((place, index) => [`place ${place.id}`, index]))
  const found = [...grouped([...pieces].sort(compare), read => heading(read).key)].flatMap(([, own]): PieceGroup[] => {
    const [head] = own
    return head ? [{ ...heading(head), pieces: own, worst: worstOf(own), next: groupMoment(own.flatMap(read => read.next ?? [])) }] : []
  })
  if (sort === 'place') return found.sort((a, b) => (rank.get(a.key) ?? late) - (rank.get(b.key) ?? late))
  if (sort === 'due') return found.sort((a, b) => (a.dueAt ?? late) - (b.dueAt ?? late) || byName.compare(a.name, b.name))
  return found
}

const worstOf = (pieces: readonly ReadPiece[]): VerdictKind => verdictKinds.find(kind => pieces.some(read => read.verdict.kind === kind)) ?? 'may be handled'
