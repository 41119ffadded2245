import { openTin } from '~~/server/services/learned'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** POST /api/materials/7/tin: a new tin is open; tests of the ones before count half. */
export default defineStudioHandler({
  may: 'edit materials',
  params: idParams,
  run: ({ db, studio, member, params, now }) => openTin(db, studio.id, member, params.id, now),
})
