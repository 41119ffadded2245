import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { check } from '#shared/planning/check'
import { readProgen } from '~~/scripts/solve/read-progen'
import { isProblemFile, readProblem } from '~~/scripts/solve/read-problem'
import { readPsplib } from '~~/scripts/solve/read-psplib'
import { lineOf, solveWithin } from '~~/scripts/solve/solve-file'

/** Two real activities of 4 and 3 periods that each need 2 of 3 units: one after the other, 7 in all. */
const project = `************
PRECEDENCE RELATIONS:
jobnr.    #modes  #successors   successors
   1        1          2           2   3
   2        1          1           4
   3        1          1           4
   4        1          0
************
REQUESTS/DURATIONS:
jobnr. mode duration  R 1
------------------------------------------------------------------------
  1      1     0       0
  2      1     4       2
  3      1     3       2
  4      1     0       0
************
RESOURCEAVAILABILITIES:
  R 1
    3
************`

/** Activity 2 starts 2 to 5 after activity 1 does; both need the one unit, 3 and 2 periods: 1 at 0-3, 2 at 3-5. With a longest gap of 2 there is no plan. */
const waits = (longest: number) => `2 1 0 0
0 1 1 1 [0]
1 1 2 2 3 [2] [3]
2 1 2 1 3 [-${longest}] [2]
3 1 0
0 1 0 0
1 1 3 1
2 1 2 1
3 1 0 0
1`

const limits = { seconds: null, schedules: 200, seed: 1 }

describe('published forms', () => {
  it('reads a project and plans it', () => {
    const problem = readPsplib(project)
    expect(problem.activities.map(activity => activity.minutes)).toEqual([0, 4, 3, 0])
    const plan = solveWithin(problem, limits)
    expect(check(problem, plan)).toEqual([])
    // 4 x 2 + 3 x 2 = 14 unit minutes in 3 units ask for 5 only; but 2 + 2 is more than 3, so 4 + 3 = 7.
    expect(plan.objective.makespan).toBe(7)
  })

  it('reads longest waits and keeps them', () => {
    const problem = readProgen(waits(5))
    const line = JSON.parse(lineOf('a.sch', problem, solveWithin(problem, limits))) as object
    expect(line).toMatchObject({ file: 'a.sch', status: 'optimal', makespan: 5, starts: [0, 0, 3, 5], bound: 5 })
  })

  it('says for certain when there is no plan', () => {
    const problem = readProgen(waits(2))
    expect(JSON.parse(lineOf('a.sch', problem, solveWithin(problem, limits)))).toMatchObject({ status: 'infeasible', starts: null, makespan: null })
  })

  it('names the line that cannot be read', () => {
    expect(() => readPsplib(project.replace('2           2   3', '3           2   3'))).toThrow('line 4: expected 3 followers, got 2')
    expect(() => readPsplib('nothing')).toThrow('PRECEDENCE RELATIONS')
    expect(() => readProgen(waits(5).replace('[0]', '[x]'))).toThrow('line 2: expected a gap in brackets')
  })
})

describe('files', () => {
  let folder = ''
  beforeAll(() => { folder = mkdtempSync(join(tmpdir(), 'solve-')) })
  afterAll(() => rmSync(folder, { recursive: true }))

  it('gives starts of our own form by id, with the objective', () => {
    const file = join(folder, 'week.json')
    writeFileSync(file, JSON.stringify({ activities: [{ id: 'a', minutes: 30, uses: { hands: 1 } }], resources: [{ id: 'hands', capacity: 1, open: [[60, 120]] }], jobs: [{ id: 'j', activities: ['a'], release: 0, due: 80, weight: 2 }] }))
    const problem = readProblem(file)
    // Hands come at 60: done at 90, ten minutes late at weight 2.
    expect(JSON.parse(lineOf('week.json', problem, solveWithin(problem, limits)))).toMatchObject({ starts: { a: 60 }, makespan: 90, objective: { lateness: 20 } })
  })

  it('refuses others with one line', () => {
    writeFileSync(join(folder, 'bad.json'), '{')
    expect(isProblemFile('a.txt')).toBe(false)
    expect(() => readProblem('a.txt')).toThrow('a.txt: expected a file ending in .sm, .sch, .json')
    expect(() => readProblem(join(folder, 'absent.sm'))).toThrow('absent.sm: expected a file that can be read')
    expect(() => readProblem(join(folder, 'bad.json'))).toThrow('bad.json: expected JSON')
  })
})
