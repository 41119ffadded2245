import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { batch, order, piece } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { correctAct } from '~~/server/services/corrections'
import { pieceStates } from '~~/server/services/piece-states'
import type { ActRequest } from '#shared/schemas/act'
import type { Role } from '#shared/terms'
import { renameBatch } from '~~/server/services/piece-renames'
import { actRefusals } from '#shared/words/acts'
import { regroupRefusals } from '#shared/words/batch'
import { hour, minute, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const iso = (at: number) => new Date(at).toISOString()
let keys = 0
const key = () => `regroup-${keys += 1}`

function withBatches() {
  const studio = testStudio(now)
  const start = (name: string, schedule: string, pieces: string[], ordered: string | null) => {
    const started = startBatch(studio.db, studio.studioId, { member: studio.members.maker }, {
      clientKey: key(), name, scheduleId: studio.scheduleOf(schedule), pieces, sizeUnits: 1, placeId: studio.places.shelf, order: ordered === null ? null : { name: ordered, dueAt: iso(now + 48 * hour) }, startsAt: iso(now - 2 * hour), oldObject: false,
    }, now)
    if (!started.ok) throw new Error(started.message)
    return started
  }
  return { ...studio, boxes: start('Boxes', 'painted-waxed-box', ['Box 1', 'Box 2', 'Box 3'], 'Fair'), more: start('More boxes', 'painted-waxed-box', ['Box 4', 'Box 1'], null), bowls: start('Bowls', 'oiled-bowl', ['Bowl 1'], null) }
}
type Studio = ReturnType<typeof withBatches>

function tell({ db, studioId, members, places }: Studio, kind: ActRequest['kind'], ids: readonly number[], body: ActRequest['body'] = {}, role: Role = 'maker', at = now) {
  const states = db.select({ id: piece.id, version: piece.version }).from(piece).all()
  const pieces = ids.map(id => ({ id, version: states.find(each => each.id === id)?.version ?? 0 }))
  return recordAct(db, studioId, { member: members[role] }, { clientKey: key(), kind, doneAt: iso(at), pieces, body: kind === 'back' ? { placeId: places.shelf, ...body } : body }, now)
}
const inBatch = ({ db }: Studio, batchId: number) => db.select({ id: piece.id, ordinal: piece.ordinal }).from(piece).where(eq(piece.batchId, batchId)).all()

describe('splitting a batch', () => {
  it('puts some pieces into a new batch of the same order, with their history and their steps', () => {
    const studio = withBatches()
    const [first = 0, second = 0] = studio.boxes.pieceIds
    expect(tell(studio, 'coat on', [first], { step: 'lid-1' }, 'maker', now - 30 * minute)).toMatchObject({ ok: true })
    const films = pieceStates(studio.db, studio.studioId, [first])[0]?.groups.flatMap(group => group.films)
    expect(tell(studio, 'regrouped', [first, second], { name: 'Seconds' })).toMatchObject({ ok: true })
    const [state] = pieceStates(studio.db, studio.studioId, [first])
    expect(state?.batch.name).toBe('Seconds')
    expect(state?.order?.name).toBe('Fair')
    expect(state?.groups.flatMap(group => group.films)).toEqual(films)
    expect(inBatch(studio, studio.boxes.batchId).map(each => each.id)).toEqual(studio.boxes.pieceIds.slice(2))
  })

  it('is undone by taking it back: every piece is again where it was in its row', () => {
    const studio = withBatches()
    const before = inBatch(studio, studio.boxes.batchId)
    const told = tell(studio, 'regrouped', studio.boxes.pieceIds.slice(1), { name: 'Seconds' })
    if (!told.ok) throw new Error('The batch was not split.')
    expect(correctAct(studio.db, studio.studioId, { member: studio.members.maker }, told.actId, { clientKey: key(), takeBack: true }, now)).toMatchObject({ ok: true })
    expect(inBatch(studio, studio.boxes.batchId)).toEqual(before)
  })
})

describe('the name of a batch', () => {
  it('is not taken while another with pieces here has it, by splitting or by renaming', () => {
    const studio = withBatches()
    const taken = regroupRefusals.batchTaken('more boxes')
    expect(tell(studio, 'regrouped', studio.boxes.pieceIds.slice(0, 1), { name: 'more boxes' })).toMatchObject({ ok: false, reason: 'malformed', fields: { name: taken } })
    expect(renameBatch(studio.db, studio.studioId, studio.members.maker, studio.boxes.batchId, 'more boxes', now)).toMatchObject({ ok: false, fields: { name: taken } })
    expect(renameBatch(studio.db, studio.studioId, studio.members.maker, studio.boxes.batchId, 'boxes', now)).toMatchObject({ ok: true, was: 'Boxes' })
  })

  it('is free when no piece of that batch is left here, or all of it go into the new one', () => {
    const studio = withBatches()
    expect(tell(studio, 'gone', studio.more.pieceIds, { how: 'sold' })).toMatchObject({ ok: true })
    expect(tell(studio, 'regrouped', studio.boxes.pieceIds.slice(0, 1), { name: 'More boxes' })).toMatchObject({ ok: true })
    expect(tell(studio, 'regrouped', studio.boxes.pieceIds.slice(1), { name: 'Boxes' })).toMatchObject({ ok: true })
  })
})

describe('merging batches', () => {
  it('takes pieces into another batch of the same edition, after its last, and under its order', () => {
    const studio = withBatches()
    const [fourth = 0] = studio.more.pieceIds
    expect(tell(studio, 'regrouped', [fourth], { batchId: studio.boxes.batchId })).toMatchObject({ ok: true })
    // Ordinal 1 is taken by Box 1 of that batch: the newcomer stands behind its third.
    expect(inBatch(studio, studio.boxes.batchId).find(each => each.id === fourth)?.ordinal).toBe(4)
    expect(pieceStates(studio.db, studio.studioId, [fourth])[0]?.order?.name).toBe('Fair')
  })

  it.each([
    ['another schedule', (studio: Studio) => tell(studio, 'regrouped', studio.bowls.pieceIds, { batchId: studio.boxes.batchId }), regroupRefusals.otherSchedule('Bowl 1')],
    ['two of one name', (studio: Studio) => tell(studio, 'regrouped', studio.more.pieceIds, { batchId: studio.boxes.batchId }), regroupRefusals.sameName('Box 1')],
    ['the batch they are of', (studio: Studio) => tell(studio, 'regrouped', studio.boxes.pieceIds, { batchId: studio.boxes.batchId }), regroupRefusals.there('Boxes')],
    ['two schedules in a new one', (studio: Studio) => tell(studio, 'regrouped', [...studio.boxes.pieceIds, ...studio.bowls.pieceIds], { name: 'All' }), regroupRefusals.otherSchedule('Bowl 1')],
  ])('refuses %s in a sentence', (_, refused, message) => {
    expect(refused(withBatches())).toMatchObject({ ok: false, reason: 'impossible', message })
  })

  it('refuses neither a batch nor a name, and a batch of elsewhere', () => {
    const studio = withBatches()
    expect(tell(studio, 'regrouped', studio.boxes.pieceIds)).toMatchObject({ ok: false, reason: 'malformed', fields: { batchId: regroupRefusals.one } })
    expect(tell(studio, 'regrouped', studio.boxes.pieceIds, { batchId: 999 })).toMatchObject({ ok: false, reason: 'malformed', fields: { batchId: regroupRefusals.noBatch } })
  })

  it('is not corrected onto pieces of another schedule', () => {
    const studio = withBatches()
    const told = tell(studio, 'regrouped', studio.boxes.pieceIds.slice(0, 1), { name: 'Seconds' })
    if (!told.ok) throw new Error('The batch was not split.')
    const onto = correctAct(studio.db, studio.studioId, { member: studio.members.maker }, told.actId, { clientKey: key(), pieces: studio.boxes.pieceIds.slice(0, 2) }, now)
    expect(onto).toMatchObject({ ok: true })
    const wrong = correctAct(studio.db, studio.studioId, { member: studio.members.maker }, onto.ok ? onto.actId : 0, { clientKey: key(), pieces: studio.bowls.pieceIds }, now)
    expect(wrong).toMatchObject({ ok: false })
  })
})

describe('a batch that is cancelled', () => {
  it('leaves no step to be done, keeps what is wet under its verdict, and can be taken back', () => {
    const studio = withBatches()
    const [first = 0] = studio.boxes.pieceIds
    tell(studio, 'coat on', [first], { step: 'lid-1' }, 'maker', now - 30 * minute)
    const told = tell(studio, 'cancelled', studio.boxes.pieceIds, { reason: 'the order fell through' })
    if (!told.ok) throw new Error(told.message)
    const states = pieceStates(studio.db, studio.studioId, studio.boxes.pieceIds)
    expect(states.flatMap(state => state.turns)).toEqual([])
    expect(states[0]?.groups.flatMap(group => group.films)).toHaveLength(1)
    correctAct(studio.db, studio.studioId, { member: studio.members.maker }, told.actId, { clientKey: key(), takeBack: true }, now)
    expect(pieceStates(studio.db, studio.studioId, studio.boxes.pieceIds).every(state => state.turns.length > 0)).toBe(true)
  })
})

describe('cancelling again', () => {
  it('is refused when nothing is left, and cancels the rest when something is', () => {
    const studio = withBatches()
    const [first = 0, ...others] = studio.boxes.pieceIds
    expect(tell(studio, 'cancelled', [first])).toMatchObject({ ok: true })
    expect(tell(studio, 'cancelled', [first])).toMatchObject({ ok: false, reason: 'impossible', message: actRefusals.cancelledBefore })
    expect(tell(studio, 'cancelled', [first, ...others])).toMatchObject({ ok: true })
    expect(tell(studio, 'cancelled', [first, ...others])).toMatchObject({ ok: false, message: actRefusals.cancelledBefore })
  })
})

describe('a piece that is gone', () => {
  it('says how it went and comes back to a place', () => {
    const studio = withBatches()
    const [first = 0] = studio.boxes.pieceIds
    expect(tell(studio, 'gone', [first], { how: 'sold' })).toMatchObject({ ok: true })
    expect(studio.db.select().from(piece).where(eq(piece.id, first)).get()).toMatchObject({ goneAt: now, goneHow: 'sold' })
    expect(tell(studio, 'moved', [first], { placeId: studio.places.clamps })).toMatchObject({ ok: false, reason: 'impossible' })
    expect(tell(studio, 'back', [first])).toMatchObject({ ok: true })
    expect(studio.db.select().from(piece).where(eq(piece.id, first)).get()).toMatchObject({ goneAt: null, goneHow: null })
    expect(tell(studio, 'back', [first])).toMatchObject({ ok: false, reason: 'impossible' })
  })
})

describe('helpers', () => {
  it.each(['regrouped', 'cancelled', 'gone', 'back'] as const)('cannot tell that pieces are %s', (kind) => {
    const studio = withBatches()
    if (kind === 'back') tell(studio, 'gone', studio.boxes.pieceIds)
    expect(tell(studio, kind, studio.boxes.pieceIds, kind === 'regrouped' ? { name: 'Seconds' } : {}, 'helper')).toMatchObject({ ok: false, reason: 'not allowed' })
  })
})

it('a new batch of pieces of two orders is for none of them', () => {
  const studio = withBatches()
  expect(tell(studio, 'regrouped', [studio.boxes.pieceIds[1] ?? 0, studio.more.pieceIds[0] ?? 0], { name: 'Mixed' })).toMatchObject({ ok: true })
  expect(studio.db.select().from(batch).where(eq(batch.name, 'Mixed')).get()?.orderId).toBeNull()
  expect(studio.db.select().from(order).all()).toHaveLength(1)
})
