import { ft06, jobShopProblem, la21 } from '../solve/classics'
import { judged } from './clock'
import { percent } from './row'
import type { Row } from './row'

/** The classic job shops kept here: the search is made for projects, so there is no bar. */
export function benchClassics(told: (row: Row) => void): void {
  for (const shop of [ft06, la21]) {
    const { makespan } = judged(jobShopProblem(shop), { seconds: 1 }).objective
    told({ measure: `job shop ${shop.name}, 1 s`, bar: '', aim: `${shop.optimum} (optimum)`, measured: `${makespan}, ${percent(makespan / shop.optimum - 1)} over`, met: null })
  }
}
