import { sendMail } from '~~/server/mail/send'
import { pushKeys } from '~~/server/push/keys'
import { sendPush } from '~~/server/push/send'
import type { Config } from '~~/server/utils/config'
import type { Database } from '~~/server/utils/database'
import { callWords } from '#shared/words/calls'
import { callTraits } from './kinds'
import type { Channels, OutgoingCall, SendOutcome } from './types'

/** The ways out of this installation, by its settings. */
export function openChannels(db: Database, config: Config): Channels {
  const push = { keys: pushKeys(db, config.pushKeys), subject: config.pushSubject, allowLoopback: config.allowLoopbackPush }
  return {
    push: async (call): Promise<SendOutcome> => {
      if (call.to.channel !== 'push') return { kind: 'failed', problem: callWords.delivery.nobodyThere }
      const { title, body, path, stableId } = call
      const { urgent, keptMin } = callTraits[call.kind]
      return sendPush(call.to, { title, body, path, tag: stableId }, { topic: stableId, ttl: keptMin * 60, urgency: urgent ? 'high' : 'normal' }, push)
    },
    mail: async call => call.to.channel === 'mail' ? sendMail(toMail(call, call.to, config), config) : { kind: 'failed', problem: callWords.delivery.nobodyThere },
  }
}

function toMail(call: OutgoingCall, to: { address: string, name: string }, config: Config) {
  return {
    stableId: call.stableId,
    from: config.smtp?.from ?? 'Stillwet <stillwet@localhost>',
    to: { name: to.name, address: to.address },
    subject: callWords.mail.subject(call.title, call.studioName),
    text: callWords.mail.text(call.body, config.publicUrl === null ? null : `${config.publicUrl}${call.path}`, call.studioName),
    at: Date.now(),
  }
}
