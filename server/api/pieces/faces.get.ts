import { facesOfPieces } from '~~/server/services/faces'
import { defineStudioHandler } from '~~/server/utils/handler'
import { facesQuery } from '#shared/schemas/piece-list'

/** GET /api/pieces/faces?pieces=3,4: the faces of their parts. */
export default defineStudioHandler({
  may: 'read the studio',
  query: facesQuery,
  run: ({ db, studio, query }) => facesOfPieces(db, studio.id, query.pieces),
})
