import { addCarrier } from '~~/server/services/carriers'
import { defineStudioHandler } from '~~/server/utils/handler'
import { carrierBody } from '#shared/schemas/tag'

/** POST /api/carriers: it is given a code for its tag. */
export default defineStudioHandler({
  may: 'edit places',
  body: carrierBody,
  run: ({ db, studio, body }) => addCarrier(db, studio.id, body),
})
