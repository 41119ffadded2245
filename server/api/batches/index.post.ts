import { startBatch } from '~~/server/services/batches'
import { defineStudioHandler } from '~~/server/utils/handler'
import { batchRequest } from '#shared/schemas/batch'

/** POST /api/batches */
export default defineStudioHandler({
  may: 'start batches',
  body: batchRequest,
  run: ({ db, studio, member, body, now }) => startBatch(db, studio.id, { member }, body, now),
})
