import { endBenchTablet } from '~~/server/services/bench-tablets'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** DELETE /api/bench-tablets/[id]: the device is signed in no more. */
export default defineStudioHandler({
  may: 'set up tablets',
  params: idParams,
  run: ({ db, studio, params, now }) => endBenchTablet(db, studio.id, params.id, now),
})
