import { existsSync, mkdtempSync, readdirSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { readOutbox } from '~~/server/mail/outbox'
import { sendMail } from '~~/server/mail/send'
import { mailService, refusal } from '../../../helpers/mailReceiver'

const message = {
  stableId: 'AbC_-123', from: 'Stillwet <calls@example.test>', to: { name: 'Zoë', address: 'zoe@example.test' },
  subject: 'Start by 13:50 (Größe)', text: 'Second coat: Ledgers, 12 pieces.\nStart by 13:50 – no later.', at: Date.UTC(2026, 5, 2, 11),
}
const smtp = (port: number) => ({ host: '127.0.0.1', port, secure: false, user: null, password: '', from: message.from })

let folder: string
beforeEach(() => {
  folder = join(mkdtempSync(join(tmpdir(), 'outbox-')), 'outbox')
})
afterEach(() => rmSync(join(folder, '..'), { recursive: true }))

describe('mail by a mail server', () => {
  it('arrives with a Message-ID of the stable id, the same at every try', async () => {
    const server = await mailService()
    const settings = { smtp: smtp(server.port), outboxFolder: folder }
    expect(await sendMail(message, settings)).toEqual({ kind: 'accepted' })
    expect(await sendMail(message, settings)).toEqual({ kind: 'accepted' })
    await server.close()
    expect(server.received).toMatchObject([{ to: ['zoe@example.test'], messageId: 'AbC_-123@example.test' }, { messageId: 'AbC_-123@example.test' }])
    expect(existsSync(folder)).toBe(false)
  })

  it('lets no line break of a name into the headers', async () => {
    const server = await mailService()
    await sendMail({ ...message, subject: 'Start\r\nBcc: other@example.test' }, { smtp: smtp(server.port), outboxFolder: folder })
    await server.close()
    expect(server.received[0]?.to).toEqual(['zoe@example.test'])
    expect(server.received[0]?.source).not.toMatch(/^Bcc:/m)
  })

  it('says what each refusal means', async () => {
    const unknown = await mailService({ unknown: message.to.address })
    expect(await sendMail(message, { smtp: smtp(unknown.port), outboxFolder: folder })).toMatchObject({ kind: 'failed', problem: 'The mail server answered 550.' })
    await unknown.close()
    const busy = await mailService({ onMail: () => Promise.reject(refusal(451, 'Later')) })
    expect(await sendMail(message, { smtp: smtp(busy.port), outboxFolder: folder })).toMatchObject({ kind: 'unreachable' })
    await busy.close()
    // Nobody listens there any more.
    expect(await sendMail(message, { smtp: smtp(busy.port), outboxFolder: folder })).toMatchObject({ kind: 'unreachable', problem: 'The mail server cannot be reached.' })
  })
})

describe('mail without a mail server', () => {
  it('is kept once under its stable id and can be read', async () => {
    const settings = { smtp: null, outboxFolder: folder }
    expect(await sendMail(message, settings)).toEqual({ kind: 'accepted' })
    expect(await sendMail(message, settings)).toEqual({ kind: 'accepted' })
    expect(readdirSync(folder)).toEqual(['AbC_-123.eml'])
    expect(await readOutbox(folder, [message.stableId])).toEqual([{ name: 'AbC_-123.eml', to: 'Zoë <zoe@example.test>', subject: message.subject, at: message.at, text: message.text }])
  })

  it('shows the mails asked for, and nothing else that lies there', async () => {
    expect(await readOutbox(folder, [message.stableId])).toEqual([])
    await sendMail({ ...message, stableId: 'of-another-studio' }, { smtp: null, outboxFolder: folder })
    await sendMail(message, { smtp: null, outboxFolder: folder })
    expect((await readOutbox(folder, ['missing', '../outside', message.stableId])).map(mail => mail.name)).toEqual(['AbC_-123.eml'])
  })

  it('stays queued when the folder cannot be written', async () => {
    expect(await sendMail({ ...message, stableId: '../outside' }, { smtp: null, outboxFolder: folder })).toMatchObject({ kind: 'unreachable' })
    expect(readdirSync(join(folder, '..'))).toEqual([])
  })
})
