import { listDeliveries } from '~~/server/services/reminders'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/deliveries: what became of the newest calls. */
export default defineStudioHandler({
  may: 'choose own calls',
  run: ({ db, studio, member }) => listDeliveries(db, studio.id, member),
})
