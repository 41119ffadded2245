import { chooseQuiet } from '~~/server/services/calls'
import { defineStudioHandler } from '~~/server/utils/handler'
import { quietBody } from '#shared/schemas/calls'

/** PUT /api/calls/quiet: sets my quiet hours, or ends them. */
export default defineStudioHandler({
  may: 'choose own calls',
  body: quietBody,
  run: ({ db, studio, member, body }) => chooseQuiet(db, studio.id, member.id, body.quiet),
})
