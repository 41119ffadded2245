import { changeStudio } from '~~/server/services/studios'
import { defineStudioHandler } from '~~/server/utils/handler'
import { studioPatch } from '#shared/schemas/studio'

/** PATCH /api/studio: name, zone, units, usual climate. */
export default defineStudioHandler({
  may: 'change settings',
  body: studioPatch,
  run: ({ db, studio, body }) => changeStudio(db, studio.id, body),
})
