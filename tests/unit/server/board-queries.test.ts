import { describe, expect, it } from 'vitest'
import { fillBoard } from '../../../scripts/bench/board-rows'
import { testDatabase } from '../../helpers/database'
import { studioState } from '~~/server/services/studio-state'
import { wallState } from '~~/server/services/wall-state'
import type { Database } from '~~/server/utils/database'

const now = Date.UTC(2026, 3, 1, 12)

/** A studio of some pieces with ten coats each, and every statement that one look at the board asks, with its plan. */
function lookAt(pieces: number) {
  const db = testDatabase() as Database
  const { studio } = fillBoard(db, { pieces, places: 8, coats: 10, now, seed: 7 })
  const { prepare } = db.$client
  const asked: string[] = []
  db.$client.prepare = ((text: string) => {
    asked.push(text)
    return prepare.call(db.$client, text)
  }) as typeof prepare
  const state = studioState(db, studio, now)
  db.$client.prepare = prepare
  const plan = (text: string) => {
    const places = (text.match(/\?/g) ?? []).map(() => 1)
    return db.$client.prepare<unknown[], { detail: string }>(`explain query plan ${text}`).all(...places).map(row => row.detail)
  }
  return { state, plans: asked.map(text => ({ text, plan: plan(text) })) }
}

describe('what a look at the board asks the database', () => {
  const small = lookAt(4)
  const large = lookAt(40)

  it('is as many statements for forty pieces as for four', () => {
    expect(large.state.pieces).toHaveLength(40)
    expect(large.plans.map(each => each.text)).toEqual(small.plans.map(each => each.text))
    expect(large.plans).toHaveLength(26)
  })

  it('reads only films that can still change an answer, by their partial index', () => {
    // Ten coats each of which eight have settled.
    expect(large.state.pieces.flatMap(piece => piece.groups.flatMap(group => group.films))).toHaveLength(40 * 2)
    const films = large.plans.filter(({ text }) => /from coat\b/.test(text))
    expect(films).toHaveLength(1)
    expect(films[0]?.plan.join('\n')).toMatch(/coat USING INDEX coat_live/)
  })

  it('finds the steps whose turn it is, and where pieces stand, by theirs', () => {
    const plans = large.plans.flatMap(each => each.plan).join('\n')
    for (const index of ['piece_step_front', 'stay_now', 'plan_now', 'piece_here']) expect(plans).toContain(index)
  })

  it('walks no growing table from end to end', () => {
    const walked = large.plans.flatMap(each => each.plan).filter(detail => /^SCAN (coat|prediction|window_prediction|piece_step|step|turn|step_link|link|stay|act|plan_session|coat_target|part|piece|plan_entry|entry|reading)\b(?!.*USING)/.test(detail))
    expect(walked).toEqual([])
  })
})

describe('what a wall link is told', () => {
  const { state } = lookAt(4)
  const told = wallState(state)
  it('is told of oily rags that nobody has answered for, by room and hour', () => {
    const rags = [{ id: 3, roomId: 1, room: 'Bench', sinceAt: 0 }]
    expect(wallState({ ...state, rags }).rags).toEqual(rags)
  })
  it('keeps orders, batches, materials, minutes and the plan inside', () => {
    expect(told.pieces.map(({ order, batch }) => [order, batch.name])).toEqual(told.pieces.map(() => [null, '']))
    expect(new Set(told.pieces.flatMap(piece => piece.groups.flatMap(group => group.films.map(film => film.material))))).toEqual(new Set(['']))
    const moved = [{ turnId: 1, pieceId: 1, piece: 'Box 1', batchId: 1, stepKind: 'coat' as const, step: 'Second paint', wasAt: 0, isAt: 1, movedAt: 0, why: { code: 'pinned' as const, by: 'Moss' } }]
    expect(wallState({ ...state, moved }).moved).toEqual([])
    expect([told.sessions, told.hours, told.rooms.map(room => room.air)]).toEqual([[], [], told.rooms.map(() => null)])
  })
})
