import { giveTagCodes } from '~~/server/services/tag-codes'
import { defineStudioHandler } from '~~/server/utils/handler'

/** POST /api/tags/codes: places that have no code get one. */
export default defineStudioHandler({
  may: 'edit places',
  run: ({ db, studio }) => giveTagCodes(db, studio.id),
})
