import { batchCard } from '~~/server/services/batch-card'
import { useConfig } from '~~/server/utils/config'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** GET /api/batches/[id]/card: the paper twin of a batch. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  run: ({ db, studio, params, now }) => batchCard(db, studio, params.id, useConfig().publicUrl, now),
})
