import type { Channels, OutgoingCall, SendOutcome } from '~~/server/reminders/types'

/** Channels that keep what they are given and answer as told; accepted by default. */
export function fakeChannels(answer: (call: OutgoingCall) => SendOutcome | Promise<SendOutcome> = () => ({ kind: 'accepted' })) {
  const sent: OutgoingCall[] = []
  const send = async (call: OutgoingCall) => {
    sent.push(call)
    return answer(call)
  }
  const channels: Channels = { push: send, mail: send }
  return { channels, sent }
}
