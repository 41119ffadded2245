import { removePhoto } from '~~/server/services/photos'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** POST /api/photos/7/back: has back what was taken away. */
export default defineStudioHandler({
  may: 'add photos',
  params: idParams,
  run: ({ db, studio, member, params, now }) => removePhoto(db, studio.id, member, params.id, false, now),
})
