import type { DryingMaterial } from '#shared/drying/types'
import type { DryingTools } from '#shared/drying/tools'
import type { PreparedMaterial } from '#shared/drying/material'
import { clockVariance } from '#shared/drying/bench-tests'
import { learnBench } from '#shared/drying/learn'
import { prepareMaterial, withLearned } from '#shared/drying/material'
import type { Visit } from './benches'

/** A way of learning from visits: gives the material made ready for the next coat. `sheet` is the material made ready without them. */
export interface Learner { name: string, says: string, learn(sheet: PreparedMaterial, visits: readonly Visit[], now: number): PreparedMaterial }

/** Baseline: nothing is learned. */
export const sheetAlone: Learner = { name: 'sheet', says: 'the sheet alone', learn: sheet => sheet }

/** Factor of the other baseline: the mean of what a first "reached" said over the sheet's typical. 1 without any. */
export function meanReached(sheet: PreparedMaterial, visits: readonly Visit[]): number {
  const ratios = visits.filter(v => v.reached).map(v => v.minutes / sheet.rungs[v.rung]!.typical)
  return ratios.length > 0 ? ratios.reduce((sum, r) => sum + r, 0) / ratios.length : 1
}

/** What the product does. */
const bench: Learner = {
  name: 'bench', says: 'the bench\'s own tests',
  learn: (sheet, visits) => {
    const inOrder = [...visits].sort((a, b) => a.at - b.at)
    const tests = inOrder.map(({ coat, rung, minutes, reached }) => ({ coat, rung, log: Math.log(minutes / sheet.rungs[rung]!.typical), reached, weight: 1, extra: clockVariance }))
    const speed = learnBench(sheet.rungs.map(r => r.quantiles), tests)
    return speed.kind === 'learned' ? withLearned(sheet, speed) : sheet
  },
}

export const learners: Record<string, Learner> = { sheet: sheetAlone, bench }

export function readied(material: DryingMaterial, tools: DryingTools): PreparedMaterial {
  return prepareMaterial(material, tools)
}
