import { readBenchPage } from '~~/server/services/bench-tablets'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/bench: what this tablet is, whether it is locked, and who acts at it. */
export default defineStudioHandler({
  may: 'bench',
  run: ({ db, studio, bench }) => readBenchPage(db, studio, bench),
})
