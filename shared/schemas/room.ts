import * as z from 'zod/mini'
import { name, rowId } from '#shared/schemas/common'
import { airMoves, placeKinds } from '#shared/terms'
import { fields } from '#shared/words/fields'

const between = (low: number, high: number, sentence: string) => z.number(sentence).check(z.gte(low, sentence), z.lte(high, sentence))
const sort = z.int(fields.sort).check(z.gte(0, fields.sort), z.lte(9999, fields.sort))

const roomFields = {
  name: name(fields.roomName),
  heated: z.boolean(fields.heated),
  outdoor: z.boolean(fields.outdoor),
  sprayArea: z.boolean(fields.sprayArea),
  sleptIn: z.boolean(fields.sleptIn),
  volumeM3: z.nullable(between(0.1, 100_000, fields.volume)),
  exhaustM3H: z.nullable(between(0, 1_000_000, fields.exhaust)),
  /** Air changes an hour without the exhaust, and how that air is moved: null when nobody said. */
  airChangesPerHour: z.optional(z.nullable(between(0, 500, fields.airChanges))),
  airMoves: z.optional(z.nullable(z.enum(airMoves, fields.airMoves))),
  nightDropC: between(0, 30, fields.nightDrop),
  sort,
}

/** POST /api/rooms. Volume in cubic metres, exhaust in cubic metres an hour; null when unknown. */
export const roomBody = z.strictObject(roomFields)
export type NewRoom = z.output<typeof roomBody>
export const roomPatch = z.partial(roomBody)
export type RoomPatch = z.output<typeof roomPatch>

/** POST /api/places. `capacity` counts size units. */
export const placeBody = z.strictObject({
  roomId: rowId,
  name: name(fields.placeName),
  kind: z.enum(placeKinds, fields.placeKind),
  capacity: z.int(fields.capacity).check(z.gte(1, fields.capacity), z.lte(9999, fields.capacity)),
  sort,
})
export type NewPlace = z.output<typeof placeBody>
export const placePatch = z.partial(placeBody)
export type PlacePatch = z.output<typeof placePatch>

/** `code` is what its tag says; null while it has none. */
export interface PlaceWire extends NewPlace { id: number, code: string | null }
export interface RoomWire extends NewRoom { id: number, places: PlaceWire[] }
