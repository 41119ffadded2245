import { carrier, place, room } from '~~/db/schema'
import { newTagCode } from '~~/server/services/tag-codes'
import type { Database } from '~~/server/utils/database'
import type { PlaceKind } from '#shared/terms'

export type RoomKey = 'bench' | 'workshop' | 'spray' | 'yard'

const rooms = {
  bench: { name: 'Bench room', heated: true, outdoor: false, sprayArea: false, volumeM3: 96, exhaustM3H: null, airChangesPerHour: 5, airMoves: 'fan and windows', nightDropC: 1 },
  workshop: { name: 'Workshop', heated: false, outdoor: false, sprayArea: false, volumeM3: 140, exhaustM3H: null, airChangesPerHour: 2, airMoves: 'windows only', nightDropC: 6 },
  spray: { name: 'Spray room', heated: true, outdoor: false, sprayArea: true, volumeM3: 28, exhaustM3H: 900, airChangesPerHour: null, airMoves: 'measured fan', nightDropC: 2 },
  yard: { name: 'Covered yard', heated: false, outdoor: true, sprayArea: false, volumeM3: null, exhaustM3H: null, airChangesPerHour: null, airMoves: null, nightDropC: 6 },
} as const satisfies Record<RoomKey, unknown>

const placeRows = {
  shelfA: ['bench', 'Shelf A', 'shelf', 12],
  shelfB: ['bench', 'Shelf B', 'shelf', 12],
  rail: ['bench', 'Long rail', 'rail', 12],
  hooks: ['bench', 'Hooks by the stove', 'hook', 6],
  clamps: ['bench', 'Clamps', 'clamps', 8],
  press: ['bench', 'Standing press', 'press', 6],
  bench: ['bench', 'Window bench', 'bench', 10],
  rack: ['bench', 'Drying rack', 'rack', 10],
  cabinet: ['bench', 'Dust-free cabinet', 'drying cabinet', 4],
  floor: ['workshop', 'Workshop floor', 'floor', 3],
  lowShelf: ['workshop', 'Low shelf', 'shelf', 8],
  booth: ['spray', 'Booth rail', 'rail', 6],
  turntable: ['spray', 'Turntable', 'turntable', 2],
  trestle: ['yard', 'Trestle', 'bench', 4],
} as const satisfies Record<string, readonly [RoomKey, string, PlaceKind, number]>
export type PlaceKey = keyof typeof placeRows

const roomKeys = Object.keys(rooms) as RoomKey[]
const placeKeys = Object.keys(placeRows) as PlaceKey[]

export interface Places { rooms: Record<RoomKey, number>, places: Record<PlaceKey, number> }

/** Writes the rooms and places of the demo: a heated bench room, an unheated workshop, a spray room and a covered yard. */
export function addPlaces(db: Database, studioId: number): Places {
  const roomIds = Object.fromEntries(roomKeys.map((key, sort) => [key, db.insert(room).values({ studioId, sort, ...rooms[key] }).returning({ id: room.id }).get().id])) as Record<RoomKey, number>
  const placeIds = Object.fromEntries(placeKeys.map((key, sort) => {
    const [roomKey, name, kind, capacity] = placeRows[key]
    return [key, db.insert(place).values({ studioId, roomId: roomIds[roomKey], name, kind, capacity, sort, code: newTagCode(db, studioId) }).returning({ id: place.id }).get().id]
  })) as Record<PlaceKey, number>
  for (const name of ['Long board', 'Tray 1', 'Tray 2']) db.insert(carrier).values({ studioId, name, code: newTagCode(db, studioId) }).run()
  return { rooms: roomIds, places: placeIds }
}
