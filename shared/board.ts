import { dryness } from '#shared/dryness'
import type { FilmState, PlaceState, RoomState, StudioState } from '#shared/schemas/piece-state'
import type { MovedTurn } from '#shared/plan-moves'
import type { StandingPiece } from '#shared/shelf'
import type { Clock } from '#shared/time'
import { aboutToShutMs } from '#shared/verdict/begin'
import { speakingParts } from '#shared/verdict/piece'
import type { ReadGroup, ReadPiece } from '#shared/verdict/piece'
import type { Verdict } from '#shared/verdict/types'
import { groupVerdict } from '#shared/verdict/verdict'
import { airText, keepOutText, partsSuffix, swatchText, takenText } from '#shared/words/board'
import { wasText } from '#shared/words/plan-moves'
import { groupNames } from '#shared/words/group'
import { momentText } from '#shared/words/moments'
import { ofParts } from '#shared/words/parts-said'
import { betterText } from '#shared/words/verdict'

/** What stands of one piece at one place: its groups there, with the verdict on them. Loose parts of a piece lie together. */
export interface Standing { piece: ReadPiece, groups: ReadGroup[], verdict: Verdict, name: string, suffix: string, whole: boolean }

/** A swatch of the drawing: a piece, or several alike beside one another drawn once. */
export interface BoardCell extends StandingPiece { pieceIds: number[], count: number, clamps: number }

export interface BoardPlace { id: number, name: string, kind: string, drawn: 'shelf' | 'rail' | 'clamps', note: string, free: number, cells: BoardCell[], unfolded: boolean }

export interface BoardRoom { id: number, name: string, air: string, keepOut: string | null, places: BoardPlace[] }

export interface BoardDrawing { rooms: BoardRoom[], nowhere: BoardCell[] }

/** From so many swatches in all, or on one place, pieces alike beside one another are drawn once. */
const foldFrom = { studio: 60, place: 12 }

/** What stands at each place, by place id; 0 for what nobody has said the place of. Pieces keep their order. */
export function standings(pieces: readonly ReadPiece[]): Map<number, Standing[]> {
  const found = new Map<number, Standing[]>()
  for (const piece of pieces) {
    const byPlace = new Map<number, ReadGroup[]>()
    for (const group of piece.groups) {
      const placeId = group.group.placeId ?? 0
      byPlace.set(placeId, [...byPlace.get(placeId) ?? [], group])
    }
    if (piece.groups.length === 0) byPlace.set(0, [])
    for (const [placeId, groups] of byPlace) {
      const whole = byPlace.size === 1
      const suffix = whole ? '' : partsSuffix(groups.flatMap(({ group }) => group.parts.map(part => part.name)))
      const verdict = whole ? piece.verdict : groupVerdict(groups.map(each => each.verdict)) ?? piece.verdict
      found.set(placeId, [...found.get(placeId) ?? [], { piece, groups, verdict, name: piece.piece.name, suffix, whole }])
    }
  }
  return found
}

export const filmsOf = (standing: Pick<Standing, 'groups'>): FilmState[] => standing.groups.flatMap(({ group }) => group.films)

const partsOf = ({ groups }: Standing): ReadonlySet<number> => new Set(groups.flatMap(({ group }) => group.parts.map(part => part.partId)))

/** Whether what is next on a piece is done to the parts that stand here. */
function isOfThese(standing: Standing, stepId: number): boolean {
  const here = partsOf(standing)
  return standing.piece.turns.some(({ turn }) => turn.step.id === stepId && turn.partIds.some(id => here.has(id)))
}

/** How the next moment of a piece is said. Parts that stand apart get better by their own films, and wait for what is done to them. */
function momentOf(standing: Standing, clock: Clock): Pick<StandingPiece, 'moment' | 'tone'> {
  const { piece: { next }, verdict, whole } = standing
  if (next === null || (!whole && (next.kind === 'better' || !isOfThese(standing, next.stepId)))) return { moment: betterText(verdict, clock), tone: 'plain' }
  const shutting = next.kind === 'start by' && next.at - clock.now <= aboutToShutMs
  return { moment: momentText(next, clock), tone: shutting ? 'shutting' : next.kind === 'may begin' && next.open ? 'open' : 'plain' }
}

/** One swatch for what stands of a piece at a place. */
export function standingCell(standing: Standing, clock: Clock, moved: ReadonlyMap<number, MovedTurn>): BoardCell {
  const { piece, verdict, name, suffix } = standing
  return {
    key: piece.piece.id, name: name + suffix, pieceName: name, suffix, series: piece.piece.batch.id, dry: dryness(filmsOf(standing), clock.now), kind: verdict.kind, verdict: swatchText(verdict, clock, ofParts(speakingParts(standing.groups, verdict))),
    ...momentOf(standing, clock), was: wasOf(standing, moved, clock), pieceIds: [piece.piece.id], count: 1, clamps: 1,
  }
}

/** Where the plan had the next turn of what stands here before it moved it. */
function wasOf(standing: Standing, moved: ReadonlyMap<number, MovedTurn>, clock: Clock): string | null {
  const here = partsOf(standing)
  const own = standing.piece.turns.filter(({ turn }) => standing.whole || turn.partIds.some(id => here.has(id)))
  const [first] = own.flatMap(({ turn }) => moved.get(turn.turnId) ?? []).sort((a, b) => a.isAt - b.isAt)
  return first ? wasText(first, clock) : null
}

const nameStem = (name: string) => name.replace(/\s+\d+$/, '')
const tenth = (dry: number | null) => dry === null ? null : Math.round(dry * 10)

/** Whether two swatches beside one another say the same of two pieces of one series. */
function isAlike(a: BoardCell, b: BoardCell): boolean {
  return nameStem(a.pieceName) === nameStem(b.pieceName) && a.suffix === b.suffix && a.kind === b.kind && a.verdict === b.verdict && a.moment === b.moment && a.tone === b.tone && a.was === b.was && tenth(a.dry) === tenth(b.dry)
}

const wetter = (a: number | null, b: number | null) => a === null || b === null ? null : Math.min(a, b)

/** Draws runs of swatches that are alike once: "Ledgers 1–12". */
export function foldCells(cells: readonly BoardCell[]): BoardCell[] {
  const runs: BoardCell[][] = []
  for (const cell of cells) {
    const last = runs.at(-1)
    if (last?.[0] && isAlike(last[0], cell)) last.push(cell)
    else runs.push([cell])
  }
  return runs.flatMap((run) => {
    const [first] = run
    if (first === undefined || run.length === 1) return run
    return [{ ...first, name: groupNames(run.map(each => each.pieceName)) + first.suffix, dry: run.map(each => each.dry).reduce(wetter), pieceIds: run.flatMap(each => each.pieceIds), count: run.length, clamps: run.reduce((sum, each) => sum + each.clamps, 0) }]
  })
}

function drawnAs(kind: string): BoardPlace['drawn'] {
  if (kind === 'clamps') return 'clamps'
  return kind === 'rail' || kind === 'hook' ? 'rail' : 'shelf'
}

/** Water-based films that have not come to dry-to-handle: the ones the room's speed is said for. */
function hasWaterDrying(stood: readonly Standing[], now: number): boolean {
  return stood.some(standing => filmsOf(standing).some(film => !film.solventBorne && film.kind === 'coat' && film.material !== null && (dryness([film], now) ?? 0) < 1))
}

/**
 * The studio drawn from the front: rooms, in them places as they stand, on them pieces.
 * @param pieces as `readPiece` reads the state's pieces at `clock.now`
 * @param unfolded places whose folded pieces are to be drawn one by one
 */
export function drawBoard(state: StudioState, pieces: readonly ReadPiece[], clock: Clock, unfolded: ReadonlySet<number> = new Set()): BoardDrawing {
  const stood = standings(pieces)
  const moved = new Map(state.moved.map(each => [each.turnId, each]))
  const many = [...stood.values()].reduce((sum, each) => sum + each.length, 0) >= foldFrom.studio
  const place = (row: PlaceState): BoardPlace => {
    const cells = (stood.get(row.id) ?? []).map(standing => standingCell(standing, clock, moved))
    const folds = many || cells.length > foldFrom.place
    const drawn = folds && !unfolded.has(row.id) ? foldCells(cells) : cells
    return { id: row.id, name: row.name, kind: row.kind, drawn: drawnAs(row.kind), note: takenText(row), free: Math.max(0, row.capacity - row.taken), cells: drawn, unfolded: folds && unfolded.has(row.id) && foldCells(cells).length < cells.length }
  }
  const room = (row: RoomState): BoardRoom => {
    const places = state.places.filter(each => each.roomId === row.id)
    const speed = hasWaterDrying(places.flatMap(each => stood.get(each.id) ?? []), clock.now) ? row.waterSpeed : null
    return { id: row.id, name: row.name, air: airText(row.air, speed, state.studio.units, clock.now), keepOut: row.keepOut ? keepOutText(row.keepOut.opensBy) : null, places: places.map(place) }
  }
  const nowhere = (stood.get(0) ?? []).map(standing => standingCell(standing, clock, moved))
  return { rooms: state.rooms.map(room), nowhere: many ? foldCells(nowhere) : nowhere }
}

/** How much wall a room takes: its swatches and the free places drawn beside them. */
const weightOf = (room: BoardRoom) => 2 + room.places.reduce((sum, place) => sum + 3 + place.cells.length + Math.min(place.free, 7), 0)

/** Rooms in two columns in their own order, the cut where the columns come out most alike. One column for a single room. */
export function roomColumns(rooms: readonly BoardRoom[]): BoardRoom[][] {
  if (rooms.length < 2) return [[...rooms]]
  const weights = rooms.map(weightOf)
  const sum = (list: readonly number[]) => list.reduce((a, b) => a + b, 0)
  // The left column is half as wide again as the right one.
  const unevenness = (cut: number) => Math.max(sum(weights.slice(0, cut)) / 1.5, sum(weights.slice(cut)))
  const cuts = rooms.slice(1).map((_, index) => index + 1)
  const best = cuts.reduce((a, b) => unevenness(b) < unevenness(a) ? b : a)
  return [rooms.slice(0, best), rooms.slice(best)]
}
