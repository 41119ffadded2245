import { renameCarrier } from '~~/server/services/carriers'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { carrierBody } from '#shared/schemas/tag'

/** PATCH /api/carriers/[id]: another name, the same code. */
export default defineStudioHandler({
  may: 'edit places',
  params: idParams,
  body: carrierBody,
  run: ({ db, studio, params, body }) => renameCarrier(db, studio.id, params.id, body),
})
