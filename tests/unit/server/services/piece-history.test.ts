import { describe, expect, it } from 'vitest'
import { and, eq } from 'drizzle-orm'
import { actSubject, part, piece } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { correctAct } from '~~/server/services/corrections'
import { findPiece } from '~~/server/services/piece-detail'
import { pieceStates } from '~~/server/services/piece-states'
import { isRefusal } from '~~/server/utils/errors'
import type { ActRequest } from '#shared/schemas/act'
import type { Role } from '#shared/terms'
import { hour, minute, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const iso = (at: number) => new Date(at).toISOString()
let keys = 0
const clientKey = () => `history-${keys += 1}`

function batchOf(count: number, oldObject = false) {
  const studio = testStudio(now)
  const started = startBatch(studio.db, studio.studioId, { member: studio.members.maker }, {
    clientKey: clientKey(), name: 'Boxes', scheduleId: studio.scheduleOf('painted-waxed-box'), pieces: Array.from({ length: count }, (_, i) => `Box ${i + 1}`), sizeUnits: 1,
    placeId: studio.places.shelf, order: { name: 'Fair', dueAt: iso(now + 100 * hour) }, startsAt: iso(now - 5 * hour), oldObject,
  }, now - 5 * hour)
  if (!started.ok) throw new Error(started.message)
  const tell = (kind: ActRequest['kind'], ids: number[], body: ActRequest['body'], at: number, toldAt = now, role: Role = 'maker') => {
    const pieces = pieceStates(studio.db, studio.studioId, ids).map(({ id, version }) => ({ id, version }))
    const told = recordAct(studio.db, studio.studioId, { member: studio.members[role] }, { clientKey: clientKey(), kind, doneAt: iso(at), pieces, body }, toldAt)
    if (!told.ok) throw new Error(told.message)
    return told.actId
  }
  const correct = (actId: number, change: { doneAt?: string, takeBack?: boolean, pieces?: number[] }) => {
    const done = correctAct(studio.db, studio.studioId, { member: studio.members.maker }, actId, { clientKey: clientKey(), ...change }, now)
    if (!done.ok) throw new Error(done.message)
    return done.actId
  }
  const read = (pieceId = started.pieceIds[0] ?? 0, role: Role = 'maker') => {
    const found = findPiece(studio.db, studio.studioId, studio.members[role], pieceId, now)
    if (isRefusal(found)) throw new Error(found.message)
    return found
  }
  return { ...studio, ids: started.pieceIds, tell, correct, read }
}

describe('the history of a piece', () => {
  it('says when a thing was done and when it was told', () => {
    const { tell, read, ids } = batchOf(1)
    tell('coat on', ids, { step: 'lid-1' }, now - 20 * minute)
    const [line] = read().history
    expect(line).toMatchObject({ kind: 'coat on', doneAt: now - 20 * minute, toldAt: now, by: 'The maker', inForce: true, mayCorrect: true, detail: { step: 'First paint on the lid top' } })
    expect(line?.was).toEqual([])
  })

  it('keeps what a corrected act was beside what it is', () => {
    const { tell, correct, read, ids } = batchOf(1)
    const actId = tell('coat on', ids, { step: 'lid-1' }, now - 20 * minute)
    const newId = correct(actId, { doneAt: iso(now - 50 * minute) })
    const lines = read().history.filter(each => each.kind === 'coat on')
    expect(lines).toHaveLength(1)
    expect(lines[0]).toMatchObject({ actId: newId, rootId: actId, doneAt: now - 50 * minute, toldAt: now, correctedAt: now, was: [{ doneAt: now - 20 * minute, here: true }] })
  })

  it('keeps an act taken back, out of force and past correcting', () => {
    const { tell, correct, read, ids } = batchOf(1)
    correct(tell('coat on', ids, { step: 'lid-1' }, now - 20 * minute), { takeBack: true })
    const line = read().history.find(each => each.kind === 'coat on')
    expect(line).toMatchObject({ takenBack: true, inForce: false, mayCorrect: false, doneAt: now - 20 * minute, was: [] })
  })

  it('tells a piece that an act was moved away to others', () => {
    const { tell, correct, read, ids } = batchOf(2)
    correct(tell('coat on', [ids[0] ?? 0], { step: 'lid-1' }, now - 20 * minute), { pieces: [ids[1] ?? 0] })
    expect(read(ids[0]).history.find(each => each.kind === 'coat on')).toMatchObject({ inForce: false, takenBack: false, pieceIds: [ids[1]] })
    expect(read(ids[1]).history.find(each => each.kind === 'coat on')).toMatchObject({ inForce: true, was: [{ here: false }] })
  })

  it('lists an act that a correction made impossible, with its reason', () => {
    const { tell, correct, read, ids } = batchOf(1)
    const coatId = tell('coat on', ids, { step: 'lid-1' }, now - 4 * hour)
    tell('touch test', ids, { milestone: 'dry-to-handle', reached: true }, now - hour)
    // The coat now goes on half an hour ago, after the thumb that tested it.
    correct(coatId, { doneAt: iso(now - 30 * minute) })
    expect(read().history.find(each => each.kind === 'touch test')).toMatchObject({ inForce: true, problem: expect.stringMatching(/no film to test|before its start/) })
  })

  it('keeps the forecast that stood when a test was made', () => {
    const { tell, read, ids } = batchOf(1)
    tell('coat on', ids, { step: 'lid-1' }, now - 30 * minute)
    tell('touch test', ids, { milestone: 'dry-to-handle', reached: false }, now)
    const test = read().history.find(each => each.kind === 'touch test')
    expect(test?.forecast?.likelyAt).toBeGreaterThan(now - 30 * minute)
    expect(test?.forecast?.p90At).toBeGreaterThan(test?.forecast?.likelyAt ?? Infinity)
  })

  it('lets a helper correct their own acts alone', () => {
    const { tell, read, ids } = batchOf(1)
    tell('coat on', ids, { step: 'lid-1' }, now - 60 * minute)
    tell('touch test', ids, { milestone: 'dry-to-handle', reached: false }, now, now, 'helper')
    const may = read(undefined, 'helper').history.map(each => [each.kind, each.mayCorrect])
    expect(may).toEqual([['touch test', true], ['coat on', false], ['batch started', false]])
  })

  it('dates a piece in a row by its own time', () => {
    const { tell, read, ids, db } = batchOf(3)
    tell('coat on', ids, { step: 'lid-1' }, now)
    // 6 minutes a lid: the first of three was done 12 minutes before the last.
    expect(read(ids[0]).history[0]?.doneAt).toBe(now - 12 * minute)
    expect(db.select().from(actSubject).innerJoin(part, eq(part.id, actSubject.partId)).innerJoin(piece, and(eq(piece.id, part.pieceId), eq(piece.id, ids[0] ?? 0))).all().length).toBeGreaterThan(1)
  })
})

describe('the steps of a piece', () => {
  it('stand in the order of the graph with what each waits for', () => {
    const { read } = batchOf(1)
    const { steps } = read()
    const place = (key: string) => steps.findIndex(step => step.key === key)
    for (const [before, after] of [['glue-box', 'clean-up'], ['box-wax', 'hinge'], ['lid-2', 'lid-wax']] as const) expect(place(before)).toBeLessThan(place(after))
    expect(steps.find(step => step.key === 'clean-up')?.waitsFor).toEqual(['Glue up the box'])
    expect(steps.find(step => step.key === 'glue-box')).toMatchObject({ waitsFor: [], parts: ['Box', 'Bottom'], turnsOf: 1, turnsDone: 0 })
  })

  it('say what put a branch in', () => {
    const { tell, read, ids } = batchOf(1)
    tell('coat on', ids, { step: 'lid-1' }, now - hour)
    tell('dropped out', ids, {}, now - 30 * minute)
    const { steps, branch } = read()
    expect(branch).toMatchObject({ fromStep: 'First paint on the lid top', sinceAt: now - 30 * minute, rejoined: false })
    expect(steps.filter(step => step.origin === 'branch').map(step => [step.name, step.because?.kind, step.because?.by])).toEqual([['Drop-fill the run', 'dropped out', 'The maker'], ['Level the run', 'dropped out', 'The maker']])
  })
})

describe('the reasons', () => {
  it('come with a film on it: its speed, its layers and the cautions of its materials', () => {
    const { tell, read, ids } = batchOf(1)
    tell('coat on', ids, { step: 'lid-1' }, now - 30 * minute)
    const detail = read()
    expect(detail.films[0]?.rate?.material).toBeTruthy()
    expect(detail.layers).toMatchObject([{ what: 'First paint on the lid top', faces: ['top'], layer: 1, settled: false }])
    expect(detail.order).toMatchObject({ name: 'Fair', dueAt: now + 100 * hour })
    expect(detail.cautions.length).toBeGreaterThan(0)
  })

  it('ask of an old object what was not answered, and caution until it is', () => {
    const { read, tell, ids } = batchOf(1, true)
    expect(read().intakes).toEqual(['lead', 'green cloth', 'mould', 'metal coating'].map(question => ({ question, answer: 'open' })))
    expect(read().cautions[0]).toEqual({ key: 'old paint', materials: [] })
    tell('intake answered', ids, { question: 'lead', answer: 'tested, none' }, now)
    expect(read().cautions.map(each => each.key)).not.toContain('old paint')
  })
})

describe('a piece of another studio', () => {
  it('is absent', () => {
    const { db, members, ids } = batchOf(1)
    expect(findPiece(db, 99, members.owner, ids[0] ?? 0, now)).toMatchObject({ ok: false, reason: 'absent' })
  })
})
