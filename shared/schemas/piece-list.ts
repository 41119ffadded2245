import * as z from 'zod/mini'
import type { GoneWay } from '#shared/terms'
import { fields } from '#shared/words/batch'

/** What the studio's state does not say of a piece: every material on it, the codes of what it stands on, and the edition it goes by. */
export interface PieceMarks { id: number, materials: string[], codes: string[], edition: number | null }

/** A piece that has left the studio. `goneAt` in ms UTC. */
export interface GonePiece { id: number, name: string, version: number, batch: { id: number, name: string }, order: string | null, goneAt: number, how: GoneWay | null }

/** The last that went first, so many at a time; `more` when there are others. */
export interface GonePieces { pieces: GonePiece[], more: boolean }

/** GET /api/pieces/gone: those with this in their name, batch or order; `after` so many. */
export const goneQuery = z.object({
  find: z._default(z.string().check(z.trim(), z.maxLength(80)), ''),
  after: z._default(z.pipe(z.string().check(z.regex(/^\d{1,6}$/)), z.transform(Number)), 0),
})

/** A face of a part, as acts name it and as it is called. */
export interface FaceWire { partId: number, key: string, name: string }

/** GET /api/pieces/faces: at most 200 pieces, as an act may speak of; none named, none told. */
export const facesQuery = z.object({ pieces: z._default(z.pipe(z.string(fields.pieceList).check(z.regex(/^([1-9]\d{0,9}(,[1-9]\d{0,9}){0,199})?$/, fields.pieceList)), z.transform((typed: string) => typed.split(',').filter(Boolean).map(Number))), []) })

const name = (sentence: string) => z.object({ name: z.string(sentence).check(z.trim(), z.minLength(1, sentence), z.maxLength(60, sentence)) })

/** What a piece or a batch is called from now on. */
export const pieceName = name(fields.pieceName)
export const batchName = name(fields.batchName)
