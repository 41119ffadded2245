import { resetLearned } from '~~/server/services/learned'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { resetBody } from '#shared/schemas/learned'

/** POST /api/materials/7/reset: forgets what its tests so far have taught, or counts them again. */
export default defineStudioHandler({
  may: 'edit materials',
  params: idParams,
  body: resetBody,
  run: ({ db, studio, member, params, body, now }) => resetLearned(db, studio.id, member, params.id, body.forget, now),
})
