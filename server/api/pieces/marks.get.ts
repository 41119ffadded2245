import { pieceMarks } from '~~/server/services/piece-list'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/pieces/marks: what a search for pieces looks at beside the studio's state. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio }) => pieceMarks(db, studio.id),
})
