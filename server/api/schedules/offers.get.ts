import { scheduleOffers } from '~~/server/services/schedule-offers'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/schedules/offers: what was put on alike often enough to be kept as a schedule. */
export default defineStudioHandler({
  may: 'edit schedules',
  run: ({ db, studio, now }) => scheduleOffers(db, studio, now),
})
