import { addReading } from '~~/server/services/readings'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { readingRequest } from '#shared/schemas/reading'

/** POST /api/rooms/7/readings */
export default defineStudioHandler({
  may: 'add readings',
  params: idParams,
  body: readingRequest,
  run: ({ db, studio, member, params, body, now }) => addReading(db, studio.id, member.id, params.id, body, now),
})
