import { existsSync } from 'node:fs'
import { mkdir, open, readFile, rename } from 'node:fs/promises'
import { join } from 'node:path'
import { createTransport } from 'nodemailer'
import { toNodemailer } from './message'
import type { MailMessage } from './message'

/** A mail lying in the outbox, as Settings lists it. `at` in ms UTC. */
export interface OutboxEntry { name: string, to: string, subject: string, at: number | null, text: string }

const builder = createTransport({ streamTransport: true, buffer: true, newline: 'windows' })

const isName = (stableId: string) => /^[\w-]{1,64}$/.test(stableId)

const fileOf = (folder: string, stableId: string) => {
  if (!isName(stableId)) throw new Error('A mail in the outbox is named by letters, digits, _ and - only.')
  return join(folder, `${stableId}.eml`)
}

/**
 * Puts a mail in the outbox, whole or not at all: written beside, forced to the disk, then given its name.
 * A mail whose name is there already is left as it is, so a repeat never doubles it.
 */
export async function putInOutbox(folder: string, message: MailMessage): Promise<void> {
  const file = fileOf(folder, message.stableId)
  if (existsSync(file)) return
  await mkdir(folder, { recursive: true })
  const built = await builder.sendMail(toNodemailer(message))
  const beside = `${file}.${process.pid}.part`
  const handle = await open(beside, 'w')
  try {
    await handle.writeFile(built.message as Buffer)
    await handle.sync()
  }
  finally {
    await handle.close()
  }
  await rename(beside, file)
}

function header(source: string, name: string) {
  const head = source.split('\r\n\r\n', 1)[0] ?? ''
  const unfolded = head.replace(/\r\n[ \t]+/g, ' ')
  return new RegExp(`^${name}: (.*)$`, 'im').exec(unfolded)?.[1]?.trim() ?? ''
}

/** Reads words that a header carries in encoded form (RFC 2047, UTF-8 only: that is what is written here). */
function plain(words: string) {
  const joined = words.replace(/\?=\s+=\?/g, '?==?')
  return joined.replace(/=\?UTF-8\?([QB])\?([^?]*)\?=/gi, (_, form: string, text: string) => form.toUpperCase() === 'B'
    ? Buffer.from(text, 'base64').toString('utf8')
    : fromQuoted(text.replaceAll('_', ' ')))
}

function fromQuoted(text: string) {
  const bytes = text.replace(/=\r?\n/g, '').replace(/=([0-9A-F]{2})/gi, (_, hex: string) => String.fromCharCode(Number.parseInt(hex, 16)))
  return Buffer.from(bytes, 'latin1').toString('utf8')
}

function readBody(source: string) {
  const body = source.slice(source.indexOf('\r\n\r\n') + 4)
  const form = header(source, 'Content-Transfer-Encoding').toLowerCase()
  const text = form === 'base64' ? Buffer.from(body, 'base64').toString('utf8') : form === 'quoted-printable' ? fromQuoted(body) : body
  return text.replaceAll('\r\n', '\n').trimEnd()
}

/** Those of the named mails that lie in the outbox, in the order of their names. Unreadable names are passed over. */
export async function readOutbox(folder: string, stableIds: readonly string[]): Promise<OutboxEntry[]> {
  const lying = stableIds.filter(stableId => isName(stableId) && existsSync(fileOf(folder, stableId)))
  return Promise.all(lying.map(async (stableId): Promise<OutboxEntry> => {
    const source = await readFile(fileOf(folder, stableId), 'utf8')
    const at = Date.parse(header(source, 'Date'))
    return { name: `${stableId}.eml`, to: plain(header(source, 'To')), subject: plain(header(source, 'Subject')), at: Number.isNaN(at) ? null : at, text: readBody(source) }
  }))
}
