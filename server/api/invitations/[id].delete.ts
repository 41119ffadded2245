import { defineStudioHandler } from '~~/server/utils/handler'
import { withdrawInvitation } from '~~/server/services/people'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/invitations/[id]: withdraws one that was not used. */
export default defineStudioHandler({
  may: 'manage people',
  params: idParams,
  run: ({ db, studio, params }) => withdrawInvitation(db, studio.id, params.id),
})
