import { setPassword } from '~~/server/services/password-reset'
import { defineStudioHandler } from '~~/server/utils/handler'
import { limitTries } from '~~/server/utils/rate-limit'
import { rememberSession } from '~~/server/utils/session'
import { tokenParams } from '#shared/schemas/common'
import { resetBody } from '#shared/schemas/session'

/** POST /api/auth/reset/[token]: keeps a new password and signs in with it. */
export default defineStudioHandler({
  may: 'anyone',
  params: tokenParams,
  body: resetBody,
  run: async ({ db, params, body, event, now }) => {
    const blocked = limitTries(event, 'reset', '', now)
    if (blocked) return blocked
    const result = await setPassword(db, params.token, body.password, now)
    if (!result.ok) return result
    await rememberSession(event, result.token)
    return { ok: true }
  },
})
