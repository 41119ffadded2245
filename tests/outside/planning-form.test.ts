import { describe, expect, it } from 'vitest'
import { check } from '#shared/planning/check'
import { fromContract } from '#shared/planning/contract'
import { makePlan } from '#shared/planning/plan'
import { startsOf } from '#shared/planning/types'
import { solve } from '~~/server/planner/solve'

/**
 * A week of our own in the exchanged JSON form, small enough to solve by hand. One pair of hands, there 0-60 and 120-180; one shelf place.
 * frame: sand 20, coat 10 at least 30 after, on the shelf for 100 to 130, then fit 10. box: sand 30, due at 60 at weight 3. box's dust may not fly
 * from the coat's start until 40 after its end.
 *
 * By hand: frame sand 0-20, coat 50-60 at the earliest, which leaves 20-50 for the box: on time, and done when the coat begins. Fit 160-170, inside
 * 120-180. Nothing is late and nothing could be sooner: 20 + 30 + 10 + 100 + 10 = 170.
 */
const week = `{
  "activities": [
    { "id": "frame sand", "minutes": 20, "uses": { "hands": 1 } }, { "id": "frame coat", "minutes": 10, "uses": { "hands": 1 } },
    { "id": "frame fit", "minutes": 10, "uses": { "hands": 1 } }, { "id": "box sand", "minutes": 30, "uses": { "hands": 1 } }
  ],
  "resources": [{ "id": "hands", "capacity": 1, "open": [[0, 60], [120, 180]] }, { "id": "shelf", "capacity": 1, "open": null }],
  "lags": [{ "from": "frame sand", "to": "frame coat", "min": 30, "max": null }, { "from": "frame coat", "to": "frame fit", "min": 100, "max": 130 }],
  "rests": [{ "from": "frame coat", "to": "frame fit", "uses": { "shelf": 1 } }],
  "jobs": [
    { "id": "frame", "activities": ["frame sand", "frame coat", "frame fit"], "release": 0, "due": 170, "weight": 1 },
    { "id": "box", "activities": ["box sand"], "release": 0, "due": 60, "weight": 3 }
  ],
  "still": [{ "dusty": "box sand", "film": "frame coat", "room": "shop", "dustFree": 40 }]
}`

describe('a week in the exchanged form', () => {
  const problem = fromContract(JSON.parse(week))

  it('is solved as by hand', () => {
    const plan = solve(problem, { schedules: 100 })
    expect(check(problem, plan)).toEqual([])
    expect(startsOf(plan)).toEqual({ 'frame sand': 0, 'box sand': 20, 'frame coat': 50, 'frame fit': 160 })
    expect(plan.objective).toMatchObject({ lateness: 0, makespan: 170 })
  })

  it('is judged: dust on the wet coat is seen', () => {
    const at = (activity: string, start: number, end: number) => ({ activity, start, end, resources: [], session: null, afterRecovery: false })
    const entries = [at('frame sand', 0, 20), at('frame coat', 50, 60), at('frame fit', 160, 170), at('box sand', 120, 150)]
    const late = makePlan(problem, { entries, sessions: [], conflicts: [], bound: 0, seed: 0, schedules: 1, elapsed: 0 })
    // The coat is dust-free at 100, so a box sanded from 120 on is legal, only 90 late at weight 3.
    expect(check(problem, late)).toEqual([])
    expect(late.objective.lateness).toBe(270)
    const dusty = makePlan(problem, { ...late, entries: entries.map(entry => entry.activity === 'box sand' ? at('box sand', 25, 55) : entry) })
    expect(check(problem, dusty).map(violation => violation.rule)).toEqual(expect.arrayContaining(['apart', 'capacity']))
  })
})
