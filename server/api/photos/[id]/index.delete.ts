import { removePhoto } from '~~/server/services/photos'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/photos/7: takes it away; for a day it can be had back. */
export default defineStudioHandler({
  may: 'add photos',
  params: idParams,
  run: ({ db, studio, member, params, now }) => removePhoto(db, studio.id, member, params.id, true, now),
})
