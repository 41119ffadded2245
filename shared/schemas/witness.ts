import * as z from 'zod/mini'
import { witnessFields } from '#shared/words/hand-tests'

/** POST /api/witnesses: the act that told of the coat. */
export const witnessBody = z.object({ actId: z.int(witnessFields.act).check(z.positive(witnessFields.act)) })
