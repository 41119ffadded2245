import { describe, expect, it } from 'vitest'
import { readyEntries, workEntries } from '#shared/calendar'
import type { PlannedTurn } from '#shared/calendar'
import { calendarWords } from '#shared/words/calendar'
import { at, clockAt, filmState, groupState, noon, pieceState, readAll, studioWith } from '../helpers/board'

const clock = clockAt(noon)
const turn = (over: Partial<PlannedTurn>): PlannedTurn => ({
  turnId: 7, sessionId: null, memberIds: [1], step: 'Second varnish', kind: 'coat', check: null, piece: 'Ledger 1', place: 'Shelf A', startsAt: at(14), endsAt: at(14.25), lastStartAt: null, ...over,
})

describe('planned work in a calendar', () => {
  it('puts a session into one entry, named by its step and its pieces, under a key of its first turn', () => {
    const session = [turn({ turnId: 9, sessionId: 3, piece: 'Ledger 2', startsAt: at(14.25), endsAt: at(14.5), lastStartAt: at(15) }), turn({ sessionId: 3, lastStartAt: at(15) })]
    expect(workEntries(session, null, clock)).toEqual([{
      key: 'work-7', from: at(14), to: at(14.5), title: 'Second varnish, Ledgers 1 and 2', says: `Start by 15:00 at the latest. ${calendarWords.note}`, place: 'Shelf A',
    }])
  })

  it('keeps the key when the plan moves the session', () => {
    const moved = workEntries([turn({ sessionId: 88, startsAt: at(30), endsAt: at(30.25) })], null, clock)
    expect(moved.map(each => each.key)).toEqual(['work-7'])
  })

  it('leaves out other people’s work when asked for one person’s, and names no place when there are two', () => {
    const turns = [turn({}), turn({ turnId: 8, memberIds: [2] }), turn({ turnId: 10, sessionId: 4, place: 'Rail' }), turn({ turnId: 11, sessionId: 4 })]
    expect(workEntries(turns, 1, clock).map(each => [each.key, each.place])).toEqual([['work-7', 'Shelf A'], ['work-10', null]])
    expect(workEntries(turns, 3, clock)).toEqual([])
  })

  it('calls a look inside a rest by its own name', () => {
    expect(workEntries([turn({ check: 'Look for bubbles' })], null, clock)[0]?.title).toBe('Look for bubbles, Ledger 1')
  })
})

describe('ready times in a calendar', () => {
  it('are moments at the next quarter of an hour, in the words of the board, alike ones together', () => {
    // On at 10:00; dry to handle at 98 % at 15:00, and so for both.
    const pieces = [1, 2].map(no => pieceState(no, `Ledger ${no}`, [groupState(no, 1, [filmState()])]))
    const entries = readyEntries(readAll(studioWith(pieces), noon), clock)
    expect(entries).toEqual([{ key: 'ready-1-better-may-be-handled', from: at(15), to: null, title: 'Ledgers 1 and 2: may be handled from 15:00', says: calendarWords.note, place: null }])
  })

  it('say nothing of what is dry already or nobody can tell', () => {
    const dry = pieceState(1, 'Ledger 1', [groupState(1, 1, [])])
    expect(readyEntries(readAll(studioWith([dry]), noon), clock)).toEqual([])
  })
})
