import { leavesFilm } from '#shared/step-kinds'
import type { FaceWire } from '#shared/schemas/piece-list'
import type { ReadPiece } from '#shared/verdict/piece'
import type { PlaceState, StudioState, TurnState } from '#shared/schemas/piece-state'

/** The pieces that stand in one place; `place` null for those nobody has placed. */
export interface Standing { place: PlaceState | null, pieces: ReadPiece[] }

/** All pieces by the place they stand in, in the order of the places; a piece in several parts stands where its first part does. */
export function piecesByPlace(state: Pick<StudioState, 'places'>, pieces: readonly ReadPiece[]): Standing[] {
  const placeOf = (read: ReadPiece) => read.piece.groups[0]?.placeId ?? null
  const known = new Set(state.places.map(place => place.id))
  const nowhere = pieces.filter(read => !known.has(placeOf(read) ?? 0))
  return [
    ...state.places.map(place => ({ place, pieces: pieces.filter(read => placeOf(read) === place.id) })),
    { place: null, pieces: nowhere },
  ].filter(each => each.pieces.length > 0)
}

/** Which of the chosen pieces a coat goes on, and where on them: parts and faces are left out where it goes all over. `takes`: whether a step on these parts is meant. */
export interface Meant { pieces: ReadPiece[], partIds?: number[], faces?: string[], takes: (partIds: readonly number[]) => boolean }
const all = { takes: () => true }
type MeantTakes = Pick<Meant, 'takes'>

const partsOf = ({ piece }: ReadPiece) => piece.groups.flatMap(group => group.parts)

/** The names of the parts of pieces that have several, each once, in their order. */
export function partNamesOf(pieces: readonly ReadPiece[]): string[] {
  return [...new Set(pieces.map(partsOf).filter(parts => parts.length > 1).flatMap(parts => parts.map(part => part.name)))]
}

/** The names of the faces of the parts that are meant, each once, in their order. */
export function faceNamesOf(faces: readonly FaceWire[], pieces: readonly ReadPiece[], partNames: readonly string[]): string[] {
  const parts = new Set(meantParts(pieces, partNames).flatMap(each => each.partIds))
  return [...new Set(faces.filter(face => parts.has(face.partId)).map(face => face.name))]
}

/** A piece of one part is always meant whole. */
function meantParts(pieces: readonly ReadPiece[], partNames: readonly string[]) {
  return pieces.map((read) => {
    const parts = partsOf(read)
    const own = parts.length > 1 && partNames.length > 0 ? parts.filter(part => partNames.includes(part.name)) : parts
    return { read, partIds: own.map(part => part.partId), some: own.length < parts.length }
  })
}

/**
 * What a coat goes on: of the chosen pieces the parts of these names, and of those the faces of these names. No names: all of them.
 * Parts without such a face, and pieces without such a part, are not meant.
 */
export function meantOf(pieces: readonly ReadPiece[], partNames: readonly string[], faces: readonly FaceWire[], faceNames: readonly string[]): Meant {
  const wanted = faces.filter(face => faceNames.includes(face.name))
  const onFaces = new Set(wanted.map(face => face.partId))
  const found = meantParts(pieces, partNames).map(each => (wanted.length === 0 ? each : { ...each, partIds: each.partIds.filter(id => onFaces.has(id)), some: true })).filter(each => each.partIds.length > 0)
  const partIds = found.flatMap(each => each.partIds)
  const meant = new Set(partIds)
  return {
    pieces: found.map(each => each.read),
    ...found.some(each => each.some) ? { partIds } : {},
    ...wanted.length > 0 ? { faces: [...new Set(wanted.filter(face => meant.has(face.partId)).map(face => face.key))] } : {},
    takes: ids => wanted.length === 0 && ids.every(id => meant.has(id)),
  }
}

/** The coat or glue-up of a piece that waits for exactly this material, or null. */
export function waitingFor({ turns }: ReadPiece, material: { versionId: number, name: string }, meant: MeantTakes = all): TurnState | null {
  const found = turns.find(({ turn }) => {
    const wets = turn.kind === 'work' && leavesFilm(turn.step.kind)
    const open = (turn.status === 'waiting' || turn.status === 'doing') && turn.step.status !== 'set aside'
    return wets && open && meant.takes(turn.partIds) && (turn.step.materialVersionId === material.versionId || turn.step.material === material.name)
  })
  return found?.turn ?? null
}

/** One telling: the pieces that share a step, or those outside any. */
export interface PutOnPart { step: TurnState['step'] | null, pieces: ReadPiece[] }

/** The chosen pieces by the step they wait for with this material; the rest take it outside their schedule. */
export function putOnParts(chosen: readonly ReadPiece[], material: { versionId: number, name: string }, meant: MeantTakes = all): PutOnPart[] {
  const parts = new Map<string, PutOnPart>()
  for (const read of chosen) {
    const step = waitingFor(read, material, meant)?.step ?? null
    const key = step?.key ?? ''
    const known = parts.get(key)
    if (known) known.pieces.push(read)
    else parts.set(key, { step, pieces: [read] })
  }
  return [...parts.values()]
}
