import { describe, expect, it } from 'vitest'
import { readSentence } from '#shared/sentence/read'
import type { Sentence, Vocabulary } from '#shared/sentence/read'
import { rungFor } from '#shared/sentence/rung'
import type { MilestoneName } from '#shared/terms'
import { studioZone } from '#shared/time'

const zone = studioZone('Europe/London')
// Wednesday 10 June 2026, 15:00 in London.
const clock = { now: Date.UTC(2026, 5, 10, 14), zone }
const vocabulary: Vocabulary = {
  materials: [{ id: 1, name: 'White acrylic gesso' }, { id: 2, name: 'Black acrylic gesso' }, { id: 3, name: 'Water-borne varnish' }, { id: 4, name: 'Wood glue, PVA' }],
  pieces: [
    ...[1, 2, 3, 4, 5, 6].map(no => ({ id: no, name: `Ledger ${no}`, batch: 'Autumn ledgers' })),
    { id: 11, name: 'Tide box 1', batch: 'Tide boxes' }, { id: 12, name: 'Tide box 2', batch: 'Tide boxes' },
    { id: 13, name: 'Lantern box 1', batch: 'Lantern boxes' }, { id: 14, name: 'Clock case', batch: 'Clock case' }, { id: 15, name: 'Lantern box 2, the tall one', batch: 'Lantern boxes' },
  ],
  places: [{ id: 21, name: 'Long shelf', pieceIds: [1, 2, 14] }, { id: 22, name: 'Yard rail', pieceIds: [] }],
  rooms: [{ id: 31, name: 'Bench room' }, { id: 32, name: 'Shed' }],
}
const read = (text: string) => readSentence(text, vocabulary, clock, 'metric')
type PutOn = Extract<Sentence, { kind: 'put on' }>
const putOn = (text: string) => read(text) as PutOn

describe('something put on', () => {
  it('is read with its pieces and its time', () => {
    expect(read('White gesso on ledgers one to four, twenty minutes ago')).toEqual({
      kind: 'put on', material: { id: 1, name: 'White acrylic gesso', others: [] }, pieceIds: [1, 2, 3, 4], when: { kind: 'ago', minutes: 20 }, day: null, unknown: [],
    })
  })
  it('keeps what else a short name may have meant, the last used first', () => {
    expect(putOn('gesso on ledger 2').material).toEqual({ id: 1, name: 'White acrylic gesso', others: [{ id: 2, name: 'Black acrylic gesso' }] })
  })
  it('does not take a name for likelier that says one word twice', () => {
    const materials = [{ id: 5, name: 'Oil varnish, wiping varnish' }, { id: 6, name: 'Spirit varnish' }]
    expect(readSentence('varnish on ledger 2', { ...vocabulary, materials }, clock, 'metric')).toMatchObject({ material: { id: 6, others: [{ id: 5 }] } })
  })
  it.each<[string, number[]]>([
    ['varnish on ledgers 1, 2 and 5', [1, 2, 5]],
    ['varnish on ledgers 2-4', [2, 3, 4]],
    ['varnish on ledgers one through three and the clock case', [1, 2, 3, 14]],
    ['varnish on all ledgers but 3', [1, 2, 4, 5, 6]],
    ['varnish on the ledgers except 1 and 6', [2, 3, 4, 5]],
    ['varnish on ledgers 1 to 5 but not 3', [1, 2, 4, 5]],
    ['varnish on ledgers 4 to 2', [2, 3, 4]],
    ['varnish on all ledgers but ledger 3', [1, 2, 4, 5, 6]],
    ['varnish on the long shelf except ledger 2', [1, 14]],
    ['varnish on all but the clock case', []],
    ['varnish on lantern boxes 1 to 2', [13, 15]],
    ['varnish on lantern box 2, the tall one', [15]],
    ['varnish on autumn ledgers', [1, 2, 3, 4, 5, 6]],
    ['varnish on the tide boxes', [11, 12]],
    ['varnish on everything on the long shelf', [1, 2, 14]],
    ['I varnished nothing but put varnish on tide box two', [12]],
  ])('%s', (text, ids) => expect(putOn(text).pieceIds).toEqual(ids))
  it('does not guess between things that are called alike', () => {
    expect(putOn('varnish on the boxes')).toMatchObject({ pieceIds: [], unknown: ['boxes'] })
  })
  it('says which words it did not understand', () => {
    expect(putOn('varnish on ledgers 1 to 3 with the wide brush').unknown).toEqual(['wide', 'brush'])
    expect(putOn('varnish on ledger 9')).toMatchObject({ pieceIds: [], unknown: ['9'] })
    expect(putOn('varnish on ledgers 5 to 8')).toMatchObject({ pieceIds: [5, 6], unknown: ['8'] })
  })
  it('understands nothing of what is not about the studio', () => {
    expect(read('what is for lunch')).toBeNull()
    expect(read('')).toBeNull()
  })
})

describe('when', () => {
  const when = (text: string) => putOn(`varnish on ledger 1 ${text}`)
  it.each<[string, number]>([['', 0], ['just now', 0], ['half an hour ago', 30], ['an hour and a half ago', 90], ['about 40 min ago', 40], ['two hours ago', 120], ['forty five minutes ago', 45], ['a quarter of an hour ago', 15]])('"%s"', (text, minutes) => {
    expect(when(text)).toMatchObject({ when: { kind: 'ago', minutes }, unknown: [], pieceIds: [1] })
  })
  // London is an hour ahead of UTC in June.
  it.each<[string, number]>([['at 14:20', Date.UTC(2026, 5, 10, 13, 20)], ['at 2 pm', Date.UTC(2026, 5, 10, 13)], ['at 9 o\'clock', Date.UTC(2026, 5, 10, 8)], ['at half past nine', Date.UTC(2026, 5, 10, 8, 30)], ['at a quarter to 2 pm', Date.UTC(2026, 5, 10, 12, 45)], ['at ten past 14', Date.UTC(2026, 5, 10, 13, 10)], ['at 17:40', Date.UTC(2026, 5, 9, 16, 40)], ['yesterday at 9:30', Date.UTC(2026, 5, 9, 8, 30)], ['at 9:30 yesterday', Date.UTC(2026, 5, 9, 8, 30)],
    ['yesterday evening at 7', Date.UTC(2026, 5, 9, 18)], ['at 11 last night', Date.UTC(2026, 5, 9, 22)], ['last night at 2', Date.UTC(2026, 5, 10, 1)], ['this morning at 8:15', Date.UTC(2026, 5, 10, 7, 15)],
    // The tenth of June 2026 is a Wednesday.
    ['on Monday at 9', Date.UTC(2026, 5, 8, 8)], ['on Monday afternoon at 3', Date.UTC(2026, 5, 8, 14)], ['last Wednesday at 9', Date.UTC(2026, 5, 3, 8)]])('"%s"', (text, at) => {
    expect(when(text)).toMatchObject({ when: { kind: 'at', at }, unknown: [] })
  })
  // It is past three in the afternoon: an hour without its half of the day is the latest that lies behind.
  it.each<[string, number]>([['at 2', Date.UTC(2026, 5, 10, 13)], ['at half past two', Date.UTC(2026, 5, 10, 13, 30)], ['at 2:20', Date.UTC(2026, 5, 10, 13, 20)], ['at 12', Date.UTC(2026, 5, 10, 11)], ['at 9', Date.UTC(2026, 5, 10, 8)], ['today at 2', Date.UTC(2026, 5, 10, 13)], ['yesterday at 12', Date.UTC(2026, 5, 9, 11)], ['yesterday at 8', Date.UTC(2026, 5, 9, 7)],
    ['at 02:20', Date.UTC(2026, 5, 10, 1, 20)], ['at 2 am', Date.UTC(2026, 5, 10, 1)], ['at 2:20 pm', Date.UTC(2026, 5, 10, 13, 20)], ['at 12 am', Date.UTC(2026, 5, 9, 23)], ['yesterday at 4', Date.UTC(2026, 5, 9, 15)], ['today at 5', Date.UTC(2026, 5, 10, 4)]])('of the half of the day that was meant: "%s"', (text, at) => {
    expect(when(text)).toMatchObject({ when: { kind: 'at', at }, unknown: [] })
  })
  it('reads an hour of today as it does without the day', () => {
    const evening = { now: Date.UTC(2026, 5, 10, 20), zone }
    const said = (text: string) => readSentence(`varnish on ledger 1 ${text}`, vocabulary, evening, 'metric')
    for (const text of ['today at 8', 'at 8']) expect(said(text)).toMatchObject({ when: { kind: 'at', at: Date.UTC(2026, 5, 10, 19) } })
  })
  // A coat of last night told as one of now would be ready a night late, and its window shut.
  it.each([['yesterday', '2026-06-09'], ['yesterday evening', '2026-06-09'], ['last night', '2026-06-09'], ['this morning', '2026-06-10'], ['on Monday', '2026-06-08'], ['last Friday evening', '2026-06-05'], ['today', '2026-06-10'], ['this evening at 11', '2026-06-10']])('asks for the hour of "%s"', (text, day) => {
    expect(when(text)).toMatchObject({ when: null, day, unknown: [], pieceIds: [1] })
  })
  it('leaves a part of the day in a name', () => expect(when('evening').when).toEqual({ kind: 'ago', minutes: 0 }))
})

describe('a touch test', () => {
  it.each<[string, object]>([
    ['ledgers 1 and 2 are still tacky', { milestone: 'tack-free', reached: false, pieceIds: [1, 2] }],
    ['ledger 3 is dry to the touch', { milestone: 'set-to-touch', reached: true, pieceIds: [3] }],
    ['clock case not dry to handle', { milestone: 'dry-to-handle', reached: false, pieceIds: [14] }],
    ['tide boxes no longer tacky', { milestone: 'tack-free', reached: true, pieceIds: [11, 12] }],
    ['the ledgers are ready to sand', { milestone: 'dry-to-sand-lightly', reached: true, pieceIds: [1, 2, 3, 4, 5, 6] }],
    ['everything on the long shelf is dry', { milestone: 'dry-to-handle', reached: true, pieceIds: [1, 2, 14] }],
  ])('%s', (text, said) => expect(read(text)).toMatchObject({ kind: 'touch test', unknown: [], ...said }))
})

describe('pieces moved', () => {
  it('go to the place that is named', () => {
    expect(read('moved ledgers 1 to 3 to the yard rail ten minutes ago')).toMatchObject({ kind: 'moved', pieceIds: [1, 2, 3], place: { id: 22 }, when: { kind: 'ago', minutes: 10 }, unknown: [] })
    expect(read('I carried the clock case outside')).toMatchObject({ kind: 'moved', pieceIds: [14], place: null, unknown: ['outside'] })
  })
})

describe('the air of a room', () => {
  it.each<[string, object]>([
    ['shed 14 degrees 70 percent', { room: { id: 32 }, tempC: 14, rh: 0.7, words: null }],
    ['bench room: 19.5 °C, 52 %', { room: { id: 31 }, tempC: 19.5, rh: 0.52 }],
    ['the shed is fourteen point five degrees and sixty one per cent', { room: { id: 32 }, tempC: 14.5, rh: 0.61 }],
    ['shed minus two degrees', { room: { id: 32 }, tempC: -2, rh: null }],
    ['shed 50 degrees fahrenheit 80%', { room: { id: 32 }, tempC: 10, rh: 0.8 }],
    ['the shed is damp', { room: { id: 32 }, tempC: null, rh: null, words: 'damp' }],
    ['55 percent', { room: null, rh: 0.55 }],
  ])('%s', (text, said) => expect(read(text)).toMatchObject({ kind: 'reading', unknown: [], ...said }))
  it('is in Fahrenheit where the studio reckons in it', () => {
    expect(readSentence('shed 68 degrees', vocabulary, clock, 'us')).toMatchObject({ tempC: 20 })
  })
})

describe('the rung a thumb speaks of', () => {
  const films = (...names: MilestoneName[]) => [{ milestones: names.map(name => ({ name, likelyAt: null, p90At: null, p98At: null, reachedAt: null, reason: null })) }]
  it('is the one that was said where a film has it, else the next lower one', () => {
    expect(rungFor('tack-free', films('set-to-touch', 'tack-free'))).toBe('tack-free')
    expect(rungFor('tack-free', films('set-to-touch', 'dust-free', 'ready-to-recoat'))).toBe('dust-free')
  })
  it('stays what was said where nothing fits', () => {
    expect(rungFor('set-to-touch', films('cured'))).toBe('set-to-touch')
    expect(rungFor('tack-free', [])).toBe('tack-free')
  })
})
