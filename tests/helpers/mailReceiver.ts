import type { AddressInfo } from 'node:net'
import { SMTPServer } from 'smtp-server'

export interface ReceivedMail { from: string, to: string[], source: string, messageId: string }

interface Manners {
  /** Called before a mail is taken; what it throws is the server's answer. */
  onMail?: () => void | Promise<void>
  /** An address this server does not know. */
  unknown?: string
  /** Where it listens; a free port when not given. */
  port?: number
}

/** An error that a mail server answers with this code. */
export const refusal = (code: number, text: string) => Object.assign(new Error(text), { responseCode: code })

/** A mail server of the test's own on loopback, without TLS or sign-in. */
export async function mailService({ onMail, unknown, port: wanted = 0 }: Manners = {}) {
  const received: ReceivedMail[] = []
  const server = new SMTPServer({
    authOptional: true, disabledCommands: ['STARTTLS', 'AUTH'], logger: false,
    onRcptTo: (address, _session, done) => done(address.address === unknown ? refusal(550, 'No such mailbox') : null),
    onData: (stream, session, done) => {
      const parts: Buffer[] = []
      stream.on('data', (part: Buffer) => parts.push(part))
      stream.on('end', () => {
        const source = Buffer.concat(parts).toString()
        const { mailFrom, rcptTo } = session.envelope
        Promise.resolve().then(onMail).then(() => {
          received.push({ from: mailFrom ? mailFrom.address : '', to: rcptTo.map(to => to.address), source, messageId: /^Message-ID: <(.*)>/im.exec(source)?.[1] ?? '' })
          done()
        }, (error: Error) => done(error))
      })
    },
  })
  // A client that is killed in the middle is no fault of the server's.
  server.on('error', () => undefined)
  await new Promise<void>(resolve => server.listen(wanted, '127.0.0.1', () => resolve()))
  const { port } = server.server.address() as AddressInfo
  return { port, received, close: () => new Promise<void>(resolve => server.close(() => resolve())) }
}
