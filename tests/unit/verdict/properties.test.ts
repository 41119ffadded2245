import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { groupVerdict, pieceVerdict } from '#shared/verdict/verdict'
import { verdictKinds } from '#shared/verdict/types'
import type { Film, Moment, PartFacts, Verdict } from '#shared/verdict/types'
import { hour, minute } from './facts'

const rank = (verdict: Verdict) => verdictKinds.indexOf(verdict.kind)
const instant = fc.integer({ min: 0, max: 40 * 60 }).map(minutes => hour(0) + minutes * minute)
const reason = fc.constantFrom('below-minimum', 'too-damp', 'never', 'outside-sheet')

/** Mostly null, so that films and grips get to speak. */
const rarely = <T>(value: fc.Arbitrary<T>) => fc.oneof({ weight: 15, arbitrary: fc.constant(null) }, { weight: 1, arbitrary: value })

/** Rungs of a film rise, and a rung without a promise has none after it: the clock takes running maxima. */
const ladder = fc.record({
  from: fc.integer({ min: 0, max: 20 * 60 }).map(minutes => hour(0) + minutes * minute), steps: fc.array(fc.integer({ min: 1, max: 400 }), { minLength: 5, maxLength: 5 }), doubt: fc.integer({ min: 0, max: 300 }),
  lostFrom: fc.integer({ min: 0, max: 8 }), lostLikely: fc.boolean(), why: reason, reachedUpTo: fc.integer({ min: -8, max: 4 }), reachedAt: instant,
}).map(({ from, steps, doubt, lostFrom, lostLikely, why, reachedUpTo, reachedAt }) => {
  let at = from
  return steps.map((step, index): Moment => {
    at += step * minute
    const reached = index <= reachedUpTo ? reachedAt : null
    if (index >= lostFrom) return { likelyAt: lostLikely ? null : at, p90At: null, p98At: null, reachedAt: reached, reason: why }
    return { likelyAt: at, p90At: at + doubt * minute / 2, p98At: at + doubt * minute, reachedAt: reached, reason: null }
  })
})

const aFilm = (coatId: number): fc.Arbitrary<Film> => fc.record({
  rungs: ladder, kind: fc.constantFrom('coat', 'glue-up', 'size'), material: fc.constantFrom('a paint', 'a paint', 'a paint', null),
  bare: fc.boolean(), mustLieLevel: fc.boolean(), gloves: fc.boolean(), hold: fc.constantFrom(null, null, null, 'clamps'),
  doubt: rarely(fc.record({ cause: fc.constantFrom('chilled' as const, 'failed' as const, 'unknown' as const), fromAt: instant })),
}).map(({ rungs: [touch = null, tackFree = null, handle = null, hard = null, cured = null], bare, ...film }) => ({
  ...film, coatId, touch: bare ? null : touch, tackFree: bare ? null : tackFree, handle, hard, cured, strength: cured,
}))

const aPart = (partId: number): fc.Arbitrary<PartFacts> => fc.record({
  films: fc.tuple(aFilm(partId * 10), aFilm(partId * 10 + 1), fc.integer({ min: 0, max: 2 })).map(([a, b, count]) => [a, b].slice(0, count)),
  grip: fc.option(fc.subarray([10, 11, 20, 21]).map(films => ({ name: `grip ${partId}`, films }))),
  doing: rarely(fc.constant({ by: 'Ada', what: 'Varnish', since: hour(1) })),
  due: rarely(instant.map(at => ({ at, what: 'Varnish' }))),
  missing: rarely(fc.constant({ where: 'Shelf B', seenAt: hour(1) })),
  intake: rarely(fc.constant('lead' as const)), keepOut: rarely(fc.constant({ room: 'Spray room' })),
}).map(facts => ({ ...facts, partId, name: `part ${partId}`, place: { room: 'Bench room', place: 'Shelf A' } }))

const aPiece = fc.tuple(aPart(1), aPart(2), fc.boolean()).map(([one, two, both]) => both ? [one, two] : [one])
const many = { numRuns: 2000 }

describe('properties of the verdict', () => {
  it('a coat added never improves', () => {
    fc.assert(fc.property(aPiece, aFilm(99), instant, (parts, coat, now) => {
      const more = parts.map((part, index) => index === 0 ? { ...part, films: [...part.films, coat] } : part)
      expect(rank(pieceVerdict(more, now, null))).toBeLessThanOrEqual(rank(pieceVerdict(parts, now, null)))
    }), many)
  })

  it('a doubt added never improves', () => {
    fc.assert(fc.property(aPiece, fc.constantFrom('chilled' as const, 'failed' as const, 'unknown' as const), instant, (parts, cause, now) => {
      const more = parts.map(part => ({ ...part, films: part.films.map(film => ({ ...film, doubt: film.doubt ?? { cause, fromAt: hour(1) } })) }))
      expect(rank(pieceVerdict(more, now, null))).toBeLessThanOrEqual(rank(pieceVerdict(parts, now, null)))
    }), many)
  })

  it('a "not yet" never improves: it undoes a reached and moves the rung past now', () => {
    fc.assert(fc.property(aPiece, instant, fc.integer({ min: 1, max: 600 }), (parts, now, minutes) => {
      const later = (moment: Moment | null): Moment | null => {
        if (moment === null) return null
        const move = (at: number | null) => at === null ? null : Math.max(at, now) + minutes * minute
        return { ...moment, reachedAt: null, likelyAt: move(moment.likelyAt), p90At: move(moment.p90At), p98At: move(moment.p98At) }
      }
      const notYet = parts.map(part => ({ ...part, films: part.films.map(film => ({ ...film, touch: later(film.touch), tackFree: later(film.tackFree), handle: later(film.handle) })) }))
      expect(rank(pieceVerdict(notYet, now, null))).toBeLessThanOrEqual(rank(pieceVerdict(parts, now, null)))
    }), many)
  })

  it('silence never improves, and the longer the worse', () => {
    fc.assert(fc.property(aPiece, instant, fc.nat(900), fc.nat(900), (parts, now, silent, longer) => {
      const some = pieceVerdict(parts, now, now - silent * minute)
      expect(rank(some)).toBeLessThanOrEqual(rank(pieceVerdict(parts, now, null)))
      expect(rank(pieceVerdict(parts, now, now - (silent + longer) * minute))).toBeLessThanOrEqual(rank(some))
    }), many)
  })

  it('time alone worsens only through a due coat or a cut-off', () => {
    fc.assert(fc.property(aPiece, instant, fc.nat(1500), fc.option(fc.nat(20)), (parts, now, minutes, silent) => {
      const heardAt = silent === null ? null : now - silent * minute
      const before = pieceVerdict(parts, now, heardAt)
      const after = pieceVerdict(parts, now + minutes * minute, heardAt)
      if (rank(after) < rank(before)) expect([0, 9]).toContain(after.line)
    }), many)
  })

  it('betterAt is true: no better just before it, better at it, and to what it says', () => {
    fc.assert(fc.property(aPiece, instant, (parts, now) => {
      const verdict = pieceVerdict(parts, now, null)
      if (verdict.betterAt === null) {
        expect(rank(pieceVerdict(parts, now + 100_000 * minute, null))).toBeLessThanOrEqual(rank(verdict))
        return
      }
      const then = pieceVerdict(parts, verdict.betterAt, null)
      expect(rank(pieceVerdict(parts, verdict.betterAt - 1, null))).toBeLessThanOrEqual(rank(verdict))
      expect(rank(then)).toBeGreaterThan(rank(verdict))
      expect({ kind: then.kind, grip: then.grip }).toEqual({ kind: verdict.betterKind, grip: verdict.betterGrip })
    }), many)
  })

  it('a group is as bad as its worst piece, and at its next moment at least what it says', () => {
    fc.assert(fc.property(fc.array(aPiece, { minLength: 1, maxLength: 4 }), instant, (pieces, now) => {
      const judged = pieces.map(parts => pieceVerdict(parts.map(part => ({ ...part, due: null })), now, null))
      const group = groupVerdict(judged)
      expect(group && rank(group)).toBe(Math.min(...judged.map(rank)))
      if (group === null || group.betterAt === null || group.betterKind === null) return
      const { betterAt, betterKind } = group
      const then = pieces.map(parts => pieceVerdict(parts.map(part => ({ ...part, due: null })), betterAt, null))
      expect(Math.min(...then.map(rank))).toBeGreaterThanOrEqual(verdictKinds.indexOf(betterKind))
    }), many)
  })
})
