import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { benchSpeed, coat, studio, touchTest } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { pieceStates } from '~~/server/services/piece-states'
import { studioState } from '~~/server/services/studio-state'
import { addWitness, removeWitness } from '~~/server/services/witnesses'
import { benchState } from '~~/server/work/benches'
import { readWitnesses } from '#shared/witnesses'
import { fellowsText } from '#shared/words/hands'
import { hour, minute, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const iso = (at: number) => new Date(at).toISOString()
let keys = 0

/** Two boxes painted in one go, and a board painted beside them. */
function paintedWithBoard() {
  const of = testStudio(now)
  const who = { member: of.members.maker }
  const started = startBatch(of.db, of.studioId, who, { clientKey: 'start', name: 'Boxes', scheduleId: of.scheduleOf('painted-waxed-box'), pieces: ['Box 1', 'Box 2'], sizeUnits: 1, placeId: of.places.shelf, order: null, startsAt: iso(now), oldObject: false }, now)
  if (!started.ok) throw new Error(started.message)
  const tell = (body: Record<string, unknown>, kind: 'coat on' | 'touch test', at: number) => {
    const pieces = pieceStates(of.db, of.studioId, started.pieceIds).map(({ id, version }) => ({ id, version }))
    return recordAct(of.db, of.studioId, who, { clientKey: `witness-act-${++keys}`, kind, doneAt: iso(at), pieces, body }, at)
  }
  const told = tell({ step: 'lid-1' }, 'coat on', now)
  if (!told.ok) throw new Error(told.message)
  const board = addWitness(of.db, of.studioId, told.actId)
  if (!board.ok) throw new Error(board.message)
  const state = (at: number) => studioState(of.db, of.db.select().from(studio).where(eq(studio.id, of.studioId)).get()!, at)
  return { ...of, actId: told.actId, board, tell, state, pieceIds: started.pieceIds }
}

describe('a witness board', () => {
  it('is made with a coat and speaks for every piece of it', () => {
    const { board, state, pieceIds, actId } = paintedWithBoard()
    expect(board.name).toBe('Witness board 1')
    const [read] = readWitnesses(state(now + minute))
    expect(read?.board).toEqual({ id: board.id, name: 'Witness board 1', actId })
    expect(read?.pieces.map(piece => piece.id)).toEqual(pieceIds)
  })

  it('asks for the next rung once the one that work waits for is reached', () => {
    const { tell, board, actId, state } = paintedWithBoard()
    const wanted = (at: number) => readWitnesses(state(at))[0]?.wanted
    const first = wanted(now + 4 * hour)
    if (!first) throw new Error('no rung')
    tell({ milestone: first, reached: true, witnessId: board.id, coatActId: actId }, 'touch test', now + 5 * hour)
    const then = readWitnesses(state(now + 6 * hour))[0]
    expect(then?.wanted).not.toBe(first)
    expect(then?.film.milestones.find(each => each.name === then.wanted)?.reachedAt).toBeNull()
  })

  it('is tested like a piece: the coat is bound by it, and the bench learns with more doubt', () => {
    const { db, studioId, tell, board, actId } = paintedWithBoard()
    const first = db.select().from(coat).where(eq(coat.actId, actId)).all()
    expect(tell({ milestone: 'dry-to-handle', reached: true, witnessId: board.id, coatActId: actId }, 'touch test', now + 5 * hour).ok).toBe(true)
    expect(db.select().from(touchTest).all().map(row => [row.coatId, row.witnessId])).toEqual(first.map(row => [row.id, board.id]))
    const bounds = benchState(db.select().from(benchSpeed).where(eq(benchSpeed.studioId, studioId)).get()?.state)?.tests ?? []
    expect(bounds).toHaveLength(2)
    const plain = paintedWithBoard()
    plain.tell({ milestone: 'dry-to-handle', reached: true, coatActId: plain.actId }, 'touch test', now + 5 * hour)
    const without = benchState(plain.db.select().from(benchSpeed).get()?.state)?.tests ?? []
    // 0.1 in log sd more, which is 0.01 of variance.
    expect(bounds[0]!.extra - without[0]!.extra).toBeCloseTo(0.01, 9)
  })

  it('speaks for no other coat, and for none of another studio', () => {
    const { tell, board, actId } = paintedWithBoard()
    expect(tell({ milestone: 'dry-to-handle', reached: true, witnessId: board.id }, 'touch test', now + hour)).toMatchObject({ ok: false, reason: 'impossible' })
    expect(tell({ milestone: 'dry-to-handle', reached: true, witnessId: board.id + 9, coatActId: actId }, 'touch test', now + hour)).toMatchObject({ ok: false, reason: 'absent' })
  })

  it('can be put away while nobody has tested it, and is gone once its coat is through', () => {
    const { db, studioId, tell, board, actId, state } = paintedWithBoard()
    const other = addWitness(db, studioId, actId)
    if (!other.ok) throw new Error(other.message)
    expect(removeWitness(db, studioId, other.id)).toEqual({ ok: true })
    tell({ milestone: 'dry-to-handle', reached: false, witnessId: board.id, coatActId: actId }, 'touch test', now + hour)
    expect(removeWitness(db, studioId, board.id)).toMatchObject({ ok: false, reason: 'impossible' })
    expect(removeWitness(db, studioId + 1, board.id)).toMatchObject({ ok: false, reason: 'absent' })
    db.update(coat).set({ settledAt: now }).run()
    expect(state(now).witnesses).toEqual([])
  })
})

describe('what a test did to its fellows', () => {
  it('is said with their number and the most that moved', () => {
    expect(fellowsText(0, 0)).toBe('')
    expect(fellowsText(1, 25 * minute)).toBe('It teaches one other film: give it till moves by 25 min later.')
    expect(fellowsText(4, -90 * minute)).toMatch(/^It teaches 4 other films: give it till moves by up to .* sooner\.$/)
  })
})
