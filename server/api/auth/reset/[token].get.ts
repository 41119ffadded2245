import { readReset } from '~~/server/services/password-reset'
import { defineStudioHandler } from '~~/server/utils/handler'
import { tokenParams } from '#shared/schemas/common'

/** GET /api/auth/reset/[token]: whose password a link lets choose, while it opens. */
export default defineStudioHandler({ may: 'anyone', params: tokenParams, run: ({ db, params, now }) => readReset(db, params.token, now) })
