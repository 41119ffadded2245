import { describe, expect, it } from 'vitest'
import { pieceVerdict } from '#shared/verdict/verdict'
import type { PartFacts, VerdictKind } from '#shared/verdict/types'
import { film, hour, moment, part, unpromised } from './facts'

interface Row { says: string, parts: PartFacts[], at: number, kind: VerdictKind, line: number }

const back = { name: 'back', films: [] }
const chilled = { cause: 'chilled' as const, fromAt: hour(3) }
const due = { at: hour(14), what: 'Second varnish' }

/** Every line of the table, with the instants just before, at and after each boundary. Films: see facts.ts. */
const rows: Row[] = [
  { says: '1 keep out', parts: [part({ keepOut: { room: 'Spray room' } })], at: hour(9), kind: 'hands off', line: 1 },
  { says: '2 somebody has it', parts: [part({ doing: { by: 'Ada', what: 'Varnish', since: hour(8) } })], at: hour(9), kind: 'hands off', line: 2 },
  { says: '3 in clamps, long past its time', parts: [part({ films: [film({ kind: 'glue-up', hold: 'clamps' })] })], at: hour(30), kind: 'hands off', line: 3 },
  { says: '3 in the press', parts: [part({ films: [film({ hold: 'press' })] })], at: hour(30), kind: 'hands off', line: 3 },
  { says: '3 under weight', parts: [part({ films: [film({ hold: 'weight' })] })], at: hour(30), kind: 'hands off', line: 3 },
  { says: '4 unknown material', parts: [part({ films: [film({ material: null })] })], at: hour(30), kind: 'hands off', line: 4 },
  { says: '4 unknown time', parts: [part({ films: [film({ touch: null, handle: null })] })], at: hour(30), kind: 'hands off', line: 4 },
  { says: '4 a time with neither figure nor reason is unknown', parts: [part({ films: [film({ handle: moment(hour(14), { likelyAt: null, p90At: null, p98At: null }) })] })], at: hour(30), kind: 'hands off', line: 4 },
  { says: '8 a 98 % time past the horizon, likely passed', parts: [part({ films: [film({ handle: moment(hour(14), { p98At: null }) })] })], at: hour(13), kind: 'ask first', line: 8 },
  { says: '4 lifted by a maker\'s test', parts: [part({ films: [film({ material: null, touch: moment(hour(12), { reachedAt: hour(10) }), handle: moment(hour(14), { reachedAt: hour(10) }) })] })], at: hour(10), kind: 'may be handled', line: 13 },
  { says: '5 doubt and damp, just before set to touch', parts: [part({ films: [film({ doubt: chilled })], grip: back })], at: hour(12) - 1, kind: 'hands off', line: 5 },
  { says: '6 doubt at set to touch, with a grip', parts: [part({ films: [film({ doubt: chilled })], grip: back })], at: hour(12), kind: 'ask first', line: 6 },
  { says: '6 against 7: wet without a grip is worse than a doubt', parts: [part({ films: [film({ doubt: chilled })] })], at: hour(13), kind: 'hands off', line: 7 },
  { says: '6 doubt when dry', parts: [part({ films: [film({ doubt: { cause: 'failed', fromAt: hour(3) } })] })], at: hour(14), kind: 'ask first', line: 6 },
  { says: '7 no grip, damp', parts: [part({ films: [film()] })], at: hour(9), kind: 'hands off', line: 7 },
  { says: '7 no grip, just before dry to handle', parts: [part({ films: [film()] })], at: hour(14) - 1, kind: 'hands off', line: 7 },
  { says: '13 no grip, at dry to handle', parts: [part({ films: [film()] })], at: hour(14), kind: 'may be handled', line: 13 },
  { says: '13 no grip, just after dry to handle', parts: [part({ films: [film()] })], at: hour(14) + 1, kind: 'may be handled', line: 13 },
  { says: '7 grip named, just before set to touch', parts: [part({ films: [film()], grip: back })], at: hour(12) - 1, kind: 'hands off', line: 7 },
  { says: '7 null without a likely time: for ever', parts: [part({ films: [film({ handle: unpromised(null) })] })], at: hour(900), kind: 'hands off', line: 7 },
  { says: '7 null, just before likely', parts: [part({ films: [film({ handle: unpromised(hour(14)) })] })], at: hour(14) - 1, kind: 'hands off', line: 7 },
  { says: '8 null, at likely', parts: [part({ films: [film({ handle: unpromised(hour(14)) })] })], at: hour(14), kind: 'ask first', line: 8 },
  { says: '8 null, at likely, with a grip', parts: [part({ films: [film({ handle: unpromised(hour(14)) })], grip: back })], at: hour(14), kind: 'ask first', line: 8 },
  { says: '7 null before likely, with a grip: hands off until likely', parts: [part({ films: [film({ handle: unpromised(hour(14)) })], grip: back })], at: hour(13), kind: 'hands off', line: 7 },
  { says: '13 null, but a maker says it is dry', parts: [part({ films: [film({ handle: { ...unpromised(null), reachedAt: hour(10) } })] })], at: hour(10), kind: 'may be handled', line: 13 },
  { says: '13 just before a coat is due', parts: [part({ due })], at: hour(14) - 1, kind: 'may be handled', line: 13 },
  { says: '9 a coat is due', parts: [part({ due })], at: hour(14), kind: 'ask first', line: 9 },
  { says: '10 not where it should be', parts: [part({ missing: { where: 'Shelf B', seenAt: hour(8) } })], at: hour(9), kind: 'ask first', line: 10 },
  { says: '10 no place', parts: [part({ place: null })], at: hour(9), kind: 'ask first', line: 10 },
  { says: '10 no part anywhere', parts: [], at: hour(9), kind: 'ask first', line: 10 },
  { says: '11 lead', parts: [part({ intake: 'lead' })], at: hour(9), kind: 'ask first', line: 11 },
  { says: '11 green cloth', parts: [part({ intake: 'green cloth' })], at: hour(9), kind: 'ask first', line: 11 },
  { says: '11 mould', parts: [part({ intake: 'mould' })], at: hour(9), kind: 'ask first', line: 11 },
  { says: '12 at set to touch', parts: [part({ films: [film()], grip: back })], at: hour(12), kind: 'hold by', line: 12 },
  { says: '12 just before dry to handle', parts: [part({ films: [film()], grip: back })], at: hour(14) - 1, kind: 'hold by', line: 12 },
  { says: '13 with a grip, at dry to handle', parts: [part({ films: [film()], grip: back })], at: hour(14), kind: 'may be handled', line: 13 },
  { says: '13 nothing on it', parts: [part()], at: hour(9), kind: 'may be handled', line: 13 },
]

describe('the truth table', () => {
  it.each(rows)('$says', ({ parts, at, kind, line }) => {
    const verdict = pieceVerdict(parts, at, null)
    expect({ kind: verdict.kind, line: verdict.line }).toEqual({ kind, line })
  })

  it('has a row for every line', () => {
    expect([...new Set(rows.map(row => row.line))].sort((a, b) => a - b)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13])
  })

  it('refuses an instant that is none', () => {
    expect(() => pieceVerdict([part()], NaN, null)).toThrow(RangeError)
  })
})

/** Each row makes its own line apply to one part; any two together must say the worse, and of equals the lower line. */
const each: [number, Partial<PartFacts>][] = [
  [1, { keepOut: { room: 'Spray room' } }],
  [2, { doing: { by: 'Ada', what: 'Varnish', since: hour(8) } }],
  [3, { films: [film({ coatId: 3, hold: 'clamps', handle: moment(hour(8)), touch: moment(hour(7)) })] }],
  [4, { films: [film({ coatId: 4, material: null })] }],
  [5, { films: [film({ coatId: 5, doubt: chilled, touch: moment(hour(50)), handle: moment(hour(60)) })] }],
  [6, { films: [film({ coatId: 6, doubt: chilled })] }],
  [7, { films: [film({ coatId: 7, touch: moment(hour(70)), handle: moment(hour(80)) })] }],
  [8, { films: [film({ coatId: 8, handle: unpromised(hour(14)) })] }],
  [9, { due }],
  [10, { place: null }],
  [11, { intake: 'lead' }],
  [13, {}],
]
const offLines = [1, 2, 3, 4, 5, 7]
const badness = (line: number) => offLines.includes(line) ? 0 : line < 12 ? 1 : 3

describe('worst of two', () => {
  const pairs = each.flatMap(([a, first]) => each.map(([b, second]) => ({ a, b, first, second })))
  it.each(pairs)('lines $a and $b', ({ a, b, first, second }) => {
    const verdict = pieceVerdict([part(first), part({ partId: 2, ...second })], hour(30), null)
    const [expected] = [a, b].sort((x, y) => badness(x) - badness(y) || x - y)
    expect(verdict.line).toBe(expected)
  })
})
