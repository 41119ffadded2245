import { defineStudioHandler } from '~~/server/utils/handler'
import { listInvitations } from '~~/server/services/people'

/** GET /api/invitations: those still open. */
export default defineStudioHandler({
  may: 'manage people',
  run: ({ db, studio, now }) => listInvitations(db, studio.id, now),
})
