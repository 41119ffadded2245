import { describe, expect, it } from 'vitest'
import { drawBoard, roomColumns } from '#shared/board'
import { dryness } from '#shared/dryness'
import { pieceStrip } from '#shared/board-strip'
import { handlingSheet } from '#shared/sheet'
import { pagesOf, shelfLines } from '#shared/sheet-pages'
import type { TurnState } from '#shared/schemas/piece-state'
import { at, clockAt, filmState, groupState, noon, pieceState, readAll, studioWith } from '../helpers/board'

const clock = clockAt(noon)
const ledgers = (count: number) => Array.from({ length: count }, (_, i) => pieceState(i + 1, `Ledger ${i + 1}`, [groupState(i + 1, 1)]))

describe('the drawing of the studio', () => {
  it('puts rooms, places and pieces where they stand, with the free places', () => {
    const state = studioWith(ledgers(2))
    const [room] = drawBoard(state, readAll(state, noon), clock).rooms
    expect(room?.places.map(({ name, drawn, note, free }) => [name, drawn, note, free])).toEqual([
      ['Shelf A', 'shelf', '2 of 12 places', 10], ['Clamps', 'clamps', '0 of 8 clamps', 8], ['Rail', 'rail', '0 of 4 hooks', 4],
    ])
    expect(room?.places[0]?.cells.map(({ name, dry, verdict }) => [name, dry, verdict])).toEqual([['Ledger 1', 1, 'may be handled'], ['Ledger 2', 1, 'may be handled']])
  })

  it('says the speed of water where something water-based dries, and keeps quiet elsewhere', () => {
    const dry = studioWith(ledgers(1))
    const wet = studioWith([pieceState(1, 'Ledger 1', [groupState(1, 1, [filmState()])])])
    expect(drawBoard(dry, readAll(dry, noon), clock).rooms[0]?.air).toBe('19.4 °C, 61 %, read 12 min ago.')
    expect(drawBoard(wet, readAll(wet, noon), clock).rooms[0]?.air).toBe('19.4 °C, 61 %, read 12 min ago. Water-based coats dry at 0.78 of sheet speed.')
  })

  it('names who opens a shut room and no time', () => {
    const state = studioWith(ledgers(1))
    state.rooms[0]!.keepOut = { sinceAt: at(9), opensBy: 'Mara' }
    const [room] = drawBoard(state, readAll(state, noon), clock).rooms
    expect(room?.keepOut).toBe('Mara opens this room.')
    expect(room?.places[0]?.cells[0]?.verdict).toBe('hands off')
  })

  it('draws parts that stand apart at both places, each with its own verdict', () => {
    const state = studioWith([pieceState(1, 'Ledger 5', [groupState(1, 1, [], 'cover'), groupState(2, 2, [filmState({ kind: 'glue-up', hold: 'clamps' })], 'spine')])])
    const [shelf, clamps] = drawBoard(state, readAll(state, noon), clock).rooms[0]?.places ?? []
    expect(shelf?.cells.map(({ name, kind }) => [name, kind])).toEqual([['Ledger 5, cover', 'may be handled']])
    expect(clamps?.cells.map(({ name, kind }) => [name, kind])).toEqual([['Ledger 5, spine', 'hands off']])
  })

  it('says what is next only where it is done to the parts that stand there', () => {
    const release: TurnState = {
      turnId: 1, partIds: [2], kind: 'release', name: 'out of clamps', no: 1, of: 1, status: 'waiting', setupMin: 0, pieceMin: 5, cleanMin: 0, dust: 'none', notOnAt: null, doing: null, wantedAt: at(12.5), waits: [], plan: null,
      step: { id: 1, key: 'glue', name: 'Glue the spine', kind: 'glue-up', origin: 'schedule', status: 'resting', asideReason: null, hold: 'clamps', untilEnough: false, materialVersionId: 1, material: null, solventBorne: false },
    }
    const state = studioWith([pieceState(1, 'Ledger 5', [groupState(1, 1, [], 'cover'), groupState(2, 2, [filmState({ kind: 'glue-up', hold: 'clamps' })], 'spine')], { turns: [release] })])
    const [shelf, clamps] = drawBoard(state, readAll(state, noon), clock).rooms[0]?.places ?? []
    expect(clamps?.cells[0]?.moment).toBe('take out of clamps from 12:30')
    expect(shelf?.cells[0]?.moment).toBeNull()
  })

  it('makes one swatch of loose parts that lie together, by the worst of them', () => {
    const state = studioWith([pieceState(1, 'Dresser', [groupState(1, 1), groupState(2, 1, [filmState()])])])
    expect(drawBoard(state, readAll(state, noon), clock).rooms[0]?.places[0]?.cells.map(({ name, kind }) => [name, kind])).toEqual([['Dresser', 'hands off']])
  })

  it('folds pieces alike beside one another on a full shelf, and unfolds them', () => {
    // Thirteen on one place is more than twelve; the seventh is wet and breaks the run: 1-6, 7, 8-13.
    const state = studioWith(ledgers(13).map(piece => piece.id === 7 ? { ...piece, groups: [groupState(7, 1, [filmState()])] } : piece))
    const read = readAll(state, noon)
    const folded = drawBoard(state, read, clock).rooms[0]?.places[0]
    expect(folded?.cells.map(({ name, count }) => [name, count])).toEqual([['Ledgers 1–\u20606', 6], ['Ledger 7', 1], ['Ledgers 8–\u206013', 6]])
    const open = drawBoard(state, read, clock, new Set([1])).rooms[0]?.places[0]
    expect([open?.cells.length, open?.unfolded, folded?.unfolded]).toEqual([13, true, false])
  })

  it('shows what nobody has said the place of', () => {
    const state = studioWith([pieceState(1, 'Stray', [groupState(1, null)])])
    expect(drawBoard(state, readAll(state, noon), clock).nowhere.map(({ name, kind }) => [name, kind])).toEqual([['Stray', 'ask first']])
  })

  it('cuts the rooms into two columns in their order', () => {
    const state = studioWith(ledgers(3))
    state.rooms = [...state.rooms, { ...state.rooms[0]!, id: 2, name: 'Yard' }]
    expect(roomColumns(drawBoard(state, readAll(state, noon), clock).rooms).map(rooms => rooms.map(room => room.name))).toEqual([['Front bench'], ['Yard']])
  })
})

describe('how dry a piece is drawn', () => {
  it('rises rung by rung to dry-to-handle, by the wettest film', () => {
    // At 12:30 past set to touch (11:00), half of the way from there to 14:00: (1 + 0.5) / 2 rungs.
    expect(dryness([filmState()], at(12.5))).toBeCloseTo(0.75, 12)
    expect(dryness([filmState(), filmState({ coatId: 2, endedAt: at(12.5), milestones: filmState().milestones.map(rung => ({ ...rung, likelyAt: at(20) })) })], at(12.5))).toBe(0)
    expect([dryness([], noon), dryness([filmState()], at(14))]).toEqual([1, 1])
  })
  it('is unknown without a material or times, and done where a thumb has said so', () => {
    expect([dryness([filmState({ material: null })], noon), dryness([filmState({ milestones: [] })], noon)]).toEqual([null, null])
    expect(dryness([filmState({ milestones: filmState().milestones.map(rung => ({ ...rung, reachedAt: at(11.5) })) })], noon)).toBe(1)
  })
})

describe('the drying strip of a piece', () => {
  const window = (opens: number, shuts: number) => ({ opensAt: at(opens), shutsAt: at(shuts) })
  const stripOf = (film = filmState()) => {
    const state = studioWith([pieceState(1, 'Ledger 1', [groupState(1, 1, [film])])])
    return pieceStrip(readAll(state, noon)[0]!, clock)
  }
  it('runs from the application to the last thing worth waiting for', () => {
    const strip = stripOf()
    // A quarter of an hour before 10:00; cured at 98 % on 37:00 and 6 % of the span beyond.
    expect(strip?.fromAt).toBe(at(9.75))
    expect(strip?.toAt).toBeCloseTo(at(37 + (37 - 9.75) * 0.06), -2)
    expect(strip?.milestones.map(({ label, giveTillAt }) => [label, giveTillAt])).toEqual([['set to touch', at(11.5)], ['dry to handle', at(15)], ['cured', at(37)]])
  })
  it('shows one window only: the next that can be kept', () => {
    expect(stripOf(filmState({ windows: [window(10, 11), window(15, 18), window(40, 60)] }))?.windows).toEqual([window(15, 18)])
  })
  it('is not there for a bare piece without a plan', () => {
    const state = studioWith(ledgers(1))
    expect(pieceStrip(readAll(state, noon)[0]!, clock)).toBeNull()
  })
})

describe('the handling sheet', () => {
  it('says of pieces alike once what hands may do, and till when not', () => {
    const state = studioWith([...ledgers(2), pieceState(5, 'Ledger 5', [groupState(5, 1, [filmState()])])])
    const [shelf] = handlingSheet(state, readAll(state, noon), clock, null).shelves
    expect(shelf?.cells.map(({ names, title, lines }) => [names, title, lines])).toEqual([
      ['Ledgers 1 and 2', 'may be handled', []], ['Ledger 5', 'hands off', ['wet', 'may be handled from 15:00']],
    ])
  })
  it('warns of every shut room without a time, whichever room is read', () => {
    const state = studioWith(ledgers(1))
    state.rooms = [...state.rooms, { ...state.rooms[0]!, id: 2, name: 'Spray room', keepOut: { sinceAt: at(9), opensBy: 'Mara' } }]
    expect(handlingSheet(state, readAll(state, noon), clock, 1).keepOuts).toEqual([{ id: 2, head: 'Spray room: keep out.', says: 'Mara opens it.' }])
    expect(handlingSheet(state, readAll(state, noon), clock, 2).shelves).toEqual([])
  })
  it('names many shut rooms together by who opens them, so that the shelves keep their place', () => {
    const state = studioWith(ledgers(1))
    const shut = (id: number, opensBy: string) => ({ ...state.rooms[0]!, id, name: `Room ${id}`, keepOut: { sinceAt: at(9), opensBy } })
    state.rooms = [shut(1, 'Mara'), shut(2, 'Moss'), shut(3, 'Mara'), shut(4, 'Mara')]
    expect(handlingSheet(state, readAll(state, noon), clock, null).keepOuts.map(({ head, says }) => `${head} ${says}`)).toEqual(['Room 1, Room 3 and Room 4: keep out. Mara opens them.', 'Room 2: keep out. Moss opens it.'])
  })
  it('warns of oily rags first, then of the rooms with a wet solvent film in one line, whichever room is read', () => {
    const wet = { ...filmState(), solventBorne: true }
    const state = studioWith([pieceState(1, 'Ledger 1', [groupState(1, 1, [wet])])])
    state.rooms = [{ ...state.rooms[0]!, sprayArea: true }, { ...state.rooms[0]!, id: 2, name: 'Hall' }]
    state.rags = [{ id: 7, roomId: 2, room: 'Hall', sinceAt: at(9) }]
    expect(handlingSheet(state, readAll(state, noon), clock, 2).cautions).toEqual([
      { id: -7, head: 'Oily rags in Hall since 9:00: nobody has said where they are.', says: 'Rags burn: flat outdoors or in the water can.' },
      { id: 0, head: `${state.rooms[0]!.name}: wet solvent film.`, says: 'No flames, no sparks. No phones in the spray room. Exhaust on. Read the data sheet.' },
    ])
    const dry = studioWith(ledgers(1))
    expect(handlingSheet(dry, readAll(dry, noon), clock, null).cautions).toEqual([])
  })
  it('pages by whole rows', () => {
    // Rows of 300 in a box of 650: two to a page; a row of 700 has one to itself.
    const rows = [0, 300, 600].map(top => ({ top, height: 300 }))
    expect(pagesOf([...rows, { top: 900, height: 700 }], 650)).toEqual([[0, 1], [2], [3]])
    expect([pagesOf(rows, 900), pagesOf([], 900)]).toEqual([[[0, 1, 2]], []])
  })

  it('stands short shelves side by side, and lets a long one go on beneath itself', () => {
    const shelf = (name: string, count: number) => ({ name, cells: Array.from({ length: count }, (_, cell) => cell) })
    const lines = shelfLines([shelf('a', 1), shelf('b', 2), shelf('c', 6), shelf('d', 2)], 4)
    // a and b leave one column, too few for c; c's last two leave room for d.
    expect(lines.map(line => line.map(each => [each.shelf.name, each.from, each.cells]))).toEqual([
      [['a', 0, 1], ['b', 0, 2]], [['c', 0, 4]], [['c', 4, 2], ['d', 0, 2]],
    ])
    expect(shelfLines([], 4)).toEqual([])
  })
})
