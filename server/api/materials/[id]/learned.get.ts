import { learnedPart } from '~~/server/services/learned'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** GET /api/materials/7/learned: what this studio's touch tests teach about it. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  run: ({ db, studio, params, now }) => learnedPart(db, studio.id, params.id, now),
})
