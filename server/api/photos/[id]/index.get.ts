import { readPhoto } from '~~/server/services/photos'
import { useConfig } from '~~/server/utils/config'
import { defineStudioHandler } from '~~/server/utils/handler'
import { sendPicture } from '~~/server/utils/picture'
import { idParams } from '#shared/schemas/common'

/** GET /api/photos/7: a photograph. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  run: async ({ db, studio, params, event }) => sendPicture(event, await readPhoto(db, useConfig().storageFolder, studio.id, params.id, 'photo')),
})
