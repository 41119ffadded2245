import { removeImport } from '~~/server/services/reading-imports'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/reading-imports/7: takes a logger's file back with all its readings. */
export default defineStudioHandler({
  may: 'add readings',
  params: idParams,
  run: ({ db, studio, member, params, now }) => removeImport(db, studio.id, member, params.id, now),
})
