import { gonePieces } from '~~/server/services/piece-list'
import { defineStudioHandler } from '~~/server/utils/handler'
import { goneQuery } from '#shared/schemas/piece-list'
import { toWire } from '#shared/schemas/wire'

/** GET /api/pieces/gone?find=ledger&after=60: pieces that have left the studio. */
export default defineStudioHandler({
  may: 'read the studio',
  query: goneQuery,
  run: ({ db, studio, query }) => toWire(gonePieces(db, studio.id, query.find, query.after)),
})
