import * as z from 'zod/mini'
import { name } from '#shared/schemas/common'
import { fields } from '#shared/words/fields'

/** POST and PATCH /api/carriers: a board or tray by its name. */
export const carrierBody = z.strictObject({ name: name(fields.carrierName) })

/** The code in a path such as /api/tags/K7MP4, as somebody may have typed it. */
export const codeParams = z.object({ code: z.string().check(z.maxLength(40)) })

/** `stands`: places with their rooms where its pieces stand now. */
export interface CarrierWire { id: number, code: string, name: string, pieces: string[], stands: string[] }

/** One thing that carries a tag. A carrier has no room of its own: it is carried about. */
export interface TagWire {
  kind: 'place' | 'carrier'
  id: number
  /** Null until somebody who may gives it one. */
  code: string | null
  name: string
  room: { id: number, name: string } | null
  pieces: string[]
  /** Keys of the cautions of what stands there and of the room. */
  cautions: string[]
}

/** GET /api/tags: everything that can carry a tag. `address` is where people reach this installation, when a setting says so. */
export interface TagsState { at: number, studio: string, address: string | null, tags: TagWire[] }

/** GET /api/tags/[code]: what carries it here, or the person's other studio that has it. */
export type TagFound = { kind: 'place' | 'carrier', id: number, code: string, name: string, room: { id: number, name: string } | null, cautions: string[] } | { kind: 'elsewhere', studioId: number, studio: string }
