import { renameBatch } from '~~/server/services/piece-renames'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { batchName } from '#shared/schemas/piece-list'

/** PATCH /api/batches/7: what it is called. */
export default defineStudioHandler({
  may: 'start batches',
  params: idParams,
  body: batchName,
  run: ({ db, studio, member, params, body, now }) => renameBatch(db, studio.id, member, params.id, body.name, now),
})
