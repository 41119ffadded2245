import * as z from 'zod/mini'
import { name } from '#shared/schemas/common'
import { fields } from '#shared/words/fields'

/** POST /api/wall-links */
export const wallLinkBody = z.strictObject({ name: name(fields.wallName) })

export interface WallLinkWire { id: number, name: string, madeAt: string, revokedAt: string | null }
