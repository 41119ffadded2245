import { correctAtBench } from '~~/server/services/bench-acts'
import { defineStudioHandler } from '~~/server/utils/handler'
import { correctionRequest } from '#shared/schemas/act'
import { idParams } from '#shared/schemas/common'

/** POST /api/bench/acts/[id]/correct: takes back or moves what was told at the bench. */
export default defineStudioHandler({
  may: 'bench',
  params: idParams,
  body: correctionRequest,
  run: ({ db, studio, bench, params, body, now }) => correctAtBench(db, studio, bench, params.id, body, now),
})
