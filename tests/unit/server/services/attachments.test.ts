import { createHash } from 'node:crypto'
import { existsSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { asc, eq } from 'drizzle-orm'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { attachment, materialVersion } from '~~/db/schema'
import { attach, dropUnused, keepAttached, readAttachment } from '~~/server/services/attachments'
import { checkType, keepFile, readKept } from '~~/server/services/storage'
import { impossible } from '~~/server/utils/errors'
import { fileRefusals } from '#shared/words/files'
import { testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const pdf = (text: string) => new TextEncoder().encode(`%PDF-1.7\n${text}`)
const sha = (data: Uint8Array) => createHash('sha256').update(data).digest('hex')
let folder: string
beforeEach(() => { folder = mkdtempSync(join(tmpdir(), 'stillwet-files-')) })
afterEach(() => rmSync(folder, { recursive: true }))

describe('a kept file', () => {
  it('is named by what is in it, lies in its studio’s folder, and is whole', async () => {
    const file = await keepFile(folder, 7, pdf('lacquer'))
    expect(file).toEqual({ sha256: sha(pdf('lacquer')), bytes: 16 })
    expect(readdirSync(join(folder, '7'))).toEqual([file.sha256])
    expect(await readKept(folder, 7, file.sha256)).toEqual(Buffer.from(pdf('lacquer')))
    expect(await readKept(folder, 8, file.sha256)).toBeNull()
  })

  it('is not handed out once it is no longer what it was', async () => {
    const { sha256 } = await keepFile(folder, 7, pdf('lacquer'))
    writeFileSync(join(folder, '7', sha256), 'something else')
    expect(await readKept(folder, 7, sha256)).toBeNull()
    await expect(readKept(folder, 7, '../../etc/passwd')).rejects.toThrow('64 hexadecimal digits')
  })

  it('is taken by its first bytes and by nothing else', () => {
    const heic = Uint8Array.from([0, 0, 0, 24, ...new TextEncoder().encode('ftypheic')])
    expect(checkType(pdf(''), ['application/pdf', 'image/png'])).toBe('application/pdf')
    expect(checkType(Uint8Array.from([0xff, 0xd8, 0xff, 0xe0]), ['image/jpeg'])).toBe('image/jpeg')
    expect(checkType(Uint8Array.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]), ['image/png'])).toBe('image/png')
    expect(checkType(heic, ['image/jpeg'])).toMatchObject({ reason: 'malformed', fields: { file: fileRefusals.heic(['image/jpeg']) } })
    expect(checkType(pdf(''), ['image/jpeg'], 'photo')).toMatchObject({ fields: { photo: 'This is a PDF. It must be a JPEG picture.' } })
    const sheetTypes = ['application/pdf', 'image/jpeg', 'image/png'] as const
    expect(checkType(heic, sheetTypes)).toMatchObject({ message: expect.stringContaining('Save it as a JPEG or PNG picture first;') })
    expect(checkType(new TextEncoder().encode('GIF89a'), sheetTypes)).toMatchObject({ message: 'This is a GIF picture. It must be a PDF, or a JPEG or PNG picture.' })
    expect(checkType(pdf(''), ['image/jpeg', 'image/png', 'image/webp'])).toMatchObject({ message: 'This is a PDF. It must be a JPEG, PNG or WebP picture.' })
    expect(checkType(new TextEncoder().encode('<html>sheet.pdf</html>'), ['application/pdf'])).toMatchObject({ message: fileRefusals.unknownType(['application/pdf']) })
    expect(checkType(new Uint8Array(), ['application/pdf'])).toMatchObject({ message: fileRefusals.empty })
  })
})

describe('an attached file', () => {
  const studioWithSheet = async () => {
    const { db, studioId } = testStudio(now)
    const version = db.select().from(materialVersion).where(eq(materialVersion.studioId, studioId)).orderBy(asc(materialVersion.id)).get()
    const add = (text: string) => keepAttached(db, folder, studioId, pdf(text), file => db.transaction(tx => attach(tx, studioId, { kind: 'data sheet', materialVersionId: version?.id ?? 0 }, file, 'Lacquer: sheet/2025.PDF', now)))
    return { db, studioId, add, path: (text: string) => join(folder, String(studioId), sha(pdf(text))) }
  }

  it('comes back with its type and a name any system can keep, and only to its own studio', async () => {
    const { db, studioId, add } = await studioWithSheet()
    const id = await add('lacquer')
    expect(await readAttachment(db, folder, studioId, id, 'data sheet')).toEqual({ data: Buffer.from(pdf('lacquer')), type: 'application/pdf', fileName: 'Lacquer sheet 2025.pdf' })
    expect(await readAttachment(db, folder, studioId + 1, id, 'data sheet')).toMatchObject({ reason: 'absent' })
    expect(await readAttachment(db, folder, studioId, id, 'photo')).toMatchObject({ reason: 'absent' })
    rmSync(join(folder, String(studioId)), { recursive: true })
    expect(await readAttachment(db, folder, studioId, id, 'data sheet')).toMatchObject({ message: fileRefusals.lost })
  })

  it('stays on the disk while another row names it, and goes with the last', async () => {
    const { db, studioId, add, path } = await studioWithSheet()
    const [first, second] = [await add('lacquer'), await add('lacquer')]
    db.delete(attachment).where(eq(attachment.id, first)).run()
    await dropUnused(db, folder, studioId, sha(pdf('lacquer')))
    expect(existsSync(path('lacquer'))).toBe(true)
    db.delete(attachment).where(eq(attachment.id, second)).run()
    await dropUnused(db, folder, studioId, sha(pdf('lacquer')))
    expect(existsSync(path('lacquer'))).toBe(false)
  })

  it('is not left behind by a row that was refused or failed', async () => {
    const { db, studioId, path } = await studioWithSheet()
    expect(await keepAttached(db, folder, studioId, pdf('varnish'), () => impossible('No.'))).toMatchObject({ message: 'No.' })
    await expect(keepAttached(db, folder, studioId, pdf('varnish'), () => { throw new Error('broken') })).rejects.toThrow('broken')
    expect(existsSync(path('varnish'))).toBe(false)
  })

  it('is not taken away between being kept and being named', async () => {
    const { db, studioId, add, path } = await studioWithSheet()
    await Promise.all([add('oil'), dropUnused(db, folder, studioId, sha(pdf('oil'))), add('oil')])
    expect(existsSync(path('oil'))).toBe(true)
  })
})
