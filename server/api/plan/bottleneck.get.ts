import { useAsker } from '~~/server/utils/asker'
import { isRefusal } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { toWire } from '#shared/schemas/wire'

/** GET /api/plan/bottleneck: what pieces wait for, and what one more of each would buy. Takes a second or two for a new plan. */
export default defineStudioHandler({
  may: 'read the studio',
  run: async ({ db, studio, now }) => {
    const found = await useAsker().ask(db, 'bottleneck', { studioId: studio.id }, now)
    return isRefusal(found) ? found : toWire(found)
  },
})
