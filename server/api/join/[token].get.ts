import { absent } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { readOffer } from '~~/server/services/people'
import { settings } from '#shared/words/settings'
import { tokenParams } from '#shared/schemas/common'

/** GET /api/join/[token]: what an invitation offers. */
export default defineStudioHandler({
  may: 'anyone',
  params: tokenParams,
  run: ({ db, person, params, now }) => readOffer(db, params.token, person, now) ?? absent(settings.invitationAbsent),
})
