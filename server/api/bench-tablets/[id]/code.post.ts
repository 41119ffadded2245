import { renewPairCode } from '~~/server/services/bench-tablets'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** POST /api/bench-tablets/[id]/code: a new code for a tablet that no device is signed in as yet; `code` is told once. */
export default defineStudioHandler({
  may: 'set up tablets',
  params: idParams,
  run: ({ db, studio, params, now }) => renewPairCode(db, studio.id, params.id, now),
})
