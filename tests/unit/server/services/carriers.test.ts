import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { member, person, piece, place, stay, studio } from '~~/db/schema'
import { batchCard } from '~~/server/services/batch-card'
import { addCarrier, listCarriers, removeCarrier, renameCarrier } from '~~/server/services/carriers'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { addPlace } from '~~/server/services/rooms'
import { giveTagCodes } from '~~/server/services/tag-codes'
import { findTag, tagsState } from '~~/server/services/tags'
import { isTagCode } from '#shared/tag-code'
import { hour, testStudio } from '../../../helpers/studio'

const now = Date.UTC(2026, 2, 3, 12)
const iso = (at: number) => new Date(at).toISOString()

function bowls() {
  const test = testStudio(now)
  const { db, studioId, members, places, scheduleOf } = test
  const tray = addCarrier(db, studioId, { name: 'Tray 1' })
  if (!tray.ok) throw new Error(tray.message)
  const started = startBatch(db, studioId, { member: members.maker }, { clientKey: 'bowls-batch', name: 'Bowls', scheduleId: scheduleOf('oiled-bowl'), pieces: ['Bowl 1', 'Bowl 2'], sizeUnits: 1, areaM2: null, placeId: places.shelf, order: null, startsAt: iso(now - hour), oldObject: false }, now - hour)
  if (!started.ok) throw new Error(started.message)
  const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()
  if (!owner) throw new Error('There is no studio.')
  const move = (carrierId: number | null, at = now) => recordAct(db, studioId, { member: members.maker }, { clientKey: `move-${at}`, kind: 'moved', doneAt: iso(at), pieces: db.select({ id: piece.id, version: piece.version }).from(piece).all(), body: { placeId: places.shelf, carrierId } }, at)
  return { ...test, owner, trayId: tray.id, batchId: started.batchId, move }
}

describe('carriers', () => {
  it('get a code of their own, keep it under a new name, and are told apart by name', () => {
    const { db, studioId, trayId } = bowls()
    const [before] = listCarriers(db, studioId)
    expect(isTagCode(before?.code ?? '')).toBe(true)
    expect(renameCarrier(db, studioId, trayId, { name: 'Long board' })).toEqual({ ok: true })
    expect(listCarriers(db, studioId)).toMatchObject([{ name: 'Long board', code: before?.code }])
    expect(addCarrier(db, studioId, { name: 'Long board' })).toMatchObject({ ok: false, reason: 'conflict', message: 'There is a carrier called Long board already.' })
    expect(renameCarrier(db, studioId, 999, { name: 'x' })).toMatchObject({ ok: false, reason: 'absent' })
  })

  it('cannot vanish under what stands on them, nor out of a history', () => {
    const { db, studioId, trayId, move } = bowls()
    expect(move(trayId)).toMatchObject({ ok: true })
    expect(listCarriers(db, studioId)).toMatchObject([{ pieces: ['Bowl 1', 'Bowl 2'], stands: ['Shelf A, Bench'] }])
    expect(removeCarrier(db, studioId, trayId)).toMatchObject({ reason: 'conflict', message: 'These stand on it now: Bowls 1 and 2. Put them elsewhere first.' })
    expect(move(null, now + 60_000)).toMatchObject({ ok: true })
    expect(removeCarrier(db, studioId, trayId)).toMatchObject({ reason: 'conflict', message: 'Pieces have stood on it, and their history names it. Rename it instead.' })
  })

  it('go when nothing ever stood on them; one that is not there is no place to put a piece', () => {
    const { db, studioId, trayId, move } = bowls()
    expect(move(999)).toMatchObject({ reason: 'malformed', fields: { carrierId: 'There is no such carrier in this studio.' } })
    expect(removeCarrier(db, studioId, trayId)).toEqual({ ok: true })
    expect(db.select().from(stay).all().every(each => each.carrierId === null)).toBe(true)
  })
})

describe('tags', () => {
  it('give a new place a code at once and older ones theirs once', () => {
    const { db, studioId, rooms } = bowls()
    const bare = db.select().from(place).all().length
    addPlace(db, studioId, { roomId: rooms.bench, name: 'Rail', kind: 'rail', capacity: 4, sort: 1 })
    expect(giveTagCodes(db, studioId)).toEqual({ ok: true, given: bare })
    expect(giveTagCodes(db, studioId)).toEqual({ ok: true, given: 0 })
    const codes = db.select({ code: place.code }).from(place).all().map(each => each.code)
    expect(new Set(codes).size).toBe(bare + 1)
    expect(codes.every(code => code !== null && isTagCode(code))).toBe(true)
  })

  it('say the cautions of what stands there and of the room', () => {
    const { db, owner } = bowls()
    const { tags } = tagsState(db, owner, null, now)
    const shelf = tags.find(tag => tag.name === 'Shelf A')
    expect(shelf).toMatchObject({ room: { name: 'Bench' }, pieces: ['Bowl 1', 'Bowl 2'] })
    expect(shelf?.cautions).toContain('oily rags')
    expect(tags.find(tag => tag.name === 'Clamps')?.cautions).toEqual([])
    expect(tags.find(tag => tag.name === 'Booth')?.cautions).toEqual(['flames', 'phones'])
  })

  it('lead to a shelf, to another studio of the same person, and else nowhere', () => {
    const { db, studioId, owner, members } = bowls()
    giveTagCodes(db, studioId)
    const code = db.select().from(place).where(eq(place.name, 'Shelf A')).get()?.code ?? ''
    const personId = db.select().from(member).where(eq(member.id, members.maker.id)).get()?.personId ?? 0
    expect(findTag(db, owner, personId, code.toLowerCase())).toMatchObject({ kind: 'place', name: 'Shelf A', code })
    expect(findTag(db, owner, personId, 'K7')).toMatchObject({ reason: 'absent', message: 'A code has 5 letters or figures; this has 2.' })
    const other = db.insert(studio).values({ name: 'Kiln Yard', zone: 'UTC', madeAt: now }).returning().get()
    const stranger = db.insert(person).values({ email: 'otter@example.test', name: 'Otter', passwordHash: 'none' }).returning().get()
    db.insert(member).values({ studioId: other.id, personId: stranger.id, role: 'owner' }).run()
    // A stranger is told what anybody is told of a code that is nobody's.
    expect(findTag(db, other, stranger.id, code)).toMatchObject({ reason: 'absent', message: `No shelf and no carrier of this studio has the code ${code}.` })
    db.insert(member).values({ studioId: other.id, personId, role: 'helper' }).run()
    expect(findTag(db, other, personId, code)).toEqual({ kind: 'elsewhere', studioId, studio: 'Test studio' })
  })
})

describe('the card of a batch', () => {
  it('has the schedule it was started with, its pieces, and the cautions at each step', () => {
    const { db, owner, batchId } = bowls()
    const card = batchCard(db, owner, batchId, 'http://192.168.1.5:3000', now)
    if ('reason' in card) throw new Error(card.message)
    expect(card).toMatchObject({ name: 'Bowls', address: 'http://192.168.1.5:3000', pieces: [{ name: 'Bowl 1' }, { name: 'Bowl 2' }] })
    const oiled = card.schedule?.steps.filter(step => step.kind === 'coat') ?? []
    expect(oiled.length).toBeGreaterThan(0)
    for (const step of oiled) expect(card.stepCautions[step.key], step.key).toContain('oily rags')
    expect(batchCard(db, owner, 999, null, now)).toMatchObject({ reason: 'absent' })
  })
})
