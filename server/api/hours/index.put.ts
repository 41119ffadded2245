import { defineStudioHandler } from '~~/server/utils/handler'
import { replaceHours } from '~~/server/services/hours'
import { hoursBody } from '#shared/schemas/hours'

/** PUT /api/hours: replaces the hours of the studio or of one person. */
export default defineStudioHandler({
  may: 'change settings',
  body: hoursBody,
  run: ({ db, studio, body }) => replaceHours(db, studio.id, body),
})
