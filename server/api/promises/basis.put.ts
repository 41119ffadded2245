import { changeBasis } from '~~/server/services/promise-basis'
import { defineStudioHandler } from '~~/server/utils/handler'
import { promiseBasisRequest } from '#shared/schemas/promise'

/** PUT /api/promises/basis: what the studio says of its own luck. */
export default defineStudioHandler({
  may: 'promise dates',
  body: promiseBasisRequest,
  run: ({ db, studio, body, now }) => changeBasis(db, studio.id, body, now),
})
