import { withdrawStatement } from '~~/server/services/vapour-settings'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/statements/7: withdrawn, and kept in the history. */
export default defineStudioHandler({
  may: 'change settings',
  params: idParams,
  run: ({ db, studio, params, now }) => withdrawStatement(db, studio.id, params.id, now),
})
