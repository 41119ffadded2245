import { withdrawRule } from '~~/server/services/vapour-settings'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/rules/7: withdrawn, and kept in the history. */
export default defineStudioHandler({
  may: 'change settings',
  params: idParams,
  run: ({ db, studio, params, now }) => withdrawRule(db, studio.id, params.id, now),
})
