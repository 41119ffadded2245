import { planAnew } from '~~/server/services/plan-anew'
import { defineStudioHandler } from '~~/server/utils/handler'

/** POST /api/plan: makes the plan anew, moving whatever is neither pinned nor in hand where that buys anything. Takes a second or two. */
export default defineStudioHandler({
  may: 'pin the plan',
  run: ({ db, studio, now }) => planAnew(db, studio.id, now),
})
