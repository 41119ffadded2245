import { describe, expect, it } from 'vitest'
import { windowAt } from '#shared/drying/window'
import { filmProgress, reachedChance } from '#shared/drying/progress'
import { whatWasSaid } from '#shared/drying/tests-said'
import { materialWith, rung } from '../../helpers/drying'

describe('the sheet\'s own recoat rule', () => {
  const ladder = [rung('set-to-touch', 'solvent', 5, 10, 20), rung('ready-to-recoat', 'solvent', 60, 90, 120)]

  it('without windows opens past ready-to-recoat', () => {
    expect(windowAt(materialWith({ milestones: ladder }), 89)).toEqual({ kind: 'not yet', opensAfter: 90 })
    expect(windowAt(materialWith({ milestones: ladder }), 90)).toEqual({ kind: 'open', window: null })
  })

  it('a window that starts at 0 asks for no rung, a later one does', () => {
    const material = materialWith({ milestones: ladder, windows: [[0, 20], [60, 240]] })
    expect(windowAt(material, 0)).toEqual({ kind: 'open', window: 0 })
    expect(windowAt(material, 21)).toEqual({ kind: 'not yet', opensAfter: 90 })
    expect(windowAt(material, 70)).toEqual({ kind: 'not yet', opensAfter: 90 })
    expect(windowAt(material, 240)).toEqual({ kind: 'open', window: 1 })
    expect(windowAt(material, 241)).toEqual({ kind: 'missed' })
  })

  it('an open end never shuts, and NaN is refused', () => {
    expect(windowAt(materialWith({ milestones: ladder, windows: [[null, null]] }), 1e6)).toEqual({ kind: 'open', window: 0 })
    expect(() => windowAt(materialWith(), Number.NaN)).toThrow(/minutes/)
  })
})

describe('how far a film has come', () => {
  const ladder = [{ likelyAt: 100 }, { likelyAt: 300 }, { likelyAt: 300 }, { likelyAt: 1100 }]

  it('goes from 0 to 1 by equal shares, straight between likely times, and never back', () => {
    expect([0, 50, 100, 200, 300, 700, 1100, 5000].map(at => filmProgress(ladder, 0, at))).toEqual([0, 0.125, 0.25, 0.375, 0.75, 0.875, 1, 1])
    let last = -1
    for (let at = -50; at < 1200; at += 7) {
      const share = filmProgress(ladder, 0, at)
      expect(share).toBeGreaterThanOrEqual(last)
      last = share
    }
  })

  it('stays before a rung nobody can place', () => {
    expect(filmProgress([{ likelyAt: 100 }, { likelyAt: null }], 0, 1e9)).toBe(0.5)
    expect(filmProgress([], 0, 10)).toBe(0)
  })

  it('the chance meets the three times and leaves the last 2 % to a hand', () => {
    const times = { likelyAt: 100, p90At: 200, p98At: 400, reachedAt: null }
    expect([0, 50, 100, 200, 400, 1e6].map(at => reachedChance(times, 0, at))).toEqual([0, 0.25, 0.5, 0.9, 0.98, 0.98])
    expect(reachedChance({ ...times, p90At: null, p98At: null }, 0, 1e6)).toBe(0.5)
    expect(reachedChance({ ...times, p98At: null }, 0, 1e6)).toBe(0.9)
    expect(reachedChance({ likelyAt: null, p90At: null, p98At: null, reachedAt: null }, 0, 10)).toBeNull()
    expect([40, 60].map(at => reachedChance({ ...times, reachedAt: 50 }, 0, at))).toEqual([0, 1])
  })
})

describe('what tests say of a ladder', () => {
  const names = ['a', 'b', 'c']

  it('reached runs down, not yet runs up', () => {
    expect(whatWasSaid(names, [{ at: 5, milestone: 'b', reached: true }])).toEqual([{ reachedAt: 5, notYetAt: null }, { reachedAt: 5, notYetAt: null }, { reachedAt: null, notYetAt: null }])
    expect(whatWasSaid(names, [{ at: 5, milestone: 'b', reached: false }])).toEqual([{ reachedAt: null, notYetAt: null }, { reachedAt: null, notYetAt: 5 }, { reachedAt: null, notYetAt: 5 }])
  })

  it('keeps the first word of reached, reads in order of time, and passes over what the ladder does not have', () => {
    const said = whatWasSaid(names, [{ at: 9, milestone: 'c', reached: true }, { at: 5, milestone: 'b', reached: true }, { at: 1, milestone: 'z', reached: false }])
    expect(said.map(s => s.reachedAt)).toEqual([5, 5, 9])
  })
})
