import { revokeOtherSessions } from '~~/server/services/sessions'
import { endSubscriptionsElsewhere } from '~~/server/services/subscriptions'
import { defineStudioHandler } from '~~/server/utils/handler'
import { signOutElsewhereBody } from '#shared/schemas/telling'

/**
 * POST /api/auth/sign-out-elsewhere: ends every session of this person but the one that asks, and the calls to their browsers but the one with the
 * endpoint given; `ended` and `uncalled` say how many.
 */
export default defineStudioHandler({
  may: 'signed in',
  body: signOutElsewhereBody,
  run: ({ db, sessionHash, person, body, now }) => db.transaction(tx => ({
    ok: true, ended: revokeOtherSessions(tx, person.id, sessionHash, now), uncalled: endSubscriptionsElsewhere(tx, person.id, body.endpoint ?? null, now),
  }), { behavior: 'immediate' }),
})
