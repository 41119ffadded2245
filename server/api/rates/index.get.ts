import { ratesOf } from '~~/server/services/rates'
import { defineStudioHandler } from '~~/server/utils/handler'
import { ratesQuery } from '#shared/schemas/rate'

/** GET /api/rates?coats=3,4: why these films dry as fast as they do. */
export default defineStudioHandler({
  may: 'read the studio',
  query: ratesQuery,
  run: ({ db, studio, query, now }) => ratesOf(db, studio.id, query.coats.split(',').filter(Boolean).map(Number), now),
})
