import { unpin } from '~~/server/services/pins'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/pins/[id]: lets go what was pinned together with this one. */
export default defineStudioHandler({
  may: 'pin the plan',
  params: idParams,
  run: ({ db, studio, params }) => unpin(db, studio.id, params.id),
})
