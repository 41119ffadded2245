import { sendMail } from '~~/server/mail/send'
import type { Config } from '~~/server/utils/config'
import { letters } from '#shared/words/letters'

interface Letter { to: { name: string, address: string }, path: string, hash: string, at: number }

/** Our own address is the one that was set: what a request names itself could lead a secret elsewhere. */
const linkOf = (config: Config, path: string) => config.publicUrl === null ? null : `${config.publicUrl}${path}`

async function send(config: Config, { to, path, hash, at }: Letter, letter: { subject: string, text: (link: string | null, path: string) => string }) {
  const outcome = await sendMail({ stableId: hash.slice(0, 32), from: config.smtp?.from ?? '', to, subject: letter.subject, text: letter.text(linkOf(config, path), path), at }, config)
  if (outcome.kind !== 'accepted') console.error(`A letter (${letter.subject}) was not taken: ${outcome.problem}`)
  return outcome.kind === 'accepted'
}

/** Sends the link to a new password. Only by a mail server: the outbox can be read by others. */
export const sendReset = (config: Config, letter: Letter) => send(config, letter, letters.reset)

/** Sends an invitation; whether the mail server took it. */
export const sendInvitation = (config: Config, letter: Letter, studio: string) => send(config, letter, letters.invitation(studio))
