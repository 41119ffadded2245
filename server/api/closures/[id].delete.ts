import { defineStudioHandler } from '~~/server/utils/handler'
import { removeClosure } from '~~/server/services/hours'
import { idParams } from '#shared/schemas/common'
import { may } from '#shared/permissions'

/** DELETE /api/closures/[id]: one's own or, for an owner, any. */
export default defineStudioHandler({
  may: 'set own absences',
  params: idParams,
  run: ({ db, studio, member, params }) => removeClosure(db, studio.id, params.id, may(member.role, 'change settings') ? null : member.id),
})
