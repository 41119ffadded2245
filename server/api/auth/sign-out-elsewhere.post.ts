import { revokeOtherSessions } from '~~/server/services/sessions'
import { defineStudioHandler } from '~~/server/utils/handler'

/** POST /api/auth/sign-out-elsewhere: ends every session of this person but the one that asks; `ended` says how many. */
export default defineStudioHandler({
  may: 'signed in',
  run: ({ db, sessionHash, person, now }) => ({ ok: true, ended: revokeOtherSessions(db, person.id, sessionHash, now) }),
})
