import type { PlanFacts } from '~~/server/planning/facts'
import { grouped } from '#shared/grouped'
import type { MilestoneName } from '#shared/terms'

type Film = PlanFacts['films'][number]
type Rung = PlanFacts['rungs'][number] & { name: MilestoneName }

/** What is looked up again and again in the facts of a plan, by its key: going through all of them for each step would take longer than the plan. */
export interface FactIndex {
  links: ReadonlyMap<number, PlanFacts['links']>
  /** The newest live film of a step. */
  film: ReadonlyMap<number, Film>
  rungs: (coatId: number) => readonly Rung[]
  windows: (coatId: number) => PlanFacts['windows']
  recoveries: ReadonlyMap<number, PlanFacts['recoveries'][number]>
}

/** Rows in the order they came; of recoveries the first of each edition that has one. */
export function indexOf(facts: PlanFacts): FactIndex {
  const rungs = grouped(facts.rungs.map(rung => ({ ...rung, name: rung.milestone })), rung => rung.coatId)
  const windows = grouped(facts.windows, window => window.coatId)
  const recoveries = [...facts.recoveries].reverse().filter(each => each.name !== null)
  return {
    links: grouped(facts.links, link => link.toStepId),
    film: new Map(facts.films.map(film => [film.stepId, film])),
    rungs: coatId => rungs.get(coatId) ?? [],
    windows: coatId => windows.get(coatId) ?? [],
    recoveries: new Map(recoveries.map(each => [each.versionId, each])),
  }
}
