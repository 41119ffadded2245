import * as z from 'zod/mini'
import { clientKey } from '#shared/schemas/act'
import { photoMoments } from '#shared/terms'
import type { PhotoMoment } from '#shared/terms'
import { photoRefusals } from '#shared/words/photos'

/** A photograph of a piece. Width and height are of the larger file. `addedAt` in ms UTC. */
export interface PhotoLine { id: number, stepKey: string | null, step: string | null, moment: PhotoMoment, caption: string, width: number, height: number, addedAt: number, by: string | null, mayChange: boolean }

const stepKey = z.string(photoRefusals.noStep).check(z.minLength(1, photoRefusals.noStep), z.maxLength(80, photoRefusals.noStep))
const moment = z.enum(photoMoments, photoRefusals.moment)
const caption = z.string(photoRefusals.caption).check(z.trim(), z.maxLength(200, photoRefusals.caption))

/** POST /api/photos/pieces/7?clientKey=...: the picture is the body, what it shows stands in the address. */
export const photoQuery = z.object({ clientKey: z.optional(clientKey), step: z.optional(stepKey), moment: z._default(moment, 'after'), caption: z._default(caption, '') })
export type PhotoRequest = z.infer<typeof photoQuery>

/** What is given is changed, the rest stays. */
export const photoPatch = z.object({ stepKey: z.optional(z.nullable(stepKey)), moment: z.optional(moment), caption: z.optional(caption) })
export type PhotoPatch = z.infer<typeof photoPatch>

/** The largest picture that is taken in, bytes. */
export const largestPhoto = 25_000_000
