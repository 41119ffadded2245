import { tagsState } from '~~/server/services/tags'
import { useConfig } from '~~/server/utils/config'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/tags: every place and carrier with what its tag says. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio, now }) => tagsState(db, studio, useConfig().publicUrl, now),
})
