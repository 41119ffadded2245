import { defineStudioHandler } from '~~/server/utils/handler'
import { listMembers } from '~~/server/services/people'
import { may } from '#shared/permissions'

/** GET /api/members: everybody in the studio; addresses only for those who manage people. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio, member }) => listMembers(db, studio.id, may(member.role, 'manage people')),
})
