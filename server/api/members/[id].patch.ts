import { changeMember } from '~~/server/services/people'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { memberPatch } from '#shared/schemas/member'

/** PATCH /api/members/[id]: the role, and the kinds of step a helper may do. */
export default defineStudioHandler({
  may: 'manage people',
  params: idParams,
  body: memberPatch,
  run: ({ db, studio, params, body }) => changeMember(db, studio.id, params.id, body),
})
