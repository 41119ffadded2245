import { describe, expect, it } from 'vitest'
import { dayPlan } from '#shared/day-pegs'
import { fitPegs, rulerRows } from '#shared/day-ruler'
import type { PieceState, TurnState } from '#shared/schemas/piece-state'
import { at, clockAt, groupState, noon, pieceState, readAll, studioWith } from '../helpers/board'

const clock = clockAt(noon)

function turnState(turnId: number, partId: number, changes: Partial<TurnState> = {}): TurnState {
  return {
    turnId, partIds: [partId], kind: 'work', name: '', no: 1, of: 1, status: 'waiting',
    step: { id: turnId, key: 'sand', name: 'Light sanding', kind: 'light sanding', origin: 'schedule', status: 'waiting', asideReason: null, hold: null, untilEnough: false, materialVersionId: null, material: null, solventBorne: false },
    setupMin: 5, pieceMin: 10, cleanMin: 5, dust: 'some', notOnAt: null, doing: null, wantedAt: null, waits: [], plan: null, ...changes,
  }
}
const withTurn = (id: number, changes: Partial<TurnState> = {}): PieceState => pieceState(id, `Ledger ${id}`, [groupState(id, 1)], { turns: [turnState(id, id, changes)] })
const session = (id: number, startsAt: number, turnIds: number[], lastStartAt: number | null = null) => ({ id, family: 'f', startsAt, endsAt: startsAt + 1, lastStartAt, firstFew: null, lastStartFewAt: null, turnIds, pieceIds: turnIds })

describe('the day ruler', () => {
  it('pegs like work of the day once, under the first of it, and the end of the day', () => {
    const state = studioWith([withTurn(1), withTurn(2), withTurn(3)], { sessions: [session(1, at(15), [1, 2]), session(2, at(16), [3])] })
    const { pegs, note } = dayPlan(state, readAll(state, noon), clock)
    // Set-up and clean-up 10 min once in the peg of three at 10 min each: 40 min. In the plan twice: 30 + 20 = 50 min.
    expect(pegs.map(({ title, says }) => [title, says])).toEqual([['Light sanding, Ledgers 1–\u20603', '15:00, 40 min'], ['Before you leave', 'lids, heater, glue pot?']])
    expect(note).toBe('until 17:30; 50 min of work')
  })
  it('sets what a window presses apart, urgent within the hour', () => {
    const pressed = { plan: { startsAt: at(12.25), endsAt: at(12.5), dueAt: at(12.25), memberId: null, sessionId: 1, sessionSize: 2, lastStartAt: at(12.75), firstFew: null, lastStartFewAt: null, afterTest: false } }
    const state = studioWith([withTurn(1, pressed), withTurn(2, pressed)], { sessions: [session(1, at(12.25), [1, 2], at(12.75))] })
    expect(dayPlan(state, readAll(state, noon), clock).pegs[0]).toMatchObject({ says: 'start by 12:45 to do both', urgent: true })
  })
  it('asks for rags half an hour after the last oil', () => {
    const rags = (sinceAt: number) => studioWith([], { rags: [{ id: 1, roomId: 1, room: 'Front bench', sinceAt }] })
    const titles = (sinceAt: number) => dayPlan(rags(sinceAt), [], clock).pegs.map(({ title, says }) => `${title}: ${says}`)
    expect(titles(at(11.75))).toEqual(['Before you leave: rags dealt with?'])
    expect(titles(at(11.5))).toEqual(['Rags, Front bench: where are they?', 'Before you leave: rags dealt with?'])
  })
  it('lays what presses and then what comes first, as many as two rows hold, and counts the rest', () => {
    // Each peg is 11 * 7.6 + 32 = 115.6 px wide on a ruler of 240 px, so a row holds two at the most; all stand at one instant, where a row holds one.
    const peg = (key: number, urgent = false) => ({ key, at: at(13 + key / 100), title: `Check ${key} of 5`, says: '', urgent })
    const { pegs, more } = fitPegs([peg(1), peg(2), peg(3), peg(4, true)], () => 0, 240, 2)
    expect(pegs.map(each => each.peg.key)).toEqual([1, 4])
    expect(more).toBe(2)
  })
  it('lays one row in a low window, where it would hide the shelves', () => {
    expect([rulerRows(900), rulerRows(1112)]).toEqual([1, 2])
    const peg = (key: number) => ({ key, at: at(13 + key / 100), title: 'Sand', says: '', urgent: false })
    expect(fitPegs([peg(1), peg(2)], () => 0, 240, rulerRows(900))).toMatchObject({ more: 1, pegs: [{ peg: { key: 1 } }] })
  })
  it('lays all where there is room', () => {
    const pegs = [1, 2, 3].map(key => ({ key, at: key, title: 'Sand', says: '', urgent: false }))
    expect(fitPegs(pegs, at => at / 4, 1000, 2)).toMatchObject({ more: 0, pegs: [{ place: { row: 0 } }, { place: { row: 0 } }, { place: { row: 0 } }] })
  })
})
