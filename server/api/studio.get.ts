import { defineStudioHandler } from '~~/server/utils/handler'
import { toStudioWire } from '~~/server/services/studios'

/** GET /api/studio: the settings of the studio one looks at. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ studio }) => toStudioWire(studio),
})
