import type { Facts, Violation } from '#shared/planning/checkFacts'
import type { Resource } from '#shared/planning/types'

interface Hold { from: number, to: number, amount: number, activity: string, forced: boolean }

function holdsOf(facts: Facts): Map<string, Hold[]> {
  const holds = new Map<string, Hold[]>()
  const add = (id: string, hold: Hold) => {
    if (hold.to <= hold.from) return
    const known = holds.get(id)
    if (known) known.push(hold)
    else holds.set(id, [hold])
  }
  for (const span of facts.spans) {
    for (const [id, amount] of Object.entries(span.uses)) add(id, { from: span.start, to: span.end, amount, activity: span.activity, forced: span.fixed })
  }
  for (const rest of facts.problem.rests) {
    const from = rest.from === null ? 0 : facts.entries.get(rest.from)?.end
    if (from === undefined) continue
    const to = rest.to === null ? facts.problem.horizon : facts.entries.get(rest.to)?.start ?? facts.problem.horizon
    const forced = rest.from === null || facts.fixed.has(rest.from)
    for (const [id, amount] of Object.entries(rest.uses)) add(id, { from, to, amount, activity: rest.from ?? rest.to ?? '', forced })
  }
  return holds
}

/** What stood there before the plan began counts as fitting. */
function standing(facts: Facts, resource: Resource): number {
  let sum = 0
  for (const rest of facts.problem.rests) if (rest.from === null) sum += rest.uses[resource.id] ?? 0
  return sum
}

/** Every minute in which more is held than there is, unless by fixed work alone. */
export function capacityViolations(facts: Facts): Violation[] {
  const found: Violation[] = []
  const held = holdsOf(facts)
  for (const resource of facts.problem.resources) {
    const holds = held.get(resource.id) ?? []
    const floor = standing(facts, resource)
    const events = [
      ...holds.flatMap(hold => [{ at: hold.from, hold, sign: 1 }, { at: hold.to, hold, sign: -1 }]),
      ...resource.changes.flatMap(change => [{ at: change.from, hold: null, sign: 0 }, { at: change.to, hold: null, sign: 0 }]),
    ].sort((a, b) => a.at - b.at)
    let used = 0
    let chosen = 0
    events.forEach((event, i) => {
      if (event.hold) used += event.sign * event.hold.amount
      if (event.hold && !event.hold.forced) chosen += event.sign
      if (events[i + 1]?.at === event.at) return
      const changed = resource.changes.find(change => event.at >= change.from && event.at < change.to)
      const capacity = Math.max(floor, changed ? changed.capacity : resource.capacity)
      if (used > capacity && chosen > 0) found.push({ rule: 'capacity', activity: event.hold?.activity ?? '', detail: `${resource.id}: ${used} of ${capacity} at ${event.at}` })
    })
  }
  return found
}
