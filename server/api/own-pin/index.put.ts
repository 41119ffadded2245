import { setOwnPin } from '~~/server/services/member-pins'
import { defineStudioHandler } from '~~/server/utils/handler'
import { pinBody } from '#shared/schemas/bench'

/** PUT /api/own-pin: sets or changes one's own PIN. */
export default defineStudioHandler({
  may: 'read the studio',
  body: pinBody,
  run: ({ db, studio, member, body }) => setOwnPin(db, studio.id, member.id, body.pin),
})
