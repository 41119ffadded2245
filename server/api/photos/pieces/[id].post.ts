import { addPhoto } from '~~/server/services/photos'
import { useConfig } from '~~/server/utils/config'
import { isRefusal } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { readUpload } from '~~/server/utils/upload'
import { idParams } from '#shared/schemas/common'
import { largestPhoto, photoQuery } from '#shared/schemas/photo'

/** POST /api/photos/pieces/7: a photograph of a piece; the picture is the body. */
export default defineStudioHandler({
  may: 'add photos',
  params: idParams,
  query: photoQuery,
  run: async ({ db, studio, member, params, query, event, now }) => {
    const data = await readUpload(event, largestPhoto, 'photo')
    return isRefusal(data) ? data : addPhoto(db, useConfig().storageFolder, studio.id, member, params.id, query, data, now)
  },
})
