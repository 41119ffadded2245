import { makePromise } from '~~/server/services/promises'
import { useAsker } from '~~/server/utils/asker'
import { isRefusal } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'
import { promiseRequest } from '#shared/schemas/promise'
import { toWire } from '#shared/schemas/wire'

/** POST /api/batches/[id]/promise: gives a date to whoever ordered it. */
export default defineStudioHandler({
  may: 'promise dates',
  params: idParams,
  body: promiseRequest,
  run: async ({ db, studio, params, body, now }) => {
    const state = await makePromise(db, studio.id, params.id, body, now, () => useAsker().ask(db, 'date', { studioId: studio.id, batchId: params.id }, now))
    return isRefusal(state) ? state : toWire(state)
  },
})
