import fc from 'fast-check'
import { planProblem } from '#shared/planning/problem'
import type { PlanInput } from '#shared/planning/problem'
import type { Interval, PlanProblem, Uses } from '#shared/planning/types'

/** Nine to five for so many days, minute 0 at midnight. */
export const weekdays = (days: number): Interval[] => Array.from({ length: days }, (_, day) => [day * 1440 + 540, day * 1440 + 1020] as const)

const minutes = fc.integer({ min: 0, max: 90 })

interface Drawn {
  pieces: { steps: { minutes: number, kind: number, min: number, length: number | null, soft: boolean, rests: boolean, dusty: boolean }[], due: number, weight: number, release: number }[]
  hands: number
  shelf: number
  setup: number
  together: boolean
  maxMembers: number | null
  fixed: (number | null)[]
  standing: boolean
  join: boolean
  twins: number
}

const step = fc.record({
  minutes, kind: fc.integer({ min: 0, max: 4 }), min: fc.integer({ min: 0, max: 1500 }), length: fc.option(fc.integer({ min: 0, max: 900 })),
  soft: fc.boolean(), rests: fc.boolean(), dusty: fc.boolean(),
})

const anyDrawn: fc.Arbitrary<Drawn> = fc.record({
  pieces: fc.array(fc.record({
    steps: fc.array(step, { minLength: 1, maxLength: 4 }), due: fc.integer({ min: 0, max: 6000 }), weight: fc.integer({ min: 0, max: 5 }), release: fc.integer({ min: 0, max: 2000 }),
  }), { minLength: 1, maxLength: 4 }),
  hands: fc.integer({ min: 1, max: 3 }), shelf: fc.integer({ min: 1, max: 4 }), setup: fc.integer({ min: 0, max: 30 }), together: fc.boolean(),
  maxMembers: fc.option(fc.integer({ min: 1, max: 3 })), fixed: fc.array(fc.option(fc.integer({ min: -200, max: 4000 })), { maxLength: 5 }), standing: fc.boolean(), join: fc.boolean(), twins: fc.integer({ min: 1, max: 3 }),
})

const none: Uses = {}
const people = ['ada', 'bo', 'cy']

/** Kinds: 0 pooled hands, 1 any of the people, 2 a family of row or together, 3 may pause overnight, 4 may run over. */
function inputOf(drawn: Drawn): PlanInput {
  const drawing = { ...drawn, pieces: drawn.pieces.flatMap(piece => Array.from({ length: drawn.twins }, () => piece)) }
  const id = (p: number, s: number) => `p${p}.${s}`
  const steps = drawing.pieces.flatMap((piece, p) => piece.steps.map((item, s) => ({ ...item, id: id(p, s), p, s })))
  const links = steps.filter(item => item.s > 0).map(item => ({ ...item, from: id(item.p, item.s - 1) }))
  const assembly = drawing.join && drawing.pieces.length > 1 ? [{ from: id(1, drawing.pieces[1]!.steps.length - 1), to: id(0, drawing.pieces[0]!.steps.length - 1), min: 10 }] : []
  return {
    resources: [
      { id: 'hands', capacity: drawing.hands, open: weekdays(12), changes: [{ from: 2000, to: 3000, capacity: 1 }] },
      ...people.map((person, i) => ({ id: person, capacity: 1, open: weekdays(12).filter((_, day) => day % 3 !== i) })),
      { id: 'shelf', capacity: drawing.shelf },
    ],
    activities: steps.map(item => ({
      id: item.id, minutes: item.minutes, splittable: item.kind === 3, mayRunOver: item.kind === 4, uses: item.kind === 1 || item.kind === 2 ? none : { hands: 1 },
      choices: item.kind === 1 || item.kind === 2 ? [{ of: people, count: 1 }] : [],
    })),
    lags: [
      ...links.map(item => ({ from: item.from, to: item.id, min: item.min, max: item.length === null ? null : item.min + item.length, recovery: item.soft ? { penalty: 1, minutes: 15 } : null })),
      ...assembly,
    ],
    rests: [
      ...links.filter(item => item.rests).map(item => ({ from: item.from, to: item.id, uses: { shelf: 1 } })),
      ...(drawing.standing ? [{ from: null, to: id(0, 0), uses: { shelf: 2 } }] : []),
    ],
    families: [{ id: 'coat', setup: drawing.setup, cleanup: 5, mode: drawing.together ? 'together' : 'row', maxMembers: drawing.maxMembers, members: steps.filter(item => item.kind === 2).map(item => item.id) }],
    apart: [{ id: 'room', one: steps.filter(item => item.dusty && item.kind === 0).map(item => ({ activity: item.id, after: 30 })), other: steps.filter(item => item.kind === 2).map(item => ({ activity: item.id, after: 120 })) }],
    jobs: drawn.pieces.map((piece, j) => ({
      id: `job ${j}`, due: piece.due, weight: piece.weight, release: piece.release,
      activities: Array.from({ length: drawn.twins }, (_, t) => piece.steps.map((_, s) => id(j * drawn.twins + t, s))).flat(),
    })),
    fixed: drawing.fixed.flatMap((start, p) => start !== null && p < drawing.pieces.length ? [{ activity: id(p, 0), start }] : []),
    horizon: 12 * 1440,
  }
}

/** Small problems with every rule in them. */
export const anyInput: fc.Arbitrary<PlanInput> = anyDrawn.map(inputOf)
export const anyProblem: fc.Arbitrary<PlanProblem> = anyInput.map(planProblem)
