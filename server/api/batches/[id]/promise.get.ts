import { searchInWorker } from '~~/server/planning/search'
import { promiseState } from '~~/server/services/promises'
import { isRefusal } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { toWire } from '#shared/schemas/wire'

/** GET /api/batches/[id]/promise: when the order of a batch will be ready, and what was promised. */
export default defineStudioHandler({
  may: 'promise dates',
  params: idParams,
  run: async ({ db, studio, params, now }) => {
    const state = await promiseState(db, studio.id, params.id, now, searchInWorker)
    return isRefusal(state) ? state : toWire(state)
  },
})
