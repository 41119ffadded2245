import { describe, expect, it } from 'vitest'
import { prepareMaterial } from '#shared/drying/material'
import { predictCoat } from '#shared/drying/predict'
import { dryingTools } from '#shared/drying/tools'
import { findLibraryMaterial } from '#shared/library/index'
import { dryingMaterial } from '#shared/library/types'
import { reckonSchedule } from '#shared/schedules/reckon'
import { changeStep } from '#shared/schedules/edit'
import { wayOf } from '#shared/schedules/way'
import { clock, films, libraryOne, now, on, panelWith, sheets } from './drafts'

const reckon = (draft: Parameters<typeof reckonSchedule>[0]) => reckonSchedule(draft, sheets, films)
const gesso = findLibraryMaterial('acrylic-gesso')!
const predicted = predictCoat(prepareMaterial(dryingMaterial(gesso), dryingTools()), { appliedAt: now, size: 'normal', ground: 'primed' }, [{ clock, fromAt: now, toAt: null }], { now })
const minutes = (name: string, at: 'likelyAt' | 'p90At') => Math.ceil(((predicted.milestones.find(rung => rung.name === name)?.[at] ?? NaN) - now) / 60_000)
const draft = panelWith({ key: 'a', kind: 'coat', with: 'acrylic-gesso', targets: on('panel'), setupMin: 5, pieceMin: 8, cleanMin: 5 }, { key: 's', kind: 'light sanding', targets: on('panel'), setupMin: 5, pieceMin: 6, cleanMin: 5 })

describe('a draft reckoned', () => {
  it('waits as the drying model says of its film, likely and till', () => {
    const { links, elapsed } = reckon(draft)
    expect(links[0]?.wait).toEqual({ likelyMin: minutes('dry-to-sand-lightly', 'likelyAt'), giveTillMin: minutes('dry-to-sand-lightly', 'p90At'), promised: true })
    // 18 min of coating, the wait, 16 min of sanding; the film is dry to handle before that.
    expect(elapsed.likelyMin).toBe(18 + minutes('dry-to-sand-lightly', 'likelyAt') + 16)
    expect(elapsed.giveTillMin).toBe(18 + minutes('dry-to-sand-lightly', 'p90At') + 16)
  })

  it('counts hands: set-up and cleaning once a going, minutes for each piece, checks and taking out', () => {
    const round = changeStep(draft, 'a', { perDay: 2, days: 3, checks: [{ name: 'Look', afterMin: 10, minutes: 2 }] }, sheets)
    // Six coats of 5 + 5 and 8, sanding 5 + 5 and 6, one look of 2.
    expect(reckon(round)).toMatchObject({ setupMin: 6 * 10 + 10, pieceMin: 6 * 8 + 6 + 2 })
  })

  it('leaves a step of a material that is not there without a film', () => {
    expect(reckon(changeStep(draft, 'a', { materialId: 9999 }, sheets)).links[0]).toMatchObject({ wait: null })
  })
})

describe('the longest way through', () => {
  it('names the steps and waits that the elapsed time is made of, and adds up to it', () => {
    for (const key of ['cased-book', 'made-over-cover', 'french-polished-panel', 'laminated-boards']) {
      const reckoned = reckon(libraryOne(key))
      const way = wayOf(reckoned, 'likely')
      const sum = way.reduce((total, leg) => total + leg.waitMin + leg.workMin, 0)
      expect(sum, key).toBe(reckoned.elapsed.likelyMin)
      expect(way.length, key).toBeGreaterThan(2)
    }
  })
  it('of two steps is both', () => {
    const way = wayOf(reckon(draft), 'likely')
    expect(way).toEqual([
      { key: 'a', waitMin: 0, workMin: 18, because: null },
      { key: 's', waitMin: minutes('dry-to-sand-lightly', 'likelyAt'), workMin: 16, because: { code: 'milestone', from: 'a', milestone: 'dry-to-sand-lightly' } },
    ])
  })
})
