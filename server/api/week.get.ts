import { weekLoad } from '~~/server/services/week-load'
import { defineStudioHandler } from '~~/server/utils/handler'
import { absent } from '~~/server/utils/errors'
import { toWire } from '#shared/schemas/wire'

/** GET /api/week: load against capacity and batches against their dates. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio, now }) => {
    const week = weekLoad(db, studio.id, now)
    return week ? toWire(week) : absent()
  },
})
