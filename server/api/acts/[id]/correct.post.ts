import { correctAct } from '~~/server/services/corrections'
import { defineStudioHandler } from '~~/server/utils/handler'
import { correctionRequest } from '#shared/schemas/act'
import { idParams } from '#shared/schemas/common'

/** POST /api/acts/7/correct: another time, other pieces, or taking it back. */
export default defineStudioHandler({
  may: 'read the studio',
  params: idParams,
  body: correctionRequest,
  run: ({ db, studio, member, params, body, now }) => correctAct(db, studio.id, { member }, params.id, body, now),
})
