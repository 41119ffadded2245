import { setArea } from '~~/server/services/vapour-settings'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { areaBody } from '#shared/schemas/vapour'

/** PUT /api/batches/7/area: how large its pieces are. */
export default defineStudioHandler({
  may: 'start batches',
  params: idParams,
  body: areaBody,
  run: ({ db, studio, params, body }) => setArea(db, studio.id, params.id, body.areaM2),
})
