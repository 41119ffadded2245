import { removeCarrier } from '~~/server/services/carriers'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/carriers/[id]: refused while pieces stand on it, or have stood on it. */
export default defineStudioHandler({
  may: 'edit places',
  params: idParams,
  run: ({ db, studio, params }) => removeCarrier(db, studio.id, params.id),
})
