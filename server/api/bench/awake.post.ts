import { keepOpen } from '~~/server/services/bench-access'
import { defineStudioHandler } from '~~/server/utils/handler'

/** POST /api/bench/awake: somebody touched the tablet. One that is locked stays so; `locked` tells. */
export default defineStudioHandler({
  may: 'bench',
  run: ({ db, studio, bench, now }) => {
    keepOpen(db, studio.id, bench, false, now)
    return { ok: true, locked: bench.locked }
  },
})
