import { handBack } from '~~/server/services/bench-access'
import { defineStudioHandler } from '~~/server/utils/handler'

/** DELETE /api/bench/person: nobody acts as themselves at this tablet any more. */
export default defineStudioHandler({
  may: 'bench',
  run: ({ db, studio, bench }) => {
    handBack(db, studio.id, bench.id)
    return { ok: true }
  },
})
