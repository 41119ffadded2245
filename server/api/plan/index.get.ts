import { planState } from '~~/server/services/plan-state'
import { absent } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { toWire } from '#shared/schemas/wire'

/** GET /api/plan: the plan in force as strips of people and places, what moved of late, and what it costs. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio, now }) => {
    const state = planState(db, studio.id, now)
    return state ? toWire(state) : absent()
  },
})
