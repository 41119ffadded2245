import { airNow } from '~~/server/services/air'
import { defineStudioHandler } from '~~/server/utils/handler'
import { toWire } from '#shared/schemas/wire'

/** GET /api/air: the air of every room now and what it does to films. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio, now }) => toWire(airNow(db, studio.id, now)),
})
