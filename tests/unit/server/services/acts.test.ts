import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { act, batch, face, part, pieceStep, stepTarget } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { correctAct } from '~~/server/services/corrections'
import { startBatch } from '~~/server/services/batches'
import { pieceStates } from '~~/server/services/piece-states'
import type { ActRequest } from '#shared/schemas/act'
import type { Role } from '#shared/terms'
import { actRefusals } from '#shared/words/acts'
import { hour, minute, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const iso = (at: number) => new Date(at).toISOString()

function withBatch(count: number) {
  const studio = testStudio(now)
  const started = startBatch(studio.db, studio.studioId, { member: studio.members.maker }, {
    clientKey: 'start-one', name: 'Boxes', scheduleId: studio.scheduleOf('painted-waxed-box'), pieces: Array.from({ length: count }, (_, i) => `Box ${i + 1}`), sizeUnits: 1,
    placeId: studio.places.shelf, order: null, startsAt: iso(now - 2 * hour), oldObject: false,
  }, now)
  if (!started.ok) throw new Error(started.message)
  return { ...studio, pieceIds: started.pieceIds }
}

describe('starting a batch', () => {
  it('gives every piece its steps and puts it on the shelf', () => {
    const { db, studioId, places, pieceIds } = withBatch(3)
    const states = pieceStates(db, studioId, pieceIds)
    expect(states.map(state => state.groups[0]?.placeId)).toEqual([places.shelf, places.shelf, places.shelf])
    expect(states[0]?.turns.map(turn => turn.step.key)).toEqual(['glue-box', 'lid-1'])
  })
})

const tell = (studio: ReturnType<typeof withBatch>, kind: ActRequest['kind'], ids: number[], body: ActRequest['body'], at: number, key = `key-${Math.abs(at)}-${kind.replaceAll(' ', '-')}`, role: Role = 'maker') => {
  const pieces = pieceStates(studio.db, studio.studioId, ids).map(({ id, version }) => ({ id, version }))
  return recordAct(studio.db, studio.studioId, { member: studio.members[role] }, { clientKey: key, kind, doneAt: iso(at), pieces, body }, now)
}

describe('a coat on a row of pieces', () => {
  it('is dated along the row and foretold at once', () => {
    const studio = withBatch(3)
    // 6 minutes a lid: told done 20 minutes ago, lid 3 ended then, lid 2 six minutes before, lid 1 twelve.
    expect(tell(studio, 'coat on', studio.pieceIds, { step: 'lid-1' }, now - 20 * minute)).toMatchObject({ ok: true })
    const states = pieceStates(studio.db, studio.studioId, studio.pieceIds)
    const films = states.map(state => state.groups.flatMap(group => group.films)[0])
    expect(films.map(film => film?.endedAt)).toEqual([now - 32 * minute, now - 26 * minute, now - 20 * minute])
    expect(films[0]?.beganAt).toBe(now - 38 * minute)
    for (const film of films) expect(film?.milestones.find(rung => rung.name === 'dry-to-handle')?.p98At).toBeGreaterThan(now)
  })

  it('told twice under one key is recorded once', () => {
    const studio = withBatch(1)
    const first = tell(studio, 'coat on', studio.pieceIds, { step: 'lid-1' }, now, 'same-key-1')
    const again = tell(studio, 'coat on', studio.pieceIds, { step: 'lid-1' }, now, 'same-key-1')
    expect(again).toEqual({ ...first, repeated: true })
  })

  it('answers how its pieces stand after it, so that the next tap of the same hand follows on', () => {
    const studio = withBatch(2)
    const versions = () => pieceStates(studio.db, studio.studioId, studio.pieceIds).map(({ id, version }) => ({ id, version }))
    const first = tell(studio, 'began', studio.pieceIds, { step: 'lid-1' }, now - minute, 'same-hand-1')
    expect(first).toMatchObject({ ok: true, versions: versions() })
    // Somebody else was at the second piece since: of that one nothing follows on, also when the first answer was lost.
    tell(studio, 'seen', studio.pieceIds.slice(1), {}, now, 'other-hand-1', 'helper')
    expect(tell(studio, 'began', studio.pieceIds, { step: 'lid-1' }, now - minute, 'same-hand-1')).toEqual({ ...first, repeated: true, versions: versions().slice(0, 1) })
  })

  it('by two people at once ends in one winner', () => {
    const studio = withBatch(1)
    const seen = pieceStates(studio.db, studio.studioId, studio.pieceIds).map(({ id, version }) => ({ id, version }))
    const act = (clientKey: string) => recordAct(studio.db, studio.studioId, { member: studio.members.maker }, { clientKey, kind: 'coat on', doneAt: iso(now), pieces: seen, body: { step: 'lid-1' } }, now)
    expect(act('first-hand')).toMatchObject({ ok: true })
    expect(act('second-hand')).toMatchObject({ ok: false, reason: 'conflict', current: [{ id: studio.pieceIds[0] }] })
  })
})

describe('a correction', () => {
  it('moves the coat in time and everything after it, and keeps the coat', () => {
    const studio = withBatch(1)
    const told = tell(studio, 'coat on', studio.pieceIds, { step: 'lid-1' }, now - 10 * minute)
    if (!told.ok) throw new Error(told.message)
    const before = pieceStates(studio.db, studio.studioId, studio.pieceIds)[0]?.groups.flatMap(group => group.films)[0]
    const corrected = correctAct(studio.db, studio.studioId, { member: studio.members.maker }, told.actId, { clientKey: 'correct-1', doneAt: iso(now - 70 * minute) }, now)
    expect(corrected).toMatchObject({ ok: true })
    const after = pieceStates(studio.db, studio.studioId, studio.pieceIds)[0]?.groups.flatMap(group => group.films)[0]
    expect(after?.coatId).toBe(before?.coatId)
    expect(after?.endedAt).toBe(now - 70 * minute)
    expect(after?.milestones[0]?.likelyAt).toBeLessThan(before?.milestones[0]?.likelyAt ?? 0)
  })

  it('does not put a coat before the start of its batch, until the start is corrected', () => {
    const studio = withBatch(1)
    const as = { member: studio.members.maker }
    const told = tell(studio, 'coat on', studio.pieceIds, { step: 'lid-1' }, now - 10 * minute)
    const start = studio.db.select().from(act).where(eq(act.kind, 'batch started')).get()
    if (!told.ok || !start) throw new Error('Nothing was started.')
    const early = { doneAt: iso(now - 3 * hour) }
    expect(correctAct(studio.db, studio.studioId, as, told.actId, { clientKey: 'too-early', ...early }, now)).toMatchObject({ ok: false, fields: { doneAt: actRefusals.beforeBatch('Box 1', '8:00') } })
    expect(correctAct(studio.db, studio.studioId, as, told.actId, { clientKey: 'alone-too-early', times: [{ pieceId: studio.pieceIds[0] ?? 0, ...early }] }, now)).toMatchObject({ ok: false, fields: { doneAt: actRefusals.beforeBatch('Box 1', '8:00') } })
    expect(correctAct(studio.db, studio.studioId, as, start.id, { clientKey: 'too-late', doneAt: iso(now - 5 * minute) }, now)).toMatchObject({ ok: false, fields: { doneAt: actRefusals.startsAfter('Box 1', '9:50') } })
    expect(correctAct(studio.db, studio.studioId, as, start.id, { clientKey: 'no-start', takeBack: true }, now)).toMatchObject({ ok: false, message: actRefusals.startStays })
    expect(correctAct(studio.db, studio.studioId, as, start.id, { clientKey: 'began-earlier', doneAt: iso(now - 4 * hour) }, now)).toMatchObject({ ok: true })
    expect(studio.db.select().from(batch).get()?.startsAt).toBe(now - 4 * hour)
    expect(correctAct(studio.db, studio.studioId, as, told.actId, { clientKey: 'early-now', ...early }, now)).toMatchObject({ ok: true })
    const [box] = pieceStates(studio.db, studio.studioId, studio.pieceIds)
    expect([box?.batch.name, ...new Set(box?.groups.map(group => group.placeId))]).toEqual(['Boxes', studio.places.shelf])
  })

  it('puts an unplanned coat, its step and its film on the faces it names', () => {
    const studio = withBatch(1)
    const [lid] = studio.db.select().from(part).where(eq(part.key, 'lid')).all()
    const pieces = pieceStates(studio.db, studio.studioId, studio.pieceIds).map(({ id, version }) => ({ id, version }))
    const body = { step: null, materialVersionId: studio.materialOf('chalk-paint') }
    const told = recordAct(studio.db, studio.studioId, { member: studio.members.maker }, { clientKey: 'unplanned-1', kind: 'coat on', doneAt: iso(now), pieces, partIds: [lid?.id ?? 0], body: { ...body, faces: ['top'] } }, now)
    if (!told.ok) throw new Error(told.message)
    const targets = () => studio.db.select({ face: face.key }).from(stepTarget).innerJoin(face, eq(face.id, stepTarget.faceId)).innerJoin(pieceStep, eq(pieceStep.id, stepTarget.stepId)).where(eq(pieceStep.origin, 'unplanned')).all()
    expect(targets()).toEqual([{ face: 'top' }])
    expect(correctAct(studio.db, studio.studioId, { member: studio.members.maker }, told.actId, { clientKey: 'other-face', body: { ...body, faces: ['underside'] } }, now)).toMatchObject({ ok: true })
    expect(targets()).toEqual([{ face: 'underside' }])
  })

  it('taken back leaves no coat and gives the turn back', () => {
    const studio = withBatch(1)
    const told = tell(studio, 'coat on', studio.pieceIds, { step: 'lid-1' }, now - 10 * minute)
    if (!told.ok) throw new Error(told.message)
    correctAct(studio.db, studio.studioId, { member: studio.members.maker }, told.actId, { clientKey: 'take-back', takeBack: true }, now)
    const state = pieceStates(studio.db, studio.studioId, studio.pieceIds)[0]
    expect(state?.groups.flatMap(group => group.films)).toEqual([])
    expect(state?.turns.map(turn => turn.step.key)).toContain('lid-1')
  })
})
