import { defineStudioHandler } from '~~/server/utils/handler'
import { invite } from '~~/server/services/people'
import { invitationBody } from '#shared/schemas/member'

/** POST /api/invitations: a link for one person; `path` is told once. */
export default defineStudioHandler({
  may: 'manage people',
  body: invitationBody,
  run: ({ db, studio, member, body, now }) => {
    const { token, invitation } = invite(db, studio.id, member.id, body, now)
    return { ok: true, invitation, path: `/join/${token}` }
  },
})
