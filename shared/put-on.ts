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

/** The coat or glue-up of a piece that waits for exactly this material, or null. */
export function waitingFor({ turns }: ReadPiece, material: { versionId: number, name: string }): TurnState | null {
  const found = turns.find(({ turn }) => {
    const wets = turn.kind === 'work' && (turn.step.kind === 'coat' || turn.step.kind === 'glue-up')
    const open = (turn.status === 'waiting' || turn.status === 'doing') && turn.step.status !== 'set aside'
    return wets && open && (turn.step.materialVersionId === material.versionId || turn.step.material === material.name)
  })
  return found?.turn ?? null
}

/** One telling: the pieces that share a step, or those outside any. */
export interface PutOnPart { step: TurnState['step'] | null, pieces: ReadPiece[] }

/** The chosen pieces by the step they wait for with this material; the rest take it outside their schedule. */
export function putOnParts(chosen: readonly ReadPiece[], material: { versionId: number, name: string }): PutOnPart[] {
  const parts = new Map<string, PutOnPart>()
  for (const read of chosen) {
    const step = waitingFor(read, material)?.step ?? null
    const key = step?.key ?? ''
    const known = parts.get(key)
    if (known) known.pieces.push(read)
    else parts.set(key, { step, pieces: [read] })
  }
  return [...parts.values()]
}
