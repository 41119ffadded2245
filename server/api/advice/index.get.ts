import { adviceNow } from '~~/server/services/advice/now'
import { defineStudioHandler } from '~~/server/utils/handler'
import { adviceQuery } from '#shared/schemas/advice'

/** GET /api/advice?piece=7: what the air, the films beneath and the wood ask to be minded now; of one piece, or of all. */
export default defineStudioHandler({
  may: 'read the studio',
  query: adviceQuery,
  run: ({ db, studio, query, now }) => adviceNow(db, studio.id, query.piece === undefined ? null : [query.piece], now),
})
