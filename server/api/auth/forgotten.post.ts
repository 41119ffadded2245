import { sendReset } from '~~/server/mail/letters'
import { askReset } from '~~/server/services/password-reset'
import { useConfig } from '~~/server/utils/config'
import { impossible } from '~~/server/utils/errors'
import { defineStudioHandler } from '~~/server/utils/handler'
import { limitTries } from '~~/server/utils/rate-limit'
import { forgottenBody } from '#shared/schemas/session'
import { entry } from '#shared/words/entry'

/** POST /api/auth/forgotten: mails a link to a new password. An address nobody has is answered alike, and as soon. */
export default defineStudioHandler({
  may: 'anyone',
  body: forgottenBody,
  run: ({ db, body, event, now }) => {
    const config = useConfig()
    const blocked = limitTries(event, 'forgotten', body.email, now)
    if (blocked) return blocked
    if (!config.smtp) return impossible(entry.noMail)
    const asked = askReset(db, body.email, now)
    if (asked) void sendReset(config, { to: { name: asked.name, address: body.email }, path: `/reset/${asked.token}`, hash: asked.hash, at: now })
    return { ok: true }
  },
})
