import { costOf } from '#shared/planning/objective'
import { none } from './model'
import type { Model } from './model'

/** Passes over the lags; each pass only raises the bound, so stopping early is allowed. */
const mostPasses = 60

/** No activity ends earlier: longest paths over releases and shortest lags, nothing booked. */
function earliestEnds(model: Model): Int32Array {
  const end = Int32Array.from(model.minutes, (minutes, i) => model.isFixed[i] ? model.fixedEnd[i]! : model.earliest[i]! + minutes)
  for (let pass = 0, grew = true; grew && pass < mostPasses; pass++) {
    grew = false
    for (const { from, to, waits } of model.lags) {
      if (model.isFixed[to]) continue
      const least = (from === none ? 0 : end[from]!) + waits[0]! + model.minutes[to]!
      if (least > end[to]!) [end[to], grew] = [least, true]
    }
  }
  return end
}

/** Minutes of work on the busiest resource, were it never closed. */
function busiest(model: Model): number {
  return model.problem.resources.reduce((most, resource) => {
    const capacity = Math.max(resource.capacity, ...resource.changes.map(change => change.capacity))
    const work = model.problem.activities.reduce((sum, activity, i) => sum + (model.isFixed[i] || model.family[i] !== none ? 0 : activity.minutes * (activity.uses[resource.id] ?? 0)), 0)
    return Math.max(most, capacity > 0 ? Math.ceil(work / capacity) : 0)
  }, 0)
}

/** A cost that no plan with every activity in it goes below. */
export function lowerBound(model: Model): number {
  const { problem } = model
  const end = earliestEnds(model)
  let lateness = 0
  for (const job of problem.jobs) {
    const last = job.activities.reduce((latest, id) => Math.max(latest, end[model.index.get(id)!]!), -Infinity)
    if (job.due !== null && last > job.due) lateness += job.weight * (last - job.due)
  }
  const setup = problem.families.reduce((sum, family) => {
    const members = family.members.filter(id => !model.isFixed[model.index.get(id)!]).length
    return sum + Math.ceil(members / (family.maxMembers ?? Math.max(1, members))) * (family.setup + family.cleanup)
  }, 0)
  const makespan = end.reduce((latest, minute) => Math.max(latest, minute), busiest(model))
  return costOf(problem, { windowsMissed: 0, lateness, setup, waiting: 0, moves: 0, makespan })
}
