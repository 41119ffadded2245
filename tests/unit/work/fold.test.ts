import { describe, expect, it } from 'vitest'
import { fold } from '#shared/work/fold'
import { insertedStep, waitingTurn } from '#shared/work/draft'
import type { Link, Seed, Step, WorkAct } from '#shared/work/types'

const hour = 60 * 60_000
const part = { id: 1, key: 'whole', name: 'whole', faces: [{ id: 11, key: 'front' }, { id: 12, key: 'back' }] }
const front = [{ partId: 1, faceId: 11 }]

const step = (key: string, ordinal: number, more: Partial<Step> = {}): Step => insertedStep({ key, ordinal, name: key, kind: 'coat', origin: 'schedule', insertedByActId: null, pieceMin: 5, targets: front, materialVersionId: 7, ...more })
const link = (from: string, to: string, more: Partial<Link> = {}): Link => ({ from, to, milestone: 'ready-to-recoat', risk: 'p90', windowed: false, ...more })

/** Gesso, sanding, varnish in two coats. */
const seed: Seed = {
  parts: [part],
  steps: [step('gesso', 1), step('sand', 2, { kind: 'light sanding', materialVersionId: null }), step('varnish', 3, { turns: [waitingTurn(1, 5), waitingTurn(2, 5)] })],
  links: [link('gesso', 'sand', { milestone: 'dry-to-sand-lightly', risk: 'likely' }), link('sand', 'varnish', { milestone: null })],
}

let count = 0
const act = (kind: WorkAct['kind'], at: number, body: WorkAct['body'] = {}, more: Partial<WorkAct> = {}): WorkAct => {
  count += 1
  return { id: count, rootId: count, kind, doneAt: at, toldAt: at, actor: 'member', memberId: 1, role: 'maker', body, subjects: [{ partId: 1, doneAt: at }], ...more }
}
const statuses = (acts: WorkAct[]) => Object.fromEntries(fold(seed, acts).steps.map(each => [each.key, each.status]))
const gesso = () => act('coat on', hour, { step: 'gesso' })

describe('a piece folded from its acts', () => {
  it('has done nothing before its first act, and only its first step is at the front', () => {
    const folded = fold(seed, [])
    expect(folded.steps.map(each => [each.status, each.atFront])).toEqual([['waiting', true], ['waiting', false], ['waiting', false]])
  })

  it('does not change with the order in which acts are told', () => {
    const acts = [gesso(), act('work done', 20 * hour, { step: 'sand' }), act('coat on', 21 * hour, { step: 'varnish' })]
    expect(fold(seed, [...acts].reverse())).toEqual(fold(seed, acts))
  })

  it('lets a film rest until what waited for it has begun', () => {
    expect(statuses([gesso()])).toEqual({ gesso: 'resting', sand: 'waiting', varnish: 'waiting' })
    expect(statuses([gesso(), act('work done', 20 * hour, { step: 'sand' })])).toEqual({ gesso: 'done', sand: 'done', varnish: 'waiting' })
  })

  it('lays coats of a round one over the other', () => {
    const folded = fold(seed, [gesso(), act('work done', 20 * hour, { step: 'sand' }), act('coat on', 21 * hour, { step: 'varnish' }), act('coat on', 45 * hour, { step: 'varnish' })])
    expect(folded.coats.map(each => [each.turn?.step, each.turn?.ordinal, each.targets[0]?.layer])).toEqual([['gesso', 1, 1], ['varnish', 1, 2], ['varnish', 2, 3]])
    expect(folded.steps[2]?.status).toBe('resting')
  })

  it('keeps a round before what follows it until its last coat is on', () => {
    const twice: Seed = { parts: [part], steps: [step('shellac', 1, { turns: [waitingTurn(1, 5), waitingTurn(2, 5)] }), step('polish', 2)], links: [link('shellac', 'polish')] }
    const polishAtFront = (coats: number) => fold(twice, Array.from({ length: coats }, (_, i) => act('coat on', (i + 1) * hour, { step: 'shellac' }))).steps[1]?.atFront
    expect([0, 1, 2].map(polishAtFront)).toEqual([false, false, true])
  })

  it('keeps and lists an act that cannot be true', () => {
    const extra = act('coat on', 2 * hour, { step: 'gesso' })
    expect(fold(seed, [gesso(), extra]).problems).toEqual([{ actId: extra.rootId, why: 'nothing left to do' }])
  })

  it('is in hand from "began" until somebody says what came of it', () => {
    const began = act('began', hour, { step: 'gesso' })
    expect(fold(seed, [began]).steps[0]?.turns[0]).toMatchObject({ status: 'doing', beganAt: hour, doingMemberId: 1 })
    expect(statuses([began, act('not on yet', 2 * hour, { step: 'gesso' })]).gesso).toBe('waiting')
    expect(statuses([began, act('coat on', 2 * hour, { step: 'gesso' })]).gesso).toBe('resting')
  })

  it('drops out for a run, fills it, levels it, and only then goes on', () => {
    const run = act('dropped out', 3 * hour, {})
    const folded = fold(seed, [gesso(), run])
    expect(folded.steps.filter(each => each.origin === 'branch').map(each => each.kind)).toEqual(['coat', 'levelling'])
    expect(folded.links).toContainEqual({ from: `level ${run.rootId}`, to: 'sand', milestone: null, risk: 'p90', windowed: false })
    expect(folded.steps.find(each => each.key === 'sand')?.atFront).toBe(false)
    const back = act('rejoined', 4 * hour)
    expect(fold(seed, [gesso(), run, back]).steps.find(each => each.key === 'sand')?.atFront).toBe(true)
  })

  it('takes a recovery in when a window was missed, and the window binds no longer', () => {
    const windowed: Seed = { ...seed, links: [link('gesso', 'varnish', { windowed: true })] }
    const folded = fold(windowed, [gesso(), act('window missed', 30 * hour, { from: 'gesso', to: 'varnish', recovery: 'Scuff with 320', minutes: 12 })])
    expect(folded.steps.find(each => each.origin === 'recovery')).toMatchObject({ name: 'Scuff with 320', pieceMin: 12, kind: 'light sanding' })
    expect(folded.links.find(each => each.from === 'gesso' && each.to === 'varnish')?.windowed).toBe(false)
    expect(folded.steps.find(each => each.key === 'varnish')?.atFront).toBe(false)
  })

  it('gives the turn back when a film is stripped', () => {
    const folded = fold(seed, [gesso(), act('stripped', 5 * hour)])
    expect(folded.steps[0]).toMatchObject({ status: 'waiting', atFront: true })
    expect(folded.coats[0]?.strippedAt).toBe(5 * hour)
  })

  it('passes a wait on when a step is left out', () => {
    const folded = fold(seed, [gesso(), act('left out', 2 * hour, { step: 'sand' })])
    expect(folded.links).toContainEqual({ from: 'gesso', to: 'varnish', milestone: 'dry-to-sand-lightly', risk: 'likely', windowed: false })
    expect(folded.steps[2]?.atFront).toBe(true)
  })
})

describe('joining', () => {
  const two: Seed = {
    parts: [{ id: 1, key: 'spine', name: 'spine', faces: [] }, { id: 2, key: 'lining', name: 'lining', faces: [] }],
    steps: [step('glue', 1, { kind: 'glue-up', hold: 'clamps', releaseMin: 5, targets: [{ partId: 1, faceId: null }, { partId: 2, faceId: null }], turns: [waitingTurn(1, 10), waitingTurn(900, 5, { kind: 'release' })] })],
    links: [],
  }
  const both = { subjects: [{ partId: 1, doneAt: hour }, { partId: 2, doneAt: hour }] }
  const start = act('batch started', 0, { placeId: 5 }, { subjects: [{ partId: 1, doneAt: 0 }, { partId: 2, doneAt: 0 }] })

  it('holds the parts, ends the stay of the one that was joined, and moves the other', () => {
    const folded = fold(two, [start, act('glue-up on', hour, { step: 'glue', placeId: 9 }, both)])
    expect(folded.joins.map(each => [each.partId, each.intoPartId])).toEqual([[2, 1]])
    expect(folded.coats[0]).toMatchObject({ hold: 'clamps', outAt: null })
    expect(folded.stays.filter(each => each.toAt === null)).toMatchObject([{ partId: 1, placeId: 9 }])
  })

  it('is over when it is out of the clamps', () => {
    const folded = fold(two, [start, act('glue-up on', hour, { step: 'glue' }, both), act('it is out', 3 * hour)])
    expect(folded.coats[0]?.outAt).toBe(3 * hour)
    expect(folded.steps[0]?.status).toBe('done')
  })
})

describe('a thumb', () => {
  it('of a maker lifts a doubt, of a helper only teaches', () => {
    const failed = act('touch test', 2 * hour, { milestone: 'dry-to-handle', reached: false, spoilt: true })
    const yes = (role: WorkAct['role']) => act('touch test', 6 * hour, { milestone: 'dry-to-handle', reached: true }, { role })
    expect(fold(seed, [gesso(), failed, yes('helper')]).doubts[0]?.clearedActId).toBeNull()
    const lifted = yes('maker')
    expect(fold(seed, [gesso(), failed, lifted]).doubts[0]?.clearedActId).toBe(lifted.rootId)
    expect(fold(seed, [gesso(), failed, yes('helper')]).tests).toHaveLength(2)
  })
})
