import type { PieceState, PlaceState, StudioState } from '#shared/schemas/piece-state'
import { walkWords } from '#shared/words/walk-round'

/** What of a piece stands in one place, as the studio remembers it. `seenAt` the oldest of its parts, ms UTC; `missing` somebody did not find it. */
export interface Expected { piece: PieceState, partIds: number[], name: string, seenAt: number | null, missing: boolean }
export interface Stop { place: PlaceState, room: string, expected: Expected[] }

/** A part that was joined to another has no place of its own, so nobody sees it by itself: it counts with its fellow. */
function oldest(times: readonly (number | null)[]): number | null {
  const known = times.flatMap(at => at ?? [])
  return known.length === 0 ? null : Math.min(...known)
}

/** Every place where something should stand, in the order of the rooms, with what should be there. */
export function walkStops(state: Pick<StudioState, 'places' | 'rooms' | 'pieces'>): Stop[] {
  const order = new Map(state.rooms.map((room, i) => [room.id, i]))
  const places = [...state.places].sort((a, b) => (order.get(a.roomId) ?? 0) - (order.get(b.roomId) ?? 0))
  return places.map((place): Stop => ({
    place, room: state.rooms.find(room => room.id === place.roomId)?.name ?? '',
    expected: state.pieces.flatMap((piece) => {
      const here = piece.groups.filter(group => group.placeId === place.id).flatMap(group => group.parts)
      if (here.length === 0) return []
      const whole = here.length === piece.groups.flatMap(group => group.parts).length
      return { piece, partIds: here.map(part => part.partId), name: whole ? piece.name : walkWords.partsOf(piece.name, here.map(part => part.name)), seenAt: oldest(here.map(part => part.seenAt)), missing: here.some(part => part.missingAt !== null) }
    }),
  })).filter(stop => stop.expected.length > 0)
}

/** How long a shelf that was gone past stays so: a walk is broken off for a call or a customer and taken up again (planning value), ms. */
const brokenOff = 60 * 60_000

/** Which stop to begin with: the first with something that was neither seen lately nor told missing, so that a walk that was broken off goes on where it stopped. `now` in ms UTC. */
export function firstStop(stops: readonly Stop[], now: number): number {
  const isOpen = ({ missing, seenAt }: Expected) => !missing && (seenAt === null || seenAt < now - brokenOff)
  return Math.max(0, stops.findIndex(stop => stop.expected.some(isOpen)))
}

/** What was not found anywhere: what may stand on a shelf where nobody expects it. */
export function lostPieces(stops: readonly Stop[], notHere: number): (Expected & { place: PlaceState })[] {
  return stops.flatMap(({ place, expected }) => place.id === notHere ? [] : expected.filter(each => each.missing).map(each => ({ ...each, place })))
}
