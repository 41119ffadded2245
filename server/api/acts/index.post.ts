import { recordAct } from '~~/server/services/acts'
import { defineStudioHandler } from '~~/server/utils/handler'
import { actRequest } from '#shared/schemas/act'

/** POST /api/acts: one tap. What the person may do depends on the kind and on the step; the service asks. */
export default defineStudioHandler({
  may: 'read the studio',
  body: actRequest,
  run: ({ db, studio, member, body, now }) => recordAct(db, studio.id, { member }, body, now),
})
