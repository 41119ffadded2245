import { removeWitness } from '~~/server/services/witnesses'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/witnesses/7: a board that nobody has tested. */
export default defineStudioHandler({
  may: 'record touch tests',
  params: idParams,
  run: ({ db, studio, params }) => removeWitness(db, studio.id, params.id),
})
