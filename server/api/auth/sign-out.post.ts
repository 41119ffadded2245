import { defineStudioHandler } from '~~/server/utils/handler'
import { forgetSession } from '~~/server/utils/session'
import { revokeSession } from '~~/server/services/sessions'

/** POST /api/auth/sign-out: ends this session for good. */
export default defineStudioHandler({
  may: 'anyone',
  run: async ({ db, sessionHash, event, now }) => {
    if (sessionHash) revokeSession(db, sessionHash, now)
    await forgetSession(event)
    return { ok: true }
  },
})
