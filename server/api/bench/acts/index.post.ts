import { tellAtBench } from '~~/server/services/bench-acts'
import { defineStudioHandler } from '~~/server/utils/handler'
import { benchAct } from '#shared/schemas/bench'

/** POST /api/bench/acts: one tap at a bench tablet, under somebody's name or under none. */
export default defineStudioHandler({
  may: 'bench',
  body: benchAct,
  run: ({ db, studio, bench, body, now }) => tellAtBench(db, studio, bench, body, now),
})
