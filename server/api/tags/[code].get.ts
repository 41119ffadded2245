import { findTag } from '~~/server/services/tags'
import { defineStudioHandler } from '~~/server/utils/handler'
import { codeParams } from '#shared/schemas/tag'

/** GET /api/tags/K7MP4: which shelf or carrier has this code. */
export default defineStudioHandler({
  may: 'read the studio',
  params: codeParams,
  run: ({ db, studio, person, params }) => findTag(db, studio, person.id, params.code),
})
