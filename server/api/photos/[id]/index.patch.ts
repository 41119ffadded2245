import { changePhoto } from '~~/server/services/photos'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { photoPatch } from '#shared/schemas/photo'

/** PATCH /api/photos/7: its step, moment or caption. */
export default defineStudioHandler({
  may: 'add photos',
  params: idParams,
  body: photoPatch,
  run: ({ db, studio, member, params, body }) => changePhoto(db, studio.id, member, params.id, body),
})
