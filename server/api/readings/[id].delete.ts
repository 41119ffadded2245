import { removeReading } from '~~/server/services/readings'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/readings/7: takes a reading back. */
export default defineStudioHandler({
  may: 'add readings',
  params: idParams,
  run: ({ db, studio, member, params, now }) => removeReading(db, studio.id, member, params.id, now),
})
