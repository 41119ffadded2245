import { absent } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { readInvitation } from '~~/server/services/people'
import { settings } from '#shared/words/settings'
import { tokenParams } from '#shared/schemas/common'

/** GET /api/join/[token]: what an invitation offers. */
export default defineStudioHandler({
  may: 'anyone',
  params: tokenParams,
  run: ({ db, params, now }) => {
    const offer = readInvitation(db, params.token, now)
    return offer ? { studio: offer.studioName, role: offer.role, email: offer.email } : absent(settings.invitationAbsent)
  },
})
