import { useAsker } from '~~/server/utils/asker'
import { isRefusal } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { toWire } from '#shared/schemas/wire'

/** GET /api/batches/[id]/promise: when the order of a batch will be ready, and what was promised. */
export default defineStudioHandler({
  may: 'promise dates',
  params: idParams,
  run: async ({ db, studio, params, now }) => {
    const state = await useAsker().ask(db, 'date', { studioId: studio.id, batchId: params.id }, now)
    return isRefusal(state) ? state : toWire(state)
  },
})
