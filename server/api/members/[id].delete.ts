import { defineStudioHandler } from '~~/server/utils/handler'
import { removeMember } from '~~/server/services/people'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/members/[id]: ends a membership. */
export default defineStudioHandler({
  may: 'manage people',
  params: idParams,
  run: ({ db, studio, params, now }) => removeMember(db, studio.id, params.id, now),
})
