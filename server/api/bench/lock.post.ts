import { lockBench } from '~~/server/services/bench-access'
import { defineStudioHandler } from '~~/server/utils/handler'

/** POST /api/bench/lock: locks the tablet at once. */
export default defineStudioHandler({
  may: 'bench',
  run: ({ db, studio, bench }) => {
    lockBench(db, studio.id, bench.id)
    return { ok: true }
  },
})
