import { defineStudioHandler } from '~~/server/utils/handler'
import { forgiveTries, limitTries } from '~~/server/utils/rate-limit'
import { rememberSession } from '~~/server/utils/session'
import { signIn } from '~~/server/services/people'
import { useConfig } from '~~/server/utils/config'
import { signInBody } from '#shared/schemas/session'

/** POST /api/auth/sign-in: opens a session for an address and a password. */
export default defineStudioHandler({
  may: 'anyone',
  body: signInBody,
  run: async ({ db, body, event, now }) => {
    const blocked = limitTries(event, 'sign-in', body.email, now)
    if (blocked) return blocked
    const result = await signIn(db, body, !useConfig().production, now)
    if (!result.ok) return result
    forgiveTries(event, 'sign-in', body.email)
    await rememberSession(event, result.token)
    return { ok: true }
  },
})
