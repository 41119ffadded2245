import { describe, expect, it } from 'vitest'
import type { ActLine } from '#shared/schemas/piece-detail'
import { studioZone } from '#shared/time'
import { fateText, originText, problemText, progressText, reasonSentence, rungText, sharedReason, toldText, waitsForText, wasText, whenText, windowText } from '#shared/words/piece'

const at = (time: string) => Date.parse(`2026-04-07T${time}:00Z`)
const clock = { now: at('14:00'), zone: studioZone('UTC') }
const rung = (over: object) => ({ name: 'dry-to-handle', likelyAt: null, p90At: null, p98At: null, reachedAt: null, reason: null, ...over })
const line = (over: Partial<ActLine>): ActLine => ({
  actId: 2, rootId: 1, kind: 'coat on', doneAt: at('13:00'), actDoneAt: at('13:00'), toldAt: at('13:20'), correctedAt: null, actor: 'member', by: 'Moss', correctedBy: null,
  detail: { step: 'Gesso' }, placeId: null, pieceIds: [1], inForce: true, takenBack: false, problem: null, was: [], forecast: null, answered: null, mayCorrect: true, ...over,
})

describe('a rung', () => {
  it('is said with its doubt, and plainly once it is past', () => {
    expect(rungText(rung({ likelyAt: at('14:20'), p90At: at('15:05') }), clock)).toBe('likely 14:20, give it till 15:05')
    expect(rungText(rung({ likelyAt: at('13:20'), p90At: at('15:05') }), clock)).toBe('likely by now, give it till 15:05')
    expect(rungText(rung({ likelyAt: at('12:20'), p90At: at('13:00') }), clock)).toBe('since 13:00')
    expect(rungText(rung({ reachedAt: at('13:40') }), clock)).toBe('so since 13:40: tested by hand')
  })
  it('without a promise asks for a test and says why', () => {
    expect(rungText(rung({ likelyAt: at('14:20'), reason: 'too-damp' }), clock)).toBe('likely 14:20; too damp to promise: test it')
    expect(rungText(rung({ reason: 'never' }), clock)).toBe('no end in sight in this air: only after a touch test')
  })
})

describe('the reason of several rungs', () => {
  const cold = { likelyAt: at('14:20'), reason: 'below-minimum' }
  it('is said once for the film, and no more at each rung', () => {
    const rungs = [rung(cold), rung({ ...cold, likelyAt: at('16:00') }), rung({ likelyAt: at('18:00'), reason: 'too-damp' })]
    const why = sharedReason(rungs)
    expect(why && reasonSentence(why)).toBe('Below the material’s minimum temperature.')
    expect(rungs.map(each => rungText(each, clock, why))).toEqual(['likely 14:20; test it', 'likely 16:00; test it', 'likely 18:00; too damp to promise: test it'])
    expect(rungText(rung({ reason: 'below-minimum' }), clock, why)).toBe('only after a touch test')
  })
  it('is not drawn together where only one rung has it, or a hand has told', () => {
    expect(sharedReason([rung(cold), rung({ likelyAt: at('15:00'), p90At: at('15:10') })])).toBeNull()
    expect(sharedReason([rung(cold), rung({ ...cold, reachedAt: at('13:00') })])).toBeNull()
    expect(sharedReason([])).toBeNull()
  })
})

describe('how far a piece is', () => {
  const film = (over: object) => ({ step: 'Wax', material: 'Paste wax', hold: null, milestones: [rung({ reachedAt: at('13:00') }), rung({ name: 'cured', likelyAt: at('15:00'), p90At: at('18:00') })], ...over })
  it('counts the steps, and with the last of them done names what is still to be waited for', () => {
    expect(progressText(3, 9, [film({})], clock)).toBe('3 of 9 steps done')
    expect(progressText(9, 9, [], clock)).toBe('9 of 9 steps done')
    expect(progressText(9, 9, [film({})], clock)).toBe('9 of 9 steps done, and “Wax” still dries: cured from 18:00')
    expect(progressText(9, 9, [film({ milestones: [rung({ name: 'cured', p90At: at('13:30') })] })], clock)).toBe('9 of 9 steps done')
  })
  it('speaks by the film that is over last, and promises nothing where no time is known', () => {
    const unknown = film({ step: null, milestones: [rung({ reason: 'never' })] })
    expect(progressText(9, 9, [film({}), unknown], clock)).toBe('9 of 9 steps done, and paste wax still dries')
    expect(progressText(1, 1, [film({ hold: 'clamps', milestones: [] })], clock)).toBe('1 of 1 step done, and “Wax” is still held')
  })
})

describe('a window', () => {
  it('is open, to come or shut', () => {
    expect(windowText({ opensAt: at('13:00'), shutsAt: at('15:05') }, clock)).toBe('recoat window open, shuts 15:05')
    expect(windowText({ opensAt: at('14:30'), shutsAt: null }, clock)).toBe('recoat window opens 14:30')
    expect(windowText({ opensAt: at('12:00'), shutsAt: at('13:00') }, clock)).toBe('recoat window shut at 13:00')
    expect(windowText({ opensAt: null, shutsAt: null }, clock)).toBe('recoat window: its opening cannot be promised')
  })
})

describe('the history', () => {
  it('says when it was told, unless at once', () => {
    expect(whenText(line({}), clock)).toBe('13:00, Moss, told 20 min later')
    expect(toldText(at('13:00'), at('13:04'))).toBe('')
    expect(whenText(line({ by: null, actor: 'bench', toldAt: at('13:00') }), clock)).toBe('13:00, at the bench')
  })
  it('says what became of an act, and what it read before', () => {
    expect(fateText(line({}), [], clock)).toBeNull()
    expect(fateText(line({ correctedAt: at('13:30'), correctedBy: 'Oda' }), [], clock)).toBe('Corrected 13:30, Oda.')
    expect(fateText(line({ correctedAt: at('13:30'), takenBack: true, inForce: false }), [], clock)).toBe('Taken back 13:30. It does not count.')
    expect(fateText(line({ correctedAt: at('13:30'), inForce: false }), ['Box 2'], clock)).toBe('Moved off this piece 13:30: it was Box 2. It does not count here.')
    expect(wasText({ doneAt: at('13:40'), toldAt: at('13:45'), by: 'Moss', here: true, detail: { step: 'Gesso' } }, line({}), clock)).toBe('Before that it read: 13:40, Moss.')
    expect(wasText({ doneAt: at('13:40'), toldAt: at('13:45'), by: null, here: false, detail: {} }, line({}), clock)).toBe('Before that it stood with other pieces: 13:40.')
  })
  it('gives the reason of what can no longer be', () => {
    expect(problemText('no film to test')).toContain('no film on this piece')
  })
})

describe('a step', () => {
  it('names all it waits for', () => {
    expect(waitsForText(['Gesso', 'Glue up', 'PVA on the spine'])).toBe('waits for “Gesso”, “Glue up” and “PVA on the spine”')
    expect(waitsForText([])).toBe('waits')
  })
  it('that no schedule asked for says why it is there', () => {
    expect(originText({ origin: 'schedule', because: null }, clock)).toBeNull()
    expect(originText({ origin: 'recovery', because: { kind: 'window missed', doneAt: at('12:10'), by: null } }, clock)).toContain('put in 12:10: the window shut')
    expect(originText({ origin: 'branch', because: { kind: 'dropped out', doneAt: at('9:00'.padStart(5, '0')), by: 'Moss' } }, clock)).toContain('9:00, Moss: a run on this piece')
  })
})
