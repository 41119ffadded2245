import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { aboutToShutMs, lateness, mayBegin, stepState } from '#shared/verdict/begin'
import type { BeginFacts, LinkState, StepState, StepStateFacts, Who } from '#shared/verdict/begin'
import { holds, risks } from '#shared/terms'
import { hour, minute, moment, unpromised } from './facts'

const link = (changes: Partial<LinkState> = {}): LinkState => ({
  step: 'Gesso', status: 'resting', milestone: 'dry-to-sand-lightly', risk: 'likely', windowed: false,
  films: [{ moment: moment(hour(12)), windows: [], hold: null }], ...changes,
})
const step = (changes: Partial<BeginFacts> = {}): BeginFacts => ({ status: 'waiting', kind: 'light sanding', links: [link()], doubt: null, keepOut: null, ...changes })
const maker: Who = { role: 'maker', helperKinds: [], equipped: false }
const helper: Who = { role: 'helper', helperKinds: ['bench work'], equipped: false }
const code = (facts: BeginFacts, at: number, who: Who | null = maker) => mayBegin(facts, at, null, who).because.code

describe('whether a step may begin', () => {
  it.each(risks)('asks each link at its own risk: %s', (risk) => {
    // moment(12:00): likely 11:00, 90 % 11:40, 98 % 12:00.
    const from = { likely: hour(11), p90: hour(12) - 20 * minute, p98: hour(12) }[risk]
    const facts = step({ links: [link({ risk })] })
    expect(mayBegin(facts, from - 1, null, maker)).toEqual({ may: false, from, till: null, because: { code: 'drying', step: 'Gesso', milestone: 'dry-to-sand-lightly' } })
    expect(mayBegin(facts, from, null, maker)).toEqual({ may: true, from, till: null, because: { code: 'may begin' } })
  })

  it('takes a maker\'s word over any time', () => {
    const tested = link({ risk: 'p98', films: [{ moment: { ...unpromised(null), reachedAt: hour(8) }, windows: [], hold: null }] })
    expect(mayBegin(step({ links: [tested] }), hour(8), null, maker).may).toBe(true)
  })

  it('waits for the slowest of all films and links', () => {
    const slow = link({ step: 'Varnish', films: [{ moment: moment(hour(12)), windows: [], hold: null }, { moment: moment(hour(15)), windows: [], hold: null }] })
    expect(mayBegin(step({ links: [link(), slow] }), hour(13), null, maker)).toMatchObject({ may: false, from: hour(14), because: { code: 'drying', step: 'Varnish' } })
  })

  it('may begin at once with nothing before it', () => {
    expect(mayBegin(step({ links: [] }), hour(9), null, maker)).toEqual({ may: true, from: hour(9), till: null, because: { code: 'may begin' } })
    expect(code(step({ links: [link({ status: 'left out' })] }), hour(1))).toBe('may begin')
    expect(code(step({ links: [link({ films: [] })] }), hour(1))).toBe('may begin')
  })

  it('says what stands in the way', () => {
    expect(code(step({ status: 'doing' }), hour(12))).toBe('not waiting')
    expect(code(step({ doubt: 'chilled' }), hour(12))).toBe('doubt')
    expect(code(step({ links: [link({ status: 'waiting' })] }), hour(12))).toBe('waits for')
    expect(code(step({ links: [link({ status: 'resting', milestone: null })] }), hour(12))).toBe('waits for')
    expect(code(step({ links: [link({ status: 'done', milestone: null, films: [] })] }), hour(12))).toBe('may begin')
    expect(code(step({ links: [link({ films: [{ moment: moment(hour(9)), windows: [], hold: 'clamps' }] })] }), hour(12))).toBe('held')
    expect(code(step({ links: [link({ films: [{ moment: null, windows: [], hold: null }] })] }), hour(12))).toBe('unknown film')
    expect(code(step({ links: [link({ risk: 'p90', films: [{ moment: unpromised(hour(9)), windows: [], hold: null }] })] }), hour(12))).toBe('no promise')
  })

  it('lets light sanding go by a likely time even where nothing can be promised', () => {
    expect(code(step({ links: [link({ films: [{ moment: unpromised(hour(9)), windows: [], hold: null }] })] }), hour(9))).toBe('may begin')
  })

  it('gives no time that reads as leave to enter a kept-out room, and lets the equipped operator go on', () => {
    const inside = step({ keepOut: { room: 'Spray room' } })
    expect(mayBegin(inside, hour(12), null, maker)).toEqual({ may: false, from: null, till: null, because: { code: 'keep out', room: 'Spray room' } })
    expect(mayBegin(inside, hour(12), null, null).may).toBe(false)
    expect(mayBegin(inside, hour(12), null, { ...maker, equipped: true }).may).toBe(true)
  })

  it('asks the role for its kinds of step', () => {
    expect(code(step(), hour(12), helper)).toBe('role')
    expect(code(step({ kind: 'bench work' }), hour(12), helper)).toBe('may begin')
    expect(code(step(), hour(12), null)).toBe('may begin')
  })

  it('lets nothing begin by the clock of a page cut off', () => {
    const heardAt = hour(10)
    expect(mayBegin(step(), hour(11), heardAt, maker).may).toBe(false)
    expect(mayBegin(step(), hour(11), hour(11) - 5 * minute, maker).may).toBe(true)
  })
})

describe('recoat windows', () => {
  // A spray enamel: open from the start for an hour, then again after two days; ready to recoat only late (likely 47:00).
  const enamel = link({
    step: 'First coat', milestone: 'ready-to-recoat', risk: 'likely', windowed: true,
    films: [{ moment: moment(hour(48)), hold: null, windows: [{ opensAt: hour(0), shutsAt: hour(1), fromStart: true }, { opensAt: hour(50), shutsAt: null, fromStart: false }] }],
  })
  const recoat = step({ kind: 'coat', links: [enamel] })

  it('are open from the start where the material says so, shut in the middle, then open for good', () => {
    expect(mayBegin(recoat, hour(0.5), null, maker)).toMatchObject({ may: true, from: hour(0), till: hour(1) })
    expect(mayBegin(recoat, hour(1) - 1, null, maker).may).toBe(true)
    expect(mayBegin(recoat, hour(1), null, maker)).toEqual({ may: false, from: hour(50), till: null, because: { code: 'window to come', step: 'First coat' } })
    expect(mayBegin(recoat, hour(50), null, maker)).toMatchObject({ may: true, till: null })
  })

  const epoxy = (shutsAt: number) => link({
    step: 'Epoxy', milestone: 'ready-to-recoat', risk: 'p90', windowed: true,
    films: [{ moment: moment(hour(12)), hold: null, windows: [{ opensAt: hour(10), shutsAt, fromStart: false }] }],
  })

  it('open no earlier than ready to recoat', () => {
    expect(mayBegin(step({ links: [epoxy(hour(20))] }), hour(11), null, maker)).toMatchObject({ may: false, from: hour(12) - 20 * minute, till: hour(20), because: { code: 'drying' } })
  })

  it('shut for good at their end, or when they shut before the film is ready', () => {
    expect(code(step({ links: [epoxy(hour(20))] }), hour(20) - 1)).toBe('may begin')
    expect(code(step({ links: [epoxy(hour(20))] }), hour(20))).toBe('window shut')
    expect(code(step({ links: [epoxy(hour(11))] }), hour(10.5))).toBe('window shut')
  })

  it('say alone when, where no milestone is asked for', () => {
    const tacky = link({ ...epoxy(hour(20)), milestone: null, films: [{ moment: null, hold: null, windows: [{ opensAt: hour(10), shutsAt: hour(20), fromStart: false }] }] })
    expect(mayBegin(step({ links: [tacky] }), hour(9), null, maker)).toMatchObject({ may: false, from: hour(10), till: hour(20), because: { code: 'window to come' } })
    expect(mayBegin(step({ links: [tacky] }), hour(10), null, maker)).toMatchObject({ may: true, till: hour(20) })
    expect(code(step({ links: [tacky] }), hour(20))).toBe('window shut')
    expect(code(step({ links: [{ ...tacky, status: 'waiting' }] }), hour(10))).toBe('waits for')
    expect(code(step({ links: [{ ...tacky, films: [{ ...tacky.films[0]!, hold: 'clamps' }] }] }), hour(10))).toBe('held')
  })

  it('must all be open at once', () => {
    expect(mayBegin(step({ links: [epoxy(hour(20)), epoxy(hour(15))] }), hour(13), null, maker)).toMatchObject({ may: true, till: hour(15) })
    const other = link({ ...epoxy(hour(30)), films: [{ moment: moment(hour(16)), hold: null, windows: [{ opensAt: hour(16), shutsAt: hour(30), fromStart: false }] }] })
    expect(code(step({ links: [epoxy(hour(15)), other] }), hour(13))).toBe('window shut')
  })

  it('never open without a promise', () => {
    const never = link({ windowed: true, films: [{ moment: moment(hour(9)), hold: null, windows: [{ opensAt: null, shutsAt: null, fromStart: false }] }] })
    expect(code(step({ links: [never] }), hour(500))).toBe('window shut')
  })

  it('do not keep a step waiting that does not ask for them', () => {
    expect(code(step({ links: [{ ...epoxy(hour(11)), windowed: false }] }), hour(40))).toBe('may begin')
  })

  it('make a step late an hour before its last moment to start, and when shut', () => {
    const facts = step({ links: [epoxy(hour(20))] })
    const at = (now: number, last: number | null) => lateness(mayBegin(facts, now, null, maker), last, now)
    // Last start 18:30 because of set-up and pieces; late from 17:30.
    expect(at(hour(18.5) - aboutToShutMs - 1, hour(18.5))).toBeNull()
    expect(at(hour(18.5) - aboutToShutMs, hour(18.5))).toBe('shutting')
    expect(at(hour(19), null)).toBe('shutting')
    expect(at(hour(20), hour(18.5))).toBe('shut')
    expect(at(hour(11), hour(9))).toBeNull()
    expect(lateness(mayBegin(step(), hour(12), null, maker), null, hour(12))).toBeNull()
  })

  it('what it says of `from` is true: not before it, but at it', () => {
    const films = fc.record({ met: fc.integer({ min: 0, max: 30 }), opens: fc.integer({ min: 0, max: 30 }), length: fc.integer({ min: 1, max: 20 }), later: fc.integer({ min: 1, max: 20 }), fromStart: fc.boolean() })
      .map(({ met, opens, length, later, fromStart }) => ({
        moment: moment(hour(met)), hold: null,
        windows: [{ opensAt: hour(opens), shutsAt: hour(opens + length), fromStart }, { opensAt: hour(opens + length + later), shutsAt: null, fromStart: false }],
      }))
    fc.assert(fc.property(fc.array(films, { minLength: 1, maxLength: 3 }), fc.boolean(), fc.integer({ min: 0, max: 60 }), (all, windowed, at) => {
      const facts = step({ links: [link({ windowed, films: all })] })
      const begin = mayBegin(facts, hour(at), null, maker)
      expect(begin.may).toBe(begin.from !== null && begin.from <= hour(at))
      if (begin.from === null) return
      expect(mayBegin(facts, begin.from, null, maker).may).toBe(true)
      if (begin.from > hour(at)) expect(mayBegin(facts, begin.from - 1, null, maker).may).toBe(false)
      if (begin.till !== null) expect(mayBegin(facts, begin.till, null, maker).from).not.toBe(begin.from)
    }))
  })
})

describe('the state of a step', () => {
  const begin = mayBegin(step(), hour(9), null, maker)
  const state = (changes: Partial<StepStateFacts>) => stepState({ status: 'waiting', hold: null, doubtful: false, begin, late: null, ...changes })
  const cases: [StepState, Partial<StepStateFacts>][] = [
    ['waits for', {}],
    ['may begin', { begin: mayBegin(step(), hour(12), null, maker) }],
    ['late', { late: 'shut' }],
    ['late', { late: 'shutting', begin: mayBegin(step(), hour(12), null, maker) }],
    ['being done', { status: 'doing' }],
    ['drying', { status: 'resting' }],
    ['done', { status: 'done' }],
    ['set aside', { status: 'set aside', doubtful: true }],
    ['left out', { status: 'left out' }],
    ['doubtful', { status: 'resting', doubtful: true, hold: 'clamps' }],
    ['doubtful', { status: 'done', doubtful: true }],
  ]
  it.each(cases)('%s', (expected, changes) => {
    expect(state(changes)).toBe(expected)
  })

  it('names what holds it', () => {
    expect(holds.map(hold => state({ status: 'resting', hold }))).toEqual(['clamped', 'pressed', 'weighted'])
  })
})
