import type { PlanFacts } from '~~/server/planning/facts'
import type { StudioProblem } from '~~/server/planning/problem'
import { handsOf } from '~~/server/planning/hands'
import { activityId } from '~~/server/planning/ids'
import { minutesFrom } from '#shared/drying/waits'
import { lastStart } from '#shared/planning/lastStart'
import type { LastStart } from '#shared/planning/lastStart'
import type { Interval, Plan } from '#shared/planning/types'
import { studioZone } from '#shared/time'

const minute = 60_000
/** Hours that lie behind count too, so far back: what was missed today is said to be late. */
const behind = 24 * 60

/** The last moment to begin a session and still do all, and as many as can still be done; minutes from the problem's zero. */
export interface LastStarts { lastStart: number | null, firstFew: number | null, lastStartFew: number | null }

/**
 * Counted back, for each turn whose window after a film that lies already will shut, over all turns of its session: from
 * the early end of the windows by set-up and minutes per piece, inside somebody's hours.
 * @param nowMinute now, counted from the problem's zero
 */
export function lastStartsOf(plan: Plan, given: StudioProblem, facts: PlanFacts, nowMinute: number): Map<string, LastStarts> {
  const shuts = shutsOf(given, facts)
  const works = new Map<string, StudioProblem['works'][number]>(given.works.flatMap(work => work.turns.map(turn => [activityId(turn.id), work] as const)))
  const open = hoursOfAnybody(given, facts, Math.max(0, ...[...shuts.values()].map(each => each.shuts)))
  const groups = new Map<string, string[]>()
  for (const entry of plan.entries) {
    if (!shuts.has(entry.activity)) continue
    const key = entry.session === null ? entry.activity : `s${entry.session}`
    groups.set(key, [...groups.get(key) ?? [], entry.activity])
  }
  const found = new Map<string, LastStarts>()
  for (const members of groups.values()) {
    const step = works.get(members[0] ?? '')?.step
    if (!step) continue
    const windows = members.flatMap(id => shuts.get(id) ?? [])
    const { all, firstFew } = forSome(windows, windows.length, step, nowMinute, open)
    for (const id of members) found.set(id, { lastStart: all, firstFew: firstFew?.count ?? null, lastStartFew: firstFew?.minute ?? null })
  }
  return found
}

/** While all can still be done, a third of them is told too: for those there is longer time. */
const share = 3

/** The last moment for all, and for some of them: as many as can still be done, or a third while all can. Those are the ones whose windows shut last. */
function forSome(windows: readonly LastWindow[], count: number, step: StudioProblem['works'][number]['step'], now: number, open: readonly Interval[]): LastStart {
  const chosen = [...windows].sort((a, b) => b.shuts - a.shuts).slice(0, count)
  const found = lastStart({ shuts: chosen.map(each => each.shuts), opens: chosen.map(each => each.opens), setup: step.setupMin, minutes: step.pieceMin, now, open })
  const few = Math.ceil(count / share)
  if (count < windows.length || found.all === null || found.firstFew !== null || few === count) return found
  const { all } = forSome(windows, few, step, now, open)
  return all !== null && all > found.all ? { all: found.all, firstFew: { count: few, minute: all } } : found
}

/** Minutes from the problem's zero. */
interface LastWindow { opens: number | null, shuts: number }

/** When the window of a waiting turn first opens and shuts for good; only films that lie already have a shutting that is foretold. */
function shutsOf(given: StudioProblem, facts: PlanFacts): Map<string, LastWindow> {
  const found = new Map<string, LastWindow>()
  for (const { step, turns } of given.works) {
    const first = turns.find(turn => turn.kind === 'work' && turn.status === 'waiting')
    if (!first) continue
    const before = facts.links.filter(link => link.toStepId === step.id && link.windowed).map(link => link.fromStepId)
    const froms = step.status === 'resting' ? [step.id] : before
    for (const stepId of froms) {
      const film = facts.films.filter(each => each.stepId === stepId).at(-1)
      const ends = facts.windows.filter(each => each.coatId === film?.coatId)
      const last = ends.reduce<number | null | undefined>((end, each) => (end === null || each.shutsAt === null ? null : Math.max(end ?? -Infinity, each.shutsAt)), undefined)
      if (typeof last !== 'number') continue
      const known = found.get(activityId(first.id))
      // Two films beneath must both be open, and the first to shut shuts for both.
      const opened = [known?.opens ?? null, firstOpening(ends, given.zeroAt)].filter(each => each !== null)
      found.set(activityId(first.id), { opens: opened.length === 0 ? null : Math.max(...opened), shuts: Math.min(known?.shuts ?? Infinity, minutesFrom(given.zeroAt, last, Math.floor)) })
    }
  }
  return found
}

/** When the first of a film's windows opens, minutes from zero; null when one is open from the start. */
function firstOpening(windows: PlanFacts['windows'], zeroAt: number): number | null {
  const opens = windows.map(each => each.opensAt)
  return opens.includes(null) ? null : minutesFrom(zeroAt, Math.min(...opens.filter(each => each !== null)), Math.ceil)
}

/** The union of everybody's hours till `until`: a session needs somebody, not everybody. */
function hoursOfAnybody({ zeroAt }: StudioProblem, facts: PlanFacts, until: number): Interval[] {
  const hands = handsOf(facts, studioZone(facts.owner.zone), zeroAt - behind * minute, zeroAt + until * minute)
  const all = hands.flatMap(each => each.open).map(([from, to]): Interval => [from - behind, to - behind]).sort((a, b) => a[0] - b[0])
  const joined: [number, number][] = []
  for (const [from, to] of all) {
    const last = joined[joined.length - 1]
    if (last && from <= last[1]) last[1] = Math.max(last[1], to)
    else joined.push([from, to])
  }
  return joined
}
