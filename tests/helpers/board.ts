import type { FilmState, GroupState, PieceState, StudioState } from '#shared/schemas/piece-state'
import { studioZone } from '#shared/time'
import { readPiece } from '#shared/verdict/piece'

const minute = 60_000
export const noon = Date.UTC(2026, 2, 3, 12)
export const at = (hours: number) => Date.UTC(2026, 2, 3) + hours * 60 * minute
export const clockAt = (now: number) => ({ now, zone: studioZone('UTC') })

/** A coat on at 10:00: set to touch likely 11:00, dry to handle likely 14:00, each 98 % an hour later; cured the next noon. */
export function filmState(changes: Partial<FilmState> = {}): FilmState {
  const rung = (name: 'set-to-touch' | 'dry-to-handle' | 'cured', likelyAt: number) => ({ name, likelyAt, p90At: likelyAt + 30 * minute, p98At: likelyAt + 60 * minute, reachedAt: null, reason: null })
  return {
    coatId: 1, actId: 1, kind: 'coat', step: 'Varnish', material: 'a varnish', materialVersionId: 1, solventBorne: false, mustLieLevel: false, glovesUntil: null,
    partIds: [1], faces: ['front'], layer: 1, beganAt: at(10), endedAt: at(10), hold: null,
    milestones: [rung('set-to-touch', at(11)), rung('dry-to-handle', at(14)), rung('cured', at(36))], windows: [], doubts: [], ...changes,
  }
}

export function groupState(partId: number, placeId: number | null, films: FilmState[] = [], name = 'whole'): GroupState {
  return { parts: [{ partId, key: name, name, grip: null, missingAt: null, seenAt: null }], placeId, roomId: placeId === null ? null : 1, carrier: null, films: films.map(film => ({ ...film, partIds: [partId] })) }
}

export function pieceState(id: number, name: string, groups: GroupState[], changes: Partial<PieceState> = {}): PieceState {
  return { id, name, version: 1, batch: { id: 1, name: 'A batch' }, order: { id: 1, name: 'An order', dueAt: null, promisedAt: null }, groups, turns: [], stepsDone: 0, stepsOf: 0, intake: null, ...changes }
}

/** One room with a shelf of twelve (1), clamps (2) and a rail (3). */
export function studioWith(pieces: PieceState[], changes: Partial<StudioState> = {}): StudioState {
  const place = (id: number, name: string, kind: string, capacity: number) => ({ id, roomId: 1, name, kind, capacity, taken: pieces.filter(piece => piece.groups.some(group => group.placeId === id)).length })
  return {
    at: noon, revision: 1, studio: { id: 1, name: 'Fir Lane', zone: 'UTC', units: 'metric' }, hours: [{ opensAt: at(8), closesAt: at(17.5) }], witnesses: [], handTests: [],
    rooms: [{ id: 1, name: 'Front bench', heated: true, outdoor: false, sprayArea: false, air: { tempC: 19.4, rh: 0.61, readAt: noon - 12 * minute, assumed: false }, waterSpeed: 0.78, keepOut: null }],
    places: [place(1, 'Shelf A', 'shelf', 12), place(2, 'Clamps', 'clamps', 8), place(3, 'Rail', 'rail', 4)],
    pieces, sessions: [], moved: [], rags: [], ...changes,
  }
}

export const readAll = (state: StudioState, now: number) => state.pieces.map(piece => readPiece(piece, state, now, null))
