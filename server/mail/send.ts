import { createTransport } from 'nodemailer'
import type { SendOutcome } from '~~/server/reminders/types'
import type { SmtpConfig } from '~~/server/utils/config'
import { toNodemailer } from './message'
import type { MailMessage } from './message'
import { putInOutbox } from './outbox'
import { callWords } from '#shared/words/calls'

/** Where mail goes: to a mail server, or into a folder while none is set. */
export interface MailSettings { smtp: SmtpConfig | null, outboxFolder: string }

const wait = { connectionTimeout: 10_000, greetingTimeout: 10_000, socketTimeout: 20_000 }

function field(error: unknown, name: 'code' | 'command' | 'responseCode') {
  return error instanceof Error && name in error ? (error as Error & Record<typeof name, unknown>)[name] : undefined
}

/** What a failed SMTP exchange means: the server's own word first, then how far the exchange had come. */
function outcomeOf(error: unknown): SendOutcome {
  const answer = field(error, 'responseCode')
  if (typeof answer === 'number' && answer >= 500) return { kind: 'failed', problem: callWords.delivery.mailAnswered(answer) }
  if (typeof answer === 'number' && answer >= 400) return { kind: 'unreachable', problem: callWords.delivery.mailAnswered(answer), retryAfterMs: null }
  if (field(error, 'code') === 'EENVELOPE') return { kind: 'failed', problem: callWords.delivery.mailAddressRefused }
  if (field(error, 'command') === 'DATA') return { kind: 'unresolved', problem: callWords.delivery.mailSilent }
  return { kind: 'unreachable', problem: callWords.delivery.mailUnreachable, retryAfterMs: null }
}

async function sendBySmtp(smtp: SmtpConfig, message: MailMessage): Promise<SendOutcome> {
  const transport = createTransport({
    host: smtp.host, port: smtp.port, secure: smtp.secure, ...wait,
    ...(smtp.user === null ? {} : { auth: { user: smtp.user, pass: smtp.password } }),
  })
  try {
    await transport.sendMail(toNodemailer(message))
    return { kind: 'accepted' }
  }
  catch (error) {
    return outcomeOf(error)
  }
  finally {
    transport.close()
  }
}

/** Sends one mail, or keeps it in the outbox. Never throws: what went wrong is in the outcome. */
export async function sendMail(message: MailMessage, settings: MailSettings): Promise<SendOutcome> {
  if (settings.smtp) return sendBySmtp(settings.smtp, message)
  try {
    await putInOutbox(settings.outboxFolder, message)
    return { kind: 'accepted' }
  }
  catch (error) {
    return { kind: 'unreachable', problem: callWords.delivery.outboxUnwritable(error instanceof Error ? error.message : String(error)), retryAfterMs: null }
  }
}
