import { createMix } from '~~/server/services/mixes'
import { defineStudioHandler } from '~~/server/utils/handler'
import { mixBody } from '#shared/schemas/material-edit'

/** POST /api/mixes: a new material made of others. */
export default defineStudioHandler({
  may: 'edit materials',
  body: mixBody,
  run: ({ db, studio, member, body, now }) => createMix(db, studio.id, member, body, now),
})
