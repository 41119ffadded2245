import { sendInvitation } from '~~/server/mail/letters'
import { useConfig } from '~~/server/utils/config'
import { defineStudioHandler } from '~~/server/utils/handler'
import { invite } from '~~/server/services/people'
import { hashToken } from '~~/server/utils/token'
import { invitationBody } from '#shared/schemas/member'

/** POST /api/invitations: a link for one person; `path` is told once. `mailed`: the mail server took it for the address given. */
export default defineStudioHandler({
  may: 'manage people',
  body: invitationBody,
  run: async ({ db, studio, member, body, now }) => {
    const { token, invitation } = invite(db, studio.id, member.id, body, now)
    const config = useConfig()
    const path = `/join/${token}`
    const mailed = config.smtp !== null && body.email ? await sendInvitation(config, { to: { name: '', address: body.email }, path, hash: hashToken(token), at: now }, studio.name) : false
    return { ok: true, invitation, path, mailed }
  },
})
