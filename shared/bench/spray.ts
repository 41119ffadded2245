import type { PieceState, PlaceState, RoomState } from '#shared/schemas/piece-state'
import { solventRooms } from '#shared/solvent-rooms'

/** Once answered, the warning comes back after so long, and whenever the tablet is opened again. ms, planning value. */
const warnAgainMs = 30 * 60_000

/** `spray`: it stands where spraying is done. `vapour`: a solvent film is wet in its room. `perhaps`: nobody said where it stands, and one is wet somewhere. */
export interface SprayWarning { code: 'spray' | 'vapour' | 'perhaps', rooms: string[] }

interface Studio { rooms: readonly RoomState[], places: readonly PlaceState[], pieces: readonly PieceState[] }

/**
 * Why a tablet should not stay where it is; null where nothing is known against it. No tablet is rated for vapour: it is a
 * source of sparks. Not knowing its room never takes the warning away.
 * @param roomId where it stands; null when nobody said
 * @param now ms UTC
 */
export function sprayWarning({ rooms, places, pieces }: Studio, roomId: number | null, now: number): SprayWarning | null {
  const wet = solventRooms(pieces, now)
  const vapour = rooms.filter(room => !room.outdoor && (wet.has(room.id) || room.keepOut !== null))
  if (roomId === null) return vapour.length > 0 ? { code: 'perhaps', rooms: vapour.map(room => room.name) } : null
  const own = rooms.find(room => room.id === roomId)
  if (!own) return null
  if (own.sprayArea || places.some(place => place.roomId === roomId && place.kind === 'booth')) return { code: 'spray', rooms: [own.name] }
  return wet.has(roomId) || own.keepOut !== null ? { code: 'vapour', rooms: [own.name] } : null
}

/** Whether a warning wants an answer now. */
export const asksAgain = (answeredAt: number | null, now: number) => answeredAt === null || now - answeredAt >= warnAgainMs || now < answeredAt
