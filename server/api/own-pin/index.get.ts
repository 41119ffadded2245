import { readOwnPin } from '~~/server/services/member-pins'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/own-pin: whether one has a PIN, and till when it is locked. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio, member, now }) => readOwnPin(db, studio.id, member.id, now),
})
