import { shutAgain } from '~~/server/services/keep-outs'
import { defineStudioHandler } from '~~/server/utils/handler'
import { idParams } from '#shared/schemas/common'

/** POST /api/rooms/7/shut: the last opening is taken back. Everybody may: it can only keep people out. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  run: ({ db, studio, member, params, now }) => shutAgain(db, studio.id, member, params.id, now),
})
