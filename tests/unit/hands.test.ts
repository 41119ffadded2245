import { describe, expect, it } from 'vitest'
import { handsJobs, wetBeside } from '#shared/hands'
import { actsOf } from '#shared/hands-acts'
import { filmStrip, worstFilm } from '#shared/piece-strip'
import type { FilmState, PieceState, TurnState } from '#shared/schemas/piece-state'
import { studioZone } from '#shared/time'
import { readPiece } from '#shared/verdict/piece'
import { effectText, jobMoment, jobNames, jobTitle, timesText } from '#shared/words/hands'

const minute = 60_000
const hour = 60 * minute
/** A Tuesday at ten. */
const now = Date.parse('2026-04-07T10:00:00Z')
const clock = { now, zone: studioZone('UTC') }
const where = { rooms: [{ id: 1, name: 'Bench', keepOut: null }], places: [{ id: 1, name: 'Shelf A' }] }

const film = (dry: number, more: Partial<FilmState> = {}): FilmState => ({
  coatId: 1, actId: 1, kind: 'coat', step: 'First varnish', material: 'Acrylic varnish', materialVersionId: 1, solventBorne: false, mustLieLevel: false, glovesUntil: null,
  partIds: [1], faces: [], layer: 1, beganAt: now - 2 * hour, endedAt: now - 2 * hour, hold: null, windows: [], doubts: [],
  milestones: [
    { name: 'dust-free', likelyAt: dry - hour, p90At: dry - 30 * minute, p98At: dry, reachedAt: null, reason: null },
    { name: 'ready-to-recoat', likelyAt: dry, p90At: dry + 30 * minute, p98At: dry + hour, reachedAt: null, reason: null },
    { name: 'dry-to-handle', likelyAt: dry, p90At: dry + 30 * minute, p98At: dry + hour, reachedAt: null, reason: null },
  ],
  ...more,
})

const rung = (dry: number) => ({ name: 'ready-to-recoat', likelyAt: dry, p90At: dry + 30 * minute, p98At: dry + hour, reachedAt: null, reason: null })

const turn = (id: number, dry: number | null, more: Partial<TurnState> = {}, step: Partial<TurnState['step']> = {}): TurnState => ({
  turnId: id, partIds: [1], kind: 'work', name: '', no: 1, of: 1, status: 'waiting',
  step: { id, key: 'varnish-2', name: 'Second varnish', kind: 'coat', origin: 'schedule', status: 'waiting', asideReason: null, hold: null, untilEnough: false, materialVersionId: 1, material: 'Acrylic varnish', solventBorne: false, ...step },
  setupMin: 5, pieceMin: 4, cleanMin: 5, dust: 'none', notOnAt: null, doing: null, wantedAt: null, plan: null,
  waits: dry === null ? [] : [{ step: 'First varnish', status: 'resting', milestone: 'ready-to-recoat', risk: 'p90', windowed: false, films: [{ moment: rung(dry), windows: [], hold: null }] }],
  ...more,
})

const piece = (id: number, turns: TurnState[], films: FilmState[] = [], batch = 1): PieceState => ({
  id, name: `Tide box ${id}`, version: 1, batch: { id: batch, name: `Batch ${batch}` }, order: null, turns, stepsDone: 1, stepsOf: 3, intake: null,
  groups: [{ parts: [{ partId: 1, key: 'whole', name: 'whole', grip: null, missingAt: null, seenAt: now }], placeId: 1, roomId: 1, carrier: null, films }],
})

const read = (pieces: PieceState[]) => pieces.map(each => readPiece(each, where, now, now))
const jobs = (pieces: PieceState[]) => handsJobs(read(pieces), clock, now)
const planAt = (startsAt: number, more: Partial<NonNullable<TurnState['plan']>> = {}) => ({ startsAt, endsAt: startsAt + hour, dueAt: startsAt, memberId: null, sessionId: 1, sessionSize: 1, lastStartAt: null, firstFew: null, lastStartFewAt: null, afterTest: false, ...more })

describe('the list of the hands', () => {
  it('puts like work of one batch into one job', () => {
    const [job, ...rest] = jobs([1, 2, 3].map(id => piece(id, [turn(id, now - hour)])))
    expect(rest).toEqual([])
    expect(job && [job.section, job.may, jobTitle(job), jobNames(job)]).toEqual(['now', true, 'Second varnish', 'Tide boxes 1–\u20603'])
  })

  it('keeps batches apart unless the plan does them in one session', () => {
    const alone = jobs([piece(1, [turn(1, now - hour)], [], 1), piece(2, [turn(2, now - hour)], [], 2)])
    expect(alone).toHaveLength(2)
    const together = jobs([piece(1, [turn(1, now - hour, { plan: planAt(now + 5 * minute) })], [], 1), piece(2, [turn(2, now - hour, { plan: planAt(now + 5 * minute) })], [], 2)])
    expect(together).toHaveLength(1)
  })

  it('splits pieces that become ready more than an hour apart, and not those ten minutes apart', () => {
    // Ready at 90 %: half an hour after `dry`. 12:00 and 12:10 go together, 14:00 is its own job.
    const found = jobs([90, 100, 210].map((after, index) => piece(index + 1, [turn(index + 1, now + after * minute)])))
    expect(found.map(jobNames)).toEqual(['Tide boxes 1 and 2', 'Tide box 3'])
    expect(found.map(job => job.at)).toEqual([now + 130 * minute, now + 240 * minute])
  })

  it('orders by section, then what presses, then by when hands are wanted', () => {
    const late = piece(4, [turn(4, now - hour, { plan: planAt(now + 20 * minute, { lastStartAt: now + 30 * minute }) }, { key: 'late' })])
    // A window shuts in 50 minutes: the last start lies within the hour, so it presses.
    late.turns[0]!.waits[0]!.windowed = true
    late.turns[0]!.waits[0]!.films[0]!.windows = [{ opensAt: now - hour, shutsAt: now + 50 * minute, fromStart: false }]
    const found = jobs([
      piece(1, [turn(1, null, {}, { key: 'aside', status: 'set aside', asideReason: 'cracked' })]),
      piece(2, [turn(2, now + 30 * hour, {}, { key: 'days' })]),
      piece(3, [turn(3, now + hour, {}, { key: 'today' })]),
      late,
      piece(5, [turn(5, null, {}, { key: 'free' })]),
    ])
    expect(found.map(job => [job.turn.step.key, job.section])).toEqual([['late', 'now'], ['free', 'now'], ['today', 'today'], ['days', 'days'], ['aside', 'waiting']])
    expect(found[0]?.pressing).toBe(true)
  })

  it('asks about a coat whose planned start has passed', () => {
    const [job] = jobs([piece(1, [turn(1, now - hour, { plan: planAt(now - 30 * minute) })])])
    expect(job && [job.due, job.section, jobMoment(job, null, clock)]).toEqual([true, 'now', 'Due since 9:30: is it on?'])
    expect(job && actsOf(job, { step: true, maker: true }).second?.label).toBe('Not on yet')
    const [answered] = jobs([piece(1, [turn(1, now - hour, { notOnAt: now, plan: planAt(now - 30 * minute) })])])
    expect(answered?.due).toBe(false)
  })

  it('never joins two sessions with last moments of their own, and says each as the piece itself says it', () => {
    // All may begin since an hour; two are to start by 10:20, the third, alone in the next session, by 10:45.
    const session = (id: number, size: number, by: number) => planAt(now + 15 * minute, { sessionId: id, sessionSize: size, lastStartAt: now + by * minute })
    const found = jobs([piece(1, [turn(1, now - hour, { plan: session(1, 2, 20) })]), piece(2, [turn(2, now - hour, { plan: session(1, 2, 20) })]), piece(3, [turn(3, now - hour, { plan: session(2, 1, 45) })])])
    expect(found.map(job => [jobNames(job), jobMoment(job, null, clock)])).toEqual([
      ['Tide boxes 1 and 2', 'Start by 10:20 to do both.'],
      ['Tide box 3', 'Start by 10:45.'],
    ])
  })

  it('speaks for the first of several plans, and for the window that shuts first, each with how many it is of', () => {
    // All may begin since an hour. Two are planned at 10:45, the third tomorrow; its window shuts at 10:50, and nothing counts back from it.
    const shutting = turn(3, now - hour, { plan: planAt(now + 24 * hour, { sessionId: 2 }) })
    shutting.waits[0]!.windowed = true
    shutting.waits[0]!.films[0]!.windows = [{ opensAt: now - hour, shutsAt: now + 50 * minute, fromStart: false }]
    const [job, ...rest] = jobs([1, 2].map(id => piece(id, [turn(id, now - hour, { plan: planAt(now + 45 * minute) })])).concat(piece(3, [shutting])))
    expect(rest).toEqual([])
    expect(job && [job.pressing, job.at, jobMoment(job, null, clock)]).toEqual([true, now + 45 * minute, 'May begin; planned for 10:45, 2 of 3 then; the window of 1 of 3 shuts at 10:50.'])
  })

  it('does not say its own name again while it waits', () => {
    const [job] = jobs([piece(1, [turn(1, now + hour)])])
    expect(job && jobMoment(job, null, clock)).toBe('From 11:30; waits until “First varnish” is ready to recoat.')
  })

  it('says how many of a session are of this job when it is for more', () => {
    const plan = planAt(now + 15 * minute, { sessionSize: 3, lastStartAt: now + 20 * minute })
    const found = jobs([piece(1, [turn(1, now - hour, { plan })]), piece(2, [turn(2, now - hour, { plan }, { key: 'varnish-1' })])])
    expect(found.map(job => jobMoment(job, null, clock))).toEqual(['Start by 10:20 to do all 3, 1 of them here.', 'Start by 10:20 to do all 3, 1 of them here.'])
  })

  it('asks about the first planned start that passed, and still says the last moment', () => {
    const plan = (due: number) => planAt(now - due * minute, { sessionSize: 2, lastStartAt: now + 20 * minute })
    const [job] = jobs([piece(1, [turn(1, now - hour, { plan: plan(10) })]), piece(2, [turn(2, now - hour, { plan: plan(30) })])])
    expect(job && jobMoment(job, null, clock)).toBe('Due since 9:30: is it on? Start by 10:20 to do both.')
  })

  it('says no last moment of work in a shut room', () => {
    const shut = { ...where, rooms: where.rooms.map(room => ({ ...room, keepOut: { sinceAt: now - hour, opensBy: 'Isaura' } })) }
    const closed = readPiece(piece(1, [turn(1, now - hour, { plan: planAt(now + hour, { lastStartAt: now + 20 * minute }) })]), shut, now, now)
    expect(closed.next).toBeNull()
    expect(handsJobs([closed], clock, now).map(job => jobMoment(job, null, clock))).toEqual([expect.stringContaining('Keep out of')])
  })

  it('puts what the plan wants tomorrow into the next days, though it may begin', () => {
    const [job] = jobs([piece(1, [turn(1, now - hour, { plan: planAt(now + 24 * hour) })])])
    expect(job && [job.may, job.section, jobMoment(job, null, clock)]).toEqual([true, 'days', 'May begin; planned for Wed morning.'])
  })

  it('says under the next days that a time of this day is today’s, and for when it is planned', () => {
    const [job] = jobs([piece(1, [turn(1, now + hour, { plan: planAt(now + 23 * hour) })])])
    expect(job && [job.section, jobMoment(job, null, clock)]).toEqual(['days', 'From 11:30 today, planned for Wed 9:00; waits until “First varnish” is ready to recoat.'])
  })

  it('names what is wet beside dusty work', () => {
    const pieces = read([piece(1, [turn(1, null, { dust: 'some' }, { kind: 'light sanding' })]), piece(2, [], [film(now + 2 * hour)]), piece(3, [], [film(now - 2 * hour)])])
    const [job] = handsJobs(pieces, clock, now)
    expect(job && wetBeside(job, pieces, now)).toEqual(['Tide box 2'])
  })
})

describe('the keys of a job', () => {
  const [open] = jobs([piece(1, [turn(1, now - hour)], [film(now - hour)])])
  const [drying] = jobs([piece(1, [turn(1, now + hour)], [film(now + hour, { solventBorne: true })])])
  const labels = (job: typeof open, step: boolean, maker: boolean) => {
    const acts = job ? actsOf(job, { step, maker }) : null
    return acts && [acts.main?.label, acts.second?.label, ...acts.more.map(act => act.label)]
  }

  it('put the common fact first', () => {
    expect(labels(open, true, true)?.slice(0, 2)).toEqual(['Coat is on', 'I am starting'])
    // Before it may begin a test stands alone, and what nobody presses yet is under More.
    expect(labels(drying, true, true)?.slice(0, 3)).toEqual([undefined, undefined, 'Coat is on'])
  })

  it('offer no warm air on a solvent film', () => {
    expect(labels(open, true, true)).toContain('Warm air')
    expect(labels(drying, true, true)).not.toContain('Warm air')
    expect(labels(drying, true, true)).toContain('In the sun')
  })

  it('leave a helper only what a helper may tell', () => {
    expect(labels(open, false, false)).toEqual([undefined, undefined])
    expect(open && actsOf(open, { step: false, maker: false }).tests).toBe('ready-to-recoat')
    expect(labels(drying, true, false)).toEqual([undefined, undefined, 'Coat is on', 'I am starting'])
    expect(drying && actsOf(drying, { step: true, maker: false }).tests).toBe('ready-to-recoat')
  })
})

describe('times and strips', () => {
  it('say likely and give it till, no finer than the doubt', () => {
    expect(timesText({ likelyAt: now + 62 * minute, p90At: now + 93 * minute, reachedAt: null, reason: null }, clock)).toBe('likely 11:05, give it till 11:35')
    expect(timesText({ likelyAt: null, p90At: null, reachedAt: null, reason: 'too-damp' }, clock)).toBe('too damp to promise')
    const after = { milestone: 'dry-to-handle' as const, likelyAt: now + 80 * minute, p90At: now + 115 * minute, reachedAt: null, reason: null }
    expect(effectText(after, { ...after, likelyAt: now + hour, p90At: now + 95 * minute }, clock)).toBe('Dry to handle: likely 11:20, give it till 11:55. It was likely 11:00, give it till 11:35.')
    expect(effectText(after, after, clock)).toBe('Dry to handle: likely 11:20, give it till 11:55.')
  })

  it('draw the film that keeps hands waiting longest', () => {
    const slow = film(now + 3 * hour, { coatId: 2 })
    expect(worstFilm([film(now + hour), slow], 'ready-to-recoat')).toBe(slow)
    const strip = filmStrip(slow, 'ready-to-recoat', turn(1, now + 3 * hour), now, 'UTC')
    expect(strip.milestones).toEqual([{ label: 'ready to recoat', likelyAt: now + 3 * hour, giveTillAt: now + 3.5 * hour }])
    expect(strip.fromAt).toBeLessThan(now)
    expect(strip.toAt).toBeGreaterThan(now + 3.5 * hour)
  })
})

describe('the last moment of a job', () => {
  it('is told for all and for as many as can still be done', () => {
    const plan = planAt(now + 10 * minute, { sessionSize: 3, lastStartAt: now + 20 * minute, firstFew: 1, lastStartFewAt: now + 50 * minute })
    const [job] = jobs([1, 2, 3].map(id => piece(id, [turn(id, now - hour, { plan })])))
    expect(job && jobMoment(job, null, clock)).toBe('Start by 10:20 to do all 3, by 10:50 for one of them.')
  })

  it('names the first window as the first where the others shut later', () => {
    const shutting = (id: number, till: number) => {
      const plan = planAt(now + 10 * minute, { sessionSize: 2, lastStartAt: now + 20 * minute })
      const waits = [{ step: 'First varnish', status: 'resting' as const, milestone: 'ready-to-recoat' as const, risk: 'p90' as const, windowed: true, films: [{ moment: rung(now - hour), windows: [{ opensAt: now - hour, shutsAt: till, fromStart: false }], hold: null }] }]
      return piece(id, [turn(id, now - hour, { plan, waits })])
    }
    const said = (tills: number[]) => jobs(tills.map((till, i) => shutting(i + 1, till))).map(job => jobMoment(job, null, clock))
    expect(said([now + 50 * minute, now + 80 * minute])).toEqual(['Start by 10:20 to do both; the first window shuts at 10:50.'])
    expect(said([now + 50 * minute, now + 50 * minute])).toEqual(['Start by 10:20 to do both; the window shuts at 10:50.'])
  })
})
