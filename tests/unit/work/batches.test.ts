import { describe, expect, it } from 'vitest'
import { insertedStep, waitingTurn } from '#shared/work/draft'
import { fold } from '#shared/work/fold'
import { releaseOrdinal } from '#shared/work/films'
import type { Seed, Step, WorkAct } from '#shared/work/types'

const hour = 60 * 60_000
const part = { id: 1, key: 'whole', name: 'whole', faces: [] }
const target = [{ partId: 1, faceId: null }]
const step = (key: string, ordinal: number, more: Partial<Step> = {}): Step => insertedStep({ key, ordinal, name: key, kind: 'coat', origin: 'schedule', insertedByActId: null, pieceMin: 5, targets: target, materialVersionId: 7, ...more })

/** A glue-up in clamps, a round of two coats, and packing. */
const seed: Seed = {
  parts: [part],
  steps: [
    step('glue', 1, { kind: 'glue-up', hold: 'clamps', turns: [waitingTurn(1, 5), waitingTurn(releaseOrdinal, 5, { kind: 'release' })] }),
    step('varnish', 2, { turns: [waitingTurn(1, 5), waitingTurn(2, 5)] }), step('pack', 3, { kind: 'packing', materialVersionId: null }),
  ],
  links: [{ from: 'varnish', to: 'pack', milestone: 'dry-to-handle', risk: 'p98', windowed: false }],
}

let count = 0
const act = (kind: WorkAct['kind'], at: number, body: WorkAct['body'] = {}): WorkAct => {
  count += 1
  return { id: count, rootId: count, kind, doneAt: at, toldAt: at, actor: 'member', memberId: 1, role: 'maker', body, subjects: [{ partId: 1, doneAt: at }] }
}
const statuses = (acts: WorkAct[]) => fold(seed, acts).steps.map(each => each.status)

describe('a cancelled batch', () => {
  it('leaves out what has not begun, and lets what is on dry', () => {
    // The first of two coats is on: the second is left out, the step rests with its film; nothing of the rest is done.
    const folded = fold(seed, [act('coat on', hour, { step: 'varnish' }), act('cancelled', 2 * hour)])
    expect(folded.steps.map(each => each.status)).toEqual(['left out', 'resting', 'left out'])
    expect(folded.coats).toHaveLength(1)
    expect(folded.steps.filter(each => each.atFront)).toEqual([])
  })

  it('still asks for what is in clamps to be taken out', () => {
    const folded = fold(seed, [act('glue-up on', hour, { step: 'glue' }), act('cancelled', 2 * hour)])
    expect(folded.steps[0]).toMatchObject({ status: 'resting', atFront: true })
    expect(folded.steps[0]?.turns.map(turn => turn.status)).toEqual(['done', 'waiting'])
    expect(statuses([act('glue-up on', hour, { step: 'glue' }), act('cancelled', 2 * hour), act('it is out', 5 * hour)])[0]).toBe('done')
  })

  it('takes up again what was set aside as little as what was being done', () => {
    expect(statuses([act('began', hour, { step: 'varnish' }), act('set aside', hour, { step: 'glue', reason: 'cracked' }), act('cancelled', 2 * hour)])).toEqual(['left out', 'left out', 'left out'])
  })
})

describe('a piece and its batch', () => {
  it('belongs to the batch it started in until an act puts it with another', () => {
    const start = act('batch started', hour, { placeId: 4 })
    expect(fold(seed, [start]).batch).toEqual({ madeByActId: start.rootId })
    expect(fold(seed, [start, act('regrouped', 2 * hour, { batchId: 9 })]).batch).toEqual({ batchId: 9 })
    const split = act('regrouped', 3 * hour, { name: 'Seconds' })
    expect(fold(seed, [start, act('regrouped', 2 * hour, { batchId: 9 }), split]).batch).toEqual({ madeByActId: split.rootId })
  })

  it('stands where it was moved to before its start, and keeps the batch it was put with', () => {
    const start = act('batch started', 24 * hour, { placeId: 4 })
    const folded = fold(seed, [act('moved', hour, { placeId: 5 }), act('regrouped', hour, { batchId: 9 }), start])
    expect(folded.stays.filter(stay => stay.toAt === null).map(stay => stay.placeId)).toEqual([5])
    expect(folded.batch).toEqual({ batchId: 9 })
  })

  it('says how it went, and comes back to a place with nothing of it lost', () => {
    const acts = [act('batch started', hour, { placeId: 4 }), act('coat on', 2 * hour, { step: 'varnish' }), act('gone', 3 * hour, { how: 'sold' })]
    expect(fold(seed, acts)).toMatchObject({ goneAt: 3 * hour, goneHow: 'sold' })
    const here = fold(seed, [...acts, act('back', 4 * hour, { placeId: 5 })])
    expect(here).toMatchObject({ goneAt: null, goneHow: null, problems: [] })
    expect(here.coats).toHaveLength(1)
    expect(here.stays.map(stay => [stay.placeId, stay.toAt])).toEqual([[4, 3 * hour], [5, null]])
  })

  it('cannot come back when it never went', () => {
    const back = act('back', 2 * hour, { placeId: 5 })
    expect(fold(seed, [act('batch started', hour, { placeId: 4 }), back]).problems).toEqual([{ actId: back.rootId, why: 'still here' }])
  })
})
