import { defineStudioHandler } from '~~/server/utils/handler'
import { join } from '~~/server/services/people'
import { limitTries } from '~~/server/utils/rate-limit'
import { rememberSession } from '~~/server/utils/session'
import { joinBody } from '#shared/schemas/member'
import { tokenParams } from '#shared/schemas/common'

/** POST /api/join/[token]: joins the studio, as the person signed in or as somebody new. */
export default defineStudioHandler({
  may: 'anyone',
  params: tokenParams,
  body: joinBody,
  run: async ({ db, person, params, body, event, now }) => {
    const blocked = limitTries(event, 'join', '', now)
    if (blocked) return blocked
    const result = await join(db, params.token, person, body, now)
    if (!result.ok) return result
    await rememberSession(event, result.token)
    return { ok: true }
  },
})
