import { mkdtempSync, readdirSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import sharp from 'sharp'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { attachment, photo } from '~~/db/schema'
import { startBatch } from '~~/server/services/batches'
import { addPhoto, changePhoto, forgetPhotos, photosOf, readPhoto, removePhoto } from '~~/server/services/photos'
import { makePictures } from '~~/server/services/pictures'
import { fileRefusals } from '#shared/words/files'
import { photoRefusals } from '#shared/words/photos'
import { heicHeader, phonePicture, plainPicture, tracesIn } from '../../../helpers/pictures'
import { hour, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
let folder: string
beforeEach(() => { folder = mkdtempSync(join(tmpdir(), 'stillwet-photos-')) })
afterEach(() => rmSync(folder, { recursive: true }))

describe('a picture made ready', () => {
  it('stands upright, is no longer than 1600 dots, and tells nothing of place, camera or owner', async () => {
    const given = await phonePicture()
    // The test's own picture carries what is to be left out: else it would prove nothing.
    expect(tracesIn(given)).toEqual(expect.arrayContaining(['Exif', 'xmpmeta', 'Tellingcamera', 'Hidden Person', 'Hidden workshop']))
    expect((await sharp(given).metadata()).orientation).toBe(6)
    const made = await makePictures(given)
    if ('reason' in made) throw new Error(made.message)
    for (const [data, width, height] of [[made.full, 1200, 1600], [made.small, 240, 320]] as const) {
      const about = await sharp(data).metadata()
      // 2400 by 1800 lying on its side is 1800 by 2400 upright, and 1200 by 1600 in the frame of 1600.
      expect(about).toMatchObject({ format: 'webp', width, height })
      expect([about.orientation, about.exif, about.xmp, about.iptc]).toEqual([undefined, undefined, undefined, undefined])
      expect(tracesIn(data)).toEqual([])
      // A quarter turn to the right takes the left half, red, to the top.
      const dot = async (top: number) => [...await sharp(data).extract({ left: 5, top, width: 1, height: 1 }).removeAlpha().raw().toBuffer()]
      const [[red = 0, , noBlue = 255] = [], [noRed = 255, , blue = 0] = []] = [await dot(5), await dot(height - 5)]
      expect([red > 150, noBlue < 60, noRed < 60, blue > 150]).toEqual([true, true, true, true])
    }
  })

  it('is not made larger than it is', async () => {
    expect(await makePictures(await plainPicture())).toMatchObject({ width: 800, height: 600 })
  })

  it('is refused in a sentence when it is broken', async () => {
    const given = await phonePicture(400, 300)
    for (const data of [given.subarray(0, given.length / 2), Uint8Array.from([0xff, 0xd8, 0xff, 0xe0, 1, 2, 3])]) expect(await makePictures(data)).toMatchObject({ reason: 'malformed', fields: { photo: photoRefusals.broken } })
  })
})

function withPiece() {
  const studio = testStudio(now)
  const started = startBatch(studio.db, studio.studioId, { member: studio.members.maker }, { clientKey: 'photo-batch', name: 'Boxes', scheduleId: studio.scheduleOf('painted-waxed-box'), pieces: ['Box 1'], sizeUnits: 1, placeId: studio.places.shelf, order: null, startsAt: new Date(now - hour).toISOString(), oldObject: false }, now)
  if (!started.ok) throw new Error(started.message)
  return { ...studio, pieceId: started.pieceIds[0] ?? 0 }
}
type Studio = ReturnType<typeof withPiece>
const add = async ({ db, studioId, members, pieceId }: Studio, data?: Uint8Array, more: Partial<Parameters<typeof addPhoto>[5]> = {}, role: 'maker' | 'helper' = 'helper') =>
  addPhoto(db, folder, studioId, members[role], pieceId, { clientKey: 'photo-one', moment: 'after', caption: 'the corner', step: 'lid-1', ...more }, data ?? await plainPicture(), now)
const kept = ({ studioId }: Studio) => readdirSync(join(folder, String(studioId))).length
const listed = ({ db, studioId, members, pieceId }: Studio) => photosOf(db, studioId, members.helper, pieceId, new Map([['lid-1', 'First paint']]))

describe('a photograph of a piece', () => {
  it('is kept in two sizes and read back, once however often it is sent', async () => {
    const studio = withPiece()
    const added = await add(studio)
    expect(await add(studio)).toEqual({ ...added, repeated: true })
    expect(studio.db.select().from(attachment).all().map(row => row.kind)).toEqual(['photo', 'thumbnail'])
    expect(listed(studio)).toMatchObject([{ step: 'First paint', moment: 'after', caption: 'the corner', by: 'The helper', mayChange: true }])
    const read = await readPhoto(studio.db, folder, studio.studioId, added.ok ? added.photoId : 0, 'thumbnail')
    expect('data' in read && (await sharp(read.data).metadata()).format).toBe('webp')
  })

  it.each([
    ['a HEIC picture', async () => heicHeader, fileRefusals.heic(['image/jpeg', 'image/png', 'image/webp'])],
    ['what is no picture', async () => new TextEncoder().encode('%PDF-1.7'), fileRefusals.otherType('application/pdf', ['image/jpeg', 'image/png', 'image/webp'])],
    ['half a picture', async () => (await phonePicture(400, 300)).subarray(0, 900), photoRefusals.broken],
  ])('refuses %s in a sentence, and keeps nothing of it', async (_, data, message) => {
    const studio = withPiece()
    expect(await add(studio, await data())).toMatchObject({ ok: false, reason: 'malformed', fields: { photo: message } })
    expect(studio.db.select().from(photo).all()).toEqual([])
    expect(readdirSync(folder)).toEqual([])
  })

  it('wants a step of this piece, and a piece of this studio', async () => {
    const studio = withPiece()
    expect(await add(studio, undefined, { step: 'no such' })).toMatchObject({ reason: 'malformed', fields: { stepKey: photoRefusals.noStep } })
    expect(await add({ ...studio, pieceId: 999 })).toMatchObject({ reason: 'absent' })
  })

  it('is changed and taken away by whoever took it or a maker, and had back for a day', async () => {
    const studio = withPiece()
    const { db, studioId, members } = studio
    const added = await add(studio, undefined, {}, 'maker')
    const id = added.ok ? added.photoId : 0
    expect(changePhoto(db, studioId, members.helper, id, { caption: 'mine' })).toMatchObject({ reason: 'not allowed', message: photoRefusals.othersOnly })
    expect(changePhoto(db, studioId, members.owner, id, { caption: 'the hinge', moment: 'before', stepKey: null })).toEqual({ ok: true })
    expect(listed(studio)).toMatchObject([{ caption: 'the hinge', moment: 'before', step: null, mayChange: false }])
    expect(removePhoto(db, studioId, members.maker, id, true, now)).toEqual({ ok: true })
    expect(listed(studio)).toEqual([])
    expect(await readPhoto(db, folder, studioId, id, 'photo')).toMatchObject({ reason: 'absent' })
    expect(await forgetPhotos(db, folder, now + 23 * hour)).toBe(0)
    expect(removePhoto(db, studioId, members.maker, id, false, now + 23 * hour)).toEqual({ ok: true })
    expect(listed(studio)).toHaveLength(1)
  })

  it('leaves no file behind a day after it was taken away, unless another shows the same', async () => {
    const studio = withPiece()
    const { db, studioId, members } = studio
    const first = await add(studio)
    await add(studio, undefined, { clientKey: 'photo-two' })
    await add(studio, await plainPicture('#203040'), { clientKey: 'photo-three' })
    // Two of one picture share their files: a large and a small one, and two more of the third.
    expect(kept(studio)).toBe(4)
    for (const row of db.select().from(photo).all()) if (!first.ok || row.id !== first.photoId) removePhoto(db, studioId, members.maker, row.id, true, now)
    expect(await forgetPhotos(db, folder, now + 25 * hour)).toBe(2)
    expect(kept(studio)).toBe(2)
    expect(listed(studio)).toHaveLength(1)
  })
})
