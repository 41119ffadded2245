import type { PlanFacts } from '~~/server/planning/facts'
import { activityId, memberIdOf } from '~~/server/planning/ids'
import type { StepWork } from '~~/server/planning/lags'
import { familyOf } from '~~/server/planning/problem'
import type { StudioProblem } from '~~/server/planning/problem'
import { reservedFor } from '~~/server/planning/reserved'
import type { Reserved } from '~~/server/planning/reserved'
import { keptOut } from '~~/server/planning/vapour'
import type { WaitsToCome } from '~~/server/planning/waits'
import { overlaps } from '#shared/planning/occupied'
import type { Fixed, PlanProblem } from '#shared/planning/types'
import type { Clock } from '#shared/time'
import { pinWords } from '#shared/words/pins'

const minute = 60_000

/** A turn with the time and the hands it is to be given, minutes from the problem's zero. */
export interface Wanted { turnId: number, start: number, end: number, hands: readonly string[] }

/** With the time its hands are taken, set-up and clean-up with it. */
interface Held extends Wanted { from: number, till: number }

export interface PinStudio { facts: PlanFacts, given: StudioProblem, toCome: WaitsToCome, names: ReadonlyMap<number, string>, clock: Clock }

/**
 * The first rule that a wish to pin breaks, as a sentence; null when it breaks none by itself. Asked of the facts alone:
 * hours, films and windows, what comes before, what stands fixed. Whether the rest still finds a plan is for the search.
 * @param wanted in the order of their starts, each of them in the problem and not fixed there
 */
export function pinClash(studio: PinStudio, wanted: readonly Wanted[]): string | null {
  const works = new Map(studio.given.works.flatMap(work => work.turns.map(turn => [turn.id, work] as const)))
  const own = new Set(wanted.map(each => activityId(each.turnId)))
  const others = studio.given.problem.fixed.filter(each => !own.has(each.activity))
  const reserved = reservedFor(studio.given.works, [...others, ...wanted.map(each => ({ activity: activityId(each.turnId), start: each.start, resources: each.hands }))], familyOf)
  for (const given of wanted) {
    const work = works.get(given.turnId)
    if (!work) return pinWords.notPlanned
    const around = reserved.filter(span => span.activity === activityId(given.turnId))
    const each = { ...given, from: Math.max(Math.min(0, given.start), Math.min(given.start, ...around.map(span => span.start))), till: Math.max(given.end, ...around.map(span => span.end)) }
    const clash = hoursClash(studio, each, work) ?? lagClash(studio, each, work, wanted) ?? fixedClash(studio, each, work, { others, reserved }) ?? apartClash(studio, each, work)
    if (clash !== null) return clash
  }
  return null
}

const nameOf = ({ names }: PinStudio, hand: string) => names.get(memberIdOf(hand)) ?? ''
const instant = ({ given }: PinStudio, minutes: number) => given.zeroAt + minutes * minute

function hoursClash(studio: PinStudio, { start, from, till, hands }: Held, { step }: StepWork): string | null {
  const until = step.mayRunOver ? start + 1 : till
  const works = (hand: string) => studio.given.hands.find(each => each.id === hand)?.open.some(([opens, shuts]) => from >= opens && until <= shuts) ?? false
  if (hands.length < step.hands) return pinWords.hours(null, step.name)
  const away = hands.find(hand => !works(hand))
  return away === undefined ? null : pinWords.hours(studio.given.hands.some(each => each.may(step.kind) && works(each.id)) ? nameOf(studio, away) : null, step.name)
}

/** The earliest ends by what must come before alone, hands and places not asked; what is fixed or wished for ends where it does. */
function earliestEnds({ activities, lags, fixed }: PlanProblem, wanted: readonly Wanted[]): Map<string, number> {
  const length = new Map(activities.map(each => [each.id, each.minutes]))
  const set = new Map([...fixed.map(each => [each.activity, each.start + (length.get(each.activity) ?? 0)] as const), ...wanted.map(each => [activityId(each.turnId), each.end] as const)])
  const ends = new Map(activities.map(each => [each.id, set.get(each.id) ?? Math.max(0, each.release) + each.minutes]))
  for (let round = 0, grew = true; grew && round < activities.length; round++) {
    grew = false
    for (const { from, to, windows } of lags) {
      const end = (from === null ? 0 : ends.get(from) ?? 0) + (windows[0]?.[0] ?? 0) + (length.get(to) ?? 0)
      if (set.has(to) || end <= (ends.get(to) ?? 0)) continue
      ends.set(to, end)
      grew = true
    }
  }
  return ends
}

function lagClash(studio: PinStudio, { turnId, start }: Wanted, work: StepWork, wanted: readonly Wanted[]): string | null {
  const { given: { problem, works, hands, zeroAt }, facts, toCome, clock } = studio
  const { step } = work
  const id = activityId(turnId)
  if (keptOut([work], facts, toCome.shut, hands, zeroAt).some(lag => lag.to === id && start < (lag.min ?? 0))) return pinWords.shutRoom(facts.vapour.rooms.get(work.roomId ?? 0)?.name ?? '')
  const ends = earliestEnds(problem, wanted)
  const sorted = problem.lags.filter(lag => lag.to === id).sort((a, b) => Number(a.from !== null) - Number(b.from !== null))
  for (const { from, windows } of sorted) {
    const origin = from === null ? 0 : ends.get(from) ?? 0
    const opens = origin + (windows[0]?.[0] ?? 0)
    const before = works.find(each => each.turns.some(turn => activityId(turn.id) === from))?.step.name
    if (start < opens) return before === undefined || before === step.name ? pinWords.filmFirst(step.name, instant(studio, opens), clock) : pinWords.stepFirst(step.name, before, instant(studio, opens), clock)
    if (from !== null) continue
    const last = windows[windows.length - 1]?.[1] ?? null
    if (last !== null && start > last) return pinWords.windowShut(step.name, instant(studio, last), clock)
    const again = windows.find(([opensAgain]) => opensAgain > start)
    if (!windows.some(([opened, shuts]) => start >= opened && (shuts === null || start <= shuts)) && again) return pinWords.windowBetween(step.name, instant(studio, again[0]), clock)
  }
  return null
}

/** Against what stands where it stands: work in hand and what is pinned. */
function fixedClash(studio: PinStudio, { turnId, end, from, till, hands }: Held, { step }: StepWork, { others, reserved }: { others: readonly Fixed[], reserved: readonly Reserved[] }): string | null {
  const { problem, works } = studio.given
  const length = new Map(problem.activities.map(each => [each.id, each.minutes]))
  const stepName = (activity: string) => works.find(work => work.turns.some(turn => activityId(turn.id) === activity))?.step.name ?? ''
  for (const fixed of others) {
    const stretch = { start: fixed.start, end: fixed.start + (length.get(fixed.activity) ?? 0) }
    const hand = fixed.resources.find(each => hands.includes(each))
    const around = reserved.filter(each => each.activity === fixed.activity && each.hand === hand)
    if (hand !== undefined && [stretch, ...around].some(each => overlaps(each, from, till))) return pinWords.taken(nameOf(studio, hand), stepName(fixed.activity))
    const after = problem.lags.find(lag => lag.from === activityId(turnId) && lag.to === fixed.activity)
    if (after && fixed.start < end + (after.windows[0]?.[0] ?? 0)) return pinWords.followed(step.name, stepName(fixed.activity))
  }
  return null
}

function apartClash({ given: { problem, works } }: PinStudio, { turnId, start, end }: Wanted, { step }: StepWork): string | null {
  const length = new Map(problem.activities.map(each => [each.id, each.minutes]))
  for (const rule of problem.apart) {
    const own = [...rule.one, ...rule.other].find(each => each.activity === activityId(turnId))
    if (!own) continue
    for (const other of rule.one.includes(own) ? rule.other : rule.one) {
      const fixed = problem.fixed.find(each => each.activity === other.activity)
      const ends = fixed ? fixed.start + (length.get(other.activity) ?? 0) : 0
      if (fixed && start < ends + other.after && fixed.start < end + own.after) return pinWords.apart(step.name, works.find(work => work.turns.some(turn => activityId(turn.id) === other.activity))?.step.name ?? '')
    }
  }
  return null
}
