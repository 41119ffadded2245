import { useAsker } from '~~/server/utils/asker'
import { isRefusal } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { whatIfBody } from '#shared/schemas/what-if'
import { toWire } from '#shared/schemas/wire'

/** POST /api/plan/what-if: the difference one change would make, on a copy; nothing is kept. */
export default defineStudioHandler({
  may: 'pin the plan',
  body: whatIfBody,
  run: async ({ db, studio, body, now }) => {
    const found = await useAsker().ask(db, 'what if', { studioId: studio.id, change: body }, now)
    return isRefusal(found) ? found : toWire(found)
  },
})
