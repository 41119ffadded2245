import { useAsker } from '~~/server/utils/asker'
import { isRefusal } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { batchToCome } from '#shared/schemas/promise'
import { toWire } from '#shared/schemas/wire'

/** POST /api/promises/estimate: when a batch would be ready that has not been started. Nothing is stored. */
export default defineStudioHandler({
  may: 'promise dates',
  body: batchToCome,
  run: async ({ db, studio, member, body, now }) => {
    const found = await useAsker().ask(db, 'date of new', { studioId: studio.id, request: body }, now, `date ${studio.id} ${member.id}`)
    return isRefusal(found) ? found : toWire(found)
  },
})
