import { describe, expect, it } from 'vitest'
import { studioZone } from '#shared/time'
import { groupVerdict, pieceVerdict } from '#shared/verdict/verdict'
import { asSentence, betterText, cutOffText, limitText, limitTexts, notToldYet, predictionReason, verdictLine, verdictReason, verdictTitle } from '#shared/words/verdict'
import { limitKinds, verdictKinds } from '#shared/verdict/types'
import { doubtCauses, holds } from '#shared/terms'
import type { ReasonCode } from '#shared/drying/types'
import type { PartFacts, VerdictReason } from '#shared/verdict/types'
import { film, hour, part, unpromised } from '../verdict/facts'

/** The test day is Tuesday 3 March 2026; the studio keeps UTC, so that hours here are hours on its wall. */
const zone = studioZone('UTC')
const at = (now: number) => ({ now: hour(now), zone })
const line = (now: number, changes: Partial<PartFacts>) => verdictLine(pieceVerdict([part(changes)], hour(now), null), at(now))
const grip = { name: 'back', films: [] }
const reasonCodes: ReasonCode[] = ['below-minimum', 'too-damp', 'never', 'outside-sheet']

describe('a verdict in words', () => {
  it('says every line of the table', () => {
    expect(line(9, { keepOut: { room: 'Spray room' } })).toBe('hands off: keep out of Spray room')
    expect(line(9, { doing: { by: 'Ada', what: 'Second varnish', since: hour(8) } })).toBe('hands off: Ada has it: second varnish')
    expect(line(13, { films: [film({ kind: 'glue-up', hold: 'clamps' })] })).toBe('hands off: in clamps: do not loosen; out of clamps from 13:40')
    expect(line(15, { films: [film({ kind: 'glue-up', hold: 'weight' })] })).toBe('hands off: under weight: do not lift the weight until a maker says it is out')
    expect(line(9, { films: [film({ material: null })] })).toBe('hands off: nobody knows what is on it: a maker tests it first')
    expect(line(9, { films: [film({ doubt: { cause: 'chilled', fromAt: hour(3) } })] })).toBe('hands off: chilled in the night while wet: test or strip; ask first from 14:00')
    expect(line(15, { films: [film({ doubt: { cause: 'chilled', fromAt: hour(3) } })] })).toBe('ask first: chilled in the night: test first')
    expect(line(13, { films: [film({ touch: null, tackFree: null })] })).toBe('hands off: wet; may be handled from 14:00')
    expect(line(11, { films: [film()], grip })).toBe('hands off: wet; hold by the back from 12:00')
    expect(line(15, { films: [film({ handle: unpromised(hour(14)) })] })).toBe('ask first: too damp to promise')
    expect(line(15, { due: { at: hour(14), what: '' } })).toBe('ask first: a coat was due 14:00')
    expect(line(15, { due: { at: hour(14), what: 'Second varnish' } })).toBe('ask first: “Second varnish” was due 14:00')
    expect(line(9, { missing: { where: 'Shelf B', seenAt: hour(8.5) } })).toBe('ask first: not where it should be: last seen Shelf B, 8:30')
    expect(line(9, { place: null })).toBe('ask first: nobody has said where it stands')
    expect(line(9, { intake: 'lead' })).toBe('ask first: lead not ruled out: no sanding, scraping, heating, piercing or cutting')
    expect(line(13, { films: [film({ hard: null, cured: { likelyAt: null, p90At: null, p98At: null, reachedAt: hour(13), reason: null } })], grip })).toBe('hold by the back; may be handled from 14:00')
    expect(line(9, {})).toBe('may be handled')
  })

  it('says the limits in one wording, those that end together in one', () => {
    expect(line(14, { films: [film({ gloves: true })] })).toBe('may be handled; gloves till 20:00; do not stack before 16:00; do not wrap or glaze before 20:00')
    expect(limitText({ kind: 'stack', until: hour(18) }, at(14))).toBe('do not stack before 18:00')
    // Cured Monday 9 March at 0:00, more than a day of doubt: no finer than half a day.
    expect(limitText({ kind: 'gloves', until: hour(6 * 24) }, at(14))).toBe('gloves till Mon')
    expect(limitTexts([{ kind: 'gloves', until: null }, { kind: 'stack', until: null }, { kind: 'strain', until: null }], at(14))).toEqual(['gloves', 'do not stack or strain'])
  })

  it('says since when a page has not heard', () => {
    const verdict = pieceVerdict([part()], hour(14.5), hour(13) + 50 * 60_000)
    expect(verdictLine(verdict, at(14.5))).toBe('ask first: not heard from the studio since 13:50')
    expect(cutOffText(hour(13) + 50 * 60_000, at(14.5))).toBe('Not heard from the studio since 13:50.')
  })

  it('does not name one grip for pieces that have several', () => {
    const held = ['back', 'base'].map(name => pieceVerdict([part({ films: [film()], grip: { name, films: [] } })], hour(13), null))
    const group = groupVerdict(held)
    expect(group && verdictTitle(group.kind, group.grip)).toBe('hold by the grip each piece names')
  })

  it('calls a numbered carrier by its own name', () => {
    expect(['back', 'Long board', 'Tray 3'].map(grip => verdictTitle('hold by', grip))).toEqual(['hold by the back', 'hold by the long board', 'hold by Tray 3'])
  })

  it('leaves out of a last sighting what nobody knows', () => {
    expect(verdictReason({ code: 'not there', where: '', seenAt: hour(8) }, at(9))).toBe('not where it should be: last seen 8:00')
    expect(verdictReason({ code: 'not there', where: '', seenAt: null }, at(9))).toBe('not where it should be')
  })

  it('dates what was not last night', () => {
    expect(verdictReason({ code: 'doubt', cause: 'chilled', fromAt: hour(-40) }, at(9))).toBe('chilled Sun 8:00: test first')
    expect(verdictReason({ code: 'doubt', cause: 'chilled', fromAt: hour(-2) }, at(9))).toBe('chilled in the night: test first')
  })
})

/** One of every reason there is. */
const reasons: VerdictReason[] = [
  { code: 'keep out', room: 'Yard' }, { code: 'in hand', by: 'Ada', what: 'Varnish' }, { code: 'unknown film' }, { code: 'dry' },
  ...holds.flatMap(hold => [null, hour(8), hour(20)].map(giveTillAt => ({ code: 'held' as const, hold, giveTillAt }))),
  ...doubtCauses.flatMap(cause => [{ code: 'doubt wet' as const, cause, fromAt: hour(3) }, { code: 'doubt' as const, cause, fromAt: hour(3) }]),
  { code: 'wet', material: 'a paint', until: hour(12), reason: null },
  ...reasonCodes.flatMap(reason => [{ code: 'wet' as const, material: null, until: null, reason }, { code: 'no promise' as const, reason }]),
  { code: 'coat due', at: hour(8), what: '' }, { code: 'not there', where: null, seenAt: null }, { code: 'not there', where: 'Rail', seenAt: null },
  ...(['lead', 'green cloth', 'mould'] as const).map(question => ({ code: 'intake' as const, question })),
  { code: 'grip wet', grip: 'spine' }, { code: 'cut off', since: hour(8) },
]

describe('the catalogue of verdicts', () => {
  const said = [
    ...reasons.map(reason => verdictReason(reason, at(9))), ...reasonCodes.map(predictionReason), ...verdictKinds.map(kind => verdictTitle(kind, 'back')), notToldYet,
    ...limitKinds.flatMap(kind => [null, hour(20)].map(until => limitText({ kind, until }, at(9)))),
    ...verdictKinds.map(betterKind => betterText({ betterAt: hour(12), betterKind, betterGrip: null }, at(9)) ?? ''),
  ]

  it('has words for everything and grants nothing', () => {
    for (const text of said) {
      expect(text).toMatch(/^[^\s].+[^\s.!]$/)
      expect(text).not.toMatch(/safe|!|\bnull\b|undefined|NaN/i)
    }
  })

  it('says different things differently', () => {
    const different = reasons.filter(reason => reason.code !== 'held').map(reason => verdictReason(reason, at(9)))
    expect(new Set(different).size).toBe(different.length)
  })

  it('makes sentences', () => {
    expect(asSentence('sand lightly from 13:55')).toBe('Sand lightly from 13:55.')
    expect(asSentence('')).toBe('')
    expect(betterText({ betterAt: null, betterKind: null, betterGrip: null }, at(9))).toBeNull()
  })
})
