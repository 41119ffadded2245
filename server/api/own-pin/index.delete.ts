import { removeOwnPin } from '~~/server/services/member-pins'
import { defineStudioHandler } from '~~/server/utils/handler'

/** DELETE /api/own-pin: takes one's own PIN away. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio, member }) => removeOwnPin(db, studio.id, member.id),
})
