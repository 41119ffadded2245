import { filmsOf, standings } from '#shared/board'
import type { Standing } from '#shared/board'
import { dryness } from '#shared/dryness'
import { grouped } from '#shared/grouped'
import type { StudioState } from '#shared/schemas/piece-state'
import { briefCautions, briefDeferral } from '#shared/library/brief-cautions'
import { solventRooms } from '#shared/solvent-rooms'
import { clockTime } from '#shared/time'
import type { Clock } from '#shared/time'
import { speakingParts } from '#shared/verdict/piece'
import type { ReadPiece } from '#shared/verdict/piece'
import type { VerdictKind } from '#shared/verdict/types'
import { groupNames } from '#shared/words/group'
import { ofParts } from '#shared/words/parts-said'
import { sheetKeepOut, sheetRags, sheetVapour, sheetWords } from '#shared/words/sheet'
import { betterText, limitTexts, verdictReason, verdictTitle } from '#shared/words/verdict'

/** Pieces alike at one place: one drawing, one verdict, and what goes with it, a line each. */
export interface SheetCell { key: string, names: string, dry: number | null, kind: VerdictKind, title: string, lines: string[] }

export interface SheetShelf { key: number, name: string, room: string, cells: SheetCell[] }

export interface HandlingSheet { rooms: { id: number, name: string }[], shelves: SheetShelf[], keepOuts: SheetLine[], cautions: SheetLine[] }

interface SheetLine { id: number, head: string, says: string }

/** Reasons that the verdict's own words, or a line of the page, say already. */
const said = ['dry', 'grip wet', 'cut off']

function linesOf({ verdict, groups }: Standing, clock: Clock): string[] {
  const parts = ofParts(speakingParts(groups, verdict))
  const why = said.includes(verdict.reason.code) ? '' : verdictReason(verdict.reason, clock)
  const reason = [`${why}${parts}`.trim()].filter(Boolean)
  const better = betterText(verdict, clock)
  return [...reason, ...better ? [better] : [], ...limitTexts(verdict.limits, clock)]
}

const stemOf = (name: string) => name.replace(/\s+\d+$/, '')

/** One cell for all of a series that the same is said of, in the order in which the first of each stands. */
function cellsOf(stood: readonly Standing[], clock: Clock): SheetCell[] {
  const alike = new Map<string, { standing: Standing, lines: string[], names: string[], dry: (number | null)[] }>()
  for (const standing of stood) {
    const lines = linesOf(standing, clock)
    const key = [stemOf(standing.name), standing.suffix, standing.verdict.kind, standing.verdict.grip ?? '', ...lines].join(' | ')
    const known = alike.get(key) ?? { standing, lines, names: [], dry: [] }
    alike.set(key, { ...known, names: [...known.names, standing.name], dry: [...known.dry, dryness(filmsOf(standing), clock.now)] })
  }
  return [...alike].map(([key, { standing: { verdict, suffix }, lines, names, dry }]) => ({
    key, names: groupNames(names) + suffix, kind: verdict.kind, title: verdictTitle(verdict.kind, verdict.grip), lines,
    dry: dry.reduce((least, each) => least === null || each === null ? null : Math.min(least, each)),
  }))
}

/** Fire first: rags that nobody has answered for, then the rooms with a wet solvent film in one line, whichever room is read. */
function cautionsOf(state: StudioState, pieces: readonly ReadPiece[], clock: Clock): SheetLine[] {
  const wet = solventRooms(pieces.map(read => read.piece), clock.now)
  const rooms = state.rooms.filter(room => wet.has(room.id))
  const keys = ['flames', ...rooms.some(room => !room.outdoor) ? ['vapour'] : [], ...rooms.some(room => room.sprayArea) ? ['phones'] : []]
  return [
    ...state.rags.map(duty => ({ id: -duty.id, ...sheetRags(duty.room, clockTime(duty.sinceAt, clock)) })),
    ...rooms.length > 0 ? [{ id: 0, ...sheetVapour(rooms.map(room => room.name), [...briefCautions(keys), briefDeferral]) }] : [],
  ]
}

/** So many shut rooms have a line each; more are named together by who opens them, so that the shelves keep their place. */
const ownLines = 3

function keepOutsOf({ rooms }: StudioState): SheetLine[] {
  const shut = rooms.flatMap(({ id, name, keepOut }) => keepOut ? [{ id, name, opensBy: keepOut.opensBy }] : [])
  const lines = shut.length > ownLines ? [...grouped(shut, each => each.opensBy ?? '').values()] : shut.map(each => [each])
  return lines.map(line => ({ id: line[0]?.id ?? 0, ...sheetKeepOut(line.map(each => each.name), line[0]?.opensBy ?? null) }))
}

/**
 * What hands may do, shelf by shelf as they stand before the reader. Every shut room is named, whichever room is read.
 * @param roomId only what stands in this room; null for all of them
 */
export function handlingSheet(state: StudioState, pieces: readonly ReadPiece[], clock: Clock, roomId: number | null): HandlingSheet {
  const stood = standings(pieces)
  const rooms = roomId === null ? state.rooms : state.rooms.filter(each => each.id === roomId)
  const shelves = rooms.flatMap(room => state.places.filter(place => place.roomId === room.id)
    .map((place): SheetShelf => ({ key: place.id, name: place.name, room: room.name, cells: cellsOf(stood.get(place.id) ?? [], clock) })))
  const nowhere = roomId === null ? cellsOf(stood.get(0) ?? [], clock) : []
  return {
    rooms: state.rooms.map(({ id, name }) => ({ id, name })),
    shelves: [...shelves, { key: 0, name: sheetWords.nowhere, room: '', cells: nowhere }].filter(each => each.cells.length > 0),
    cautions: cautionsOf(state, pieces, clock),
    keepOuts: keepOutsOf(state),
  }
}
