import { useAsker } from '~~/server/utils/asker'
import { isRefusal } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { batchToCome } from '#shared/schemas/promise'
import { toWire } from '#shared/schemas/wire'

/** POST /api/batches/start-check: what starting now, later today, at the next opening or at the best hour would mean. Nothing is stored. */
export default defineStudioHandler({
  may: 'start batches',
  body: batchToCome,
  run: async ({ db, studio, member, body, now }) => {
    const found = await useAsker().ask(db, 'start', { studioId: studio.id, request: body }, now, `start ${studio.id} ${member.id}`)
    return isRefusal(found) ? found : toWire(found)
  },
})
