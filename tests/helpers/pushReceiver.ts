import { createDecipheriv, createECDH, hkdfSync, randomBytes } from 'node:crypto'
import { createServer } from 'node:http'
import type { IncomingHttpHeaders, IncomingMessage } from 'node:http'
import type { AddressInfo } from 'node:net'

export interface ReceivedPush { path: string, headers: IncomingHttpHeaders, text: string }

/** A browser's half of a subscription: its key pair and its secret, and the reading of a message by RFC 8291 and 8188. */
export function pushBrowser() {
  const pair = createECDH('prime256v1')
  const own = pair.generateKeys()
  const auth = randomBytes(16)
  return { p256dh: own.toString('base64url'), auth: auth.toString('base64url'), read: (message: Buffer) => readMessage(message, { pair, own, auth }) }
}

const derive = (secret: Buffer, salt: Buffer, info: Buffer | string, bytes: number) => Buffer.from(hkdfSync('sha256', secret, salt, info, bytes))

function readMessage(message: Buffer, { pair, own, auth }: { pair: ReturnType<typeof createECDH>, own: Buffer, auth: Buffer }) {
  // RFC 8188, section 2.1: salt (16), record size (4), length of the key id (1), key id: the sender's public key.
  const salt = message.subarray(0, 16)
  const keyLength = message.readUInt8(20)
  const sender = message.subarray(21, 21 + keyLength)
  const body = message.subarray(21 + keyLength)
  // RFC 8291, section 3.4.
  const shared = derive(pair.computeSecret(sender), auth, Buffer.concat([Buffer.from('WebPush: info\0'), own, sender]), 32)
  const decipher = createDecipheriv('aes-128-gcm', derive(shared, salt, 'Content-Encoding: aes128gcm\0', 16), derive(shared, salt, 'Content-Encoding: nonce\0', 12))
  decipher.setAuthTag(body.subarray(-16))
  const padded = Buffer.concat([decipher.update(body.subarray(0, -16)), decipher.final()])
  // The last record ends in a delimiter of 2, then zeros.
  return padded.subarray(0, padded.lastIndexOf(2)).toString()
}

async function readAll(request: IncomingMessage) {
  const parts: Buffer[] = []
  for await (const part of request) parts.push(part as Buffer)
  return Buffer.concat(parts)
}

/** A push service of the test's own on loopback. `answer` gives the status by path and message, 201 by default, when it gets round to it. */
export async function pushService(answer: (path: string, text: string) => number | Promise<number> = () => 201, { browser = pushBrowser(), port = 0 } = {}) {
  const received: ReceivedPush[] = []
  const server = createServer((request, response) => {
    void readAll(request).then(async (message) => {
      const path = request.url ?? ''
      const text = message.length > 0 ? browser.read(message) : ''
      received.push({ path, headers: request.headers, text })
      const status = await answer(path, text)
      response.writeHead(status, status >= 300 && status < 400 ? { location: '/elsewhere' } : {}).end()
    })
  })
  await new Promise<void>(resolve => server.listen(port, '127.0.0.1', resolve))
  const origin = `http://127.0.0.1:${(server.address() as AddressInfo).port}`
  const close = () => new Promise<void>((resolve) => {
    server.closeAllConnections()
    server.close(() => resolve())
  })
  return { origin, received, close, keys: { p256dh: browser.p256dh, auth: browser.auth } }
}
