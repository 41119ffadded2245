import { chooseCall } from '~~/server/services/calls'
import { defineStudioHandler } from '~~/server/utils/handler'
import { callChoiceBody } from '#shared/schemas/calls'

/** PUT /api/calls: turns one call on or off for me. */
export default defineStudioHandler({
  may: 'choose own calls',
  body: callChoiceBody,
  run: ({ db, studio, member, body }) => chooseCall(db, studio.id, member.id, body.kind, body.wanted),
})
