import { findQuiet } from '~~/server/services/calls'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/calls/quiet: my quiet hours. */
export default defineStudioHandler({
  may: 'choose own calls',
  run: ({ db, studio, member }) => findQuiet(db, studio.id, member.id),
})
