import { arrangePlaces } from '~~/server/services/arrangement'
import { defineStudioHandler } from '~~/server/utils/handler'
import { arrangementBody } from '#shared/schemas/arrangement'

/** PUT /api/places/arrangement */
export default defineStudioHandler({
  may: 'edit places',
  body: arrangementBody,
  run: ({ db, studio, body }) => arrangePlaces(db, studio.id, body),
})
