import { defineStudioHandler } from '~~/server/utils/handler'
import { removePlace } from '~~/server/services/rooms'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/places/[id]: refused while anything needs it. */
export default defineStudioHandler({
  may: 'edit places',
  params: idParams,
  run: ({ db, studio, params }) => removePlace(db, studio.id, params.id),
})
