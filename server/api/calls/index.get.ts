import { defineStudioHandler } from '~~/server/utils/handler'
import { listCallChoices } from '~~/server/services/calls'

/** GET /api/calls: which calls I get. */
export default defineStudioHandler({
  may: 'choose own calls',
  run: ({ db, studio, member }) => listCallChoices(db, studio.id, member),
})
