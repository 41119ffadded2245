import { searchInWorker } from '~~/server/planning/search'
import { checkStart } from '~~/server/services/start-check'
import { isRefusal } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { batchToCome } from '#shared/schemas/promise'
import { toWire } from '#shared/schemas/wire'

/** POST /api/batches/start-check: what starting now, later today, at the next opening or at the best hour would mean. Nothing is stored. */
export default defineStudioHandler({
  may: 'start batches',
  body: batchToCome,
  run: async ({ db, studio, member, body, now }) => {
    const found = await checkStart(db, studio.id, member.id, body, now, searchInWorker)
    return isRefusal(found) ? found : toWire(found)
  },
})
