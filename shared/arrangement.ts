import type { StudioState } from '#shared/schemas/piece-state'
import type { Arrangement } from '#shared/schemas/arrangement'

/** How the rooms stand in a studio's state, in their order, with their places in theirs. */
export function arrangementOf({ rooms, places }: Pick<StudioState, 'rooms' | 'places'>): Arrangement {
  return rooms.map(room => ({ id: room.id, places: places.filter(place => place.roomId === room.id).map(({ id, capacity }) => ({ id, capacity })) }))
}

export const isSameArrangement = (a: Arrangement, b: Arrangement) => JSON.stringify(a) === JSON.stringify(b)

/** Whether both speak of the same rooms and places, wherever they stand. */
export function hasSameThings(a: Arrangement, b: Arrangement): boolean {
  const things = (all: Arrangement) => [...all.map(room => `room ${room.id}`), ...all.flatMap(room => room.places.map(place => `place ${place.id}`))].sort().join(' ')
  return things(a) === things(b)
}

/** A place put into a room before the place that stands at `index` there now; the place itself does not count. */
export function putPlace(all: Arrangement, placeId: number, roomId: number, index: number): Arrangement {
  const place = all.flatMap(room => room.places).find(each => each.id === placeId)
  if (!place || !all.some(room => room.id === roomId)) return all
  return all.map((room) => {
    const others = room.places.filter(each => each.id !== placeId)
    return { ...room, places: room.id === roomId ? others.toSpliced(Math.max(0, Math.min(index, others.length)), 0, place) : others }
  })
}

/** A place one earlier (-1) or later (1): past the end of its room it comes into the next one. At the very ends nothing changes. */
export function stepPlace(all: Arrangement, placeId: number, by: -1 | 1): Arrangement {
  const at = all.findIndex(room => room.places.some(place => place.id === placeId))
  const room = all[at]
  if (!room) return all
  const index = room.places.findIndex(place => place.id === placeId) + by
  if (index >= 0 && index < room.places.length) return putPlace(all, placeId, room.id, index)
  const next = all[at + by]
  return next ? putPlace(all, placeId, next.id, by > 0 ? 0 : next.places.length) : all
}

/** A room one earlier or later, with its places. */
export function stepRoom(all: Arrangement, roomId: number, by: -1 | 1): Arrangement {
  const at = all.findIndex(room => room.id === roomId)
  const room = all[at]
  return !room || at + by < 0 || at + by >= all.length ? all : all.toSpliced(at, 1).toSpliced(at + by, 0, room)
}

/** A place that holds so many. */
export const setCapacity = (all: Arrangement, placeId: number, capacity: number): Arrangement =>
  all.map(room => ({ ...room, places: room.places.map(place => (place.id === placeId ? { ...place, capacity } : place)) }))

/** What the next shelf is called where nobody has said: the first letter after the word that is free, then figures. */
export function nextShelfName(names: readonly string[], word: string): string {
  const letters = Array.from({ length: 26 }, (_, no) => String.fromCharCode(65 + no))
  const wanted = [...letters, ...Array.from({ length: 400 }, (_, no) => String(no + 27))].map(each => `${word} ${each}`)
  return wanted.find(name => !names.includes(name)) ?? word
}
