import { dustKeptOff } from '~~/server/planning/dust'
import type { PlanFacts } from '~~/server/planning/facts'
import { FreedCauses } from '~~/server/planning/freed-causes'
import { worksThrough } from '~~/server/planning/hands'
import { activityId, handsId, memberIdOf, turnIdOf } from '~~/server/planning/ids'
import type { StepWork } from '~~/server/planning/lags'
import type { StudioProblem } from '~~/server/planning/problem'
import { keptOut } from '~~/server/planning/vapour'
import type { WaitsToCome } from '~~/server/planning/waits'
import type { MoveCause } from '#shared/plan-moves'
import { busyOf, overlaps, restsAt } from '#shared/planning/occupied'
import type { Busy } from '#shared/planning/occupied'
import type { Ready } from '#shared/planning/ready'
import type { Activity, Plan, PlanEntry } from '#shared/planning/types'
import { placeKinds } from '#shared/terms'

const minute = 60_000
/** Shifts below this prove nothing, minutes. */
const slack = 5
/** A room is named as cold from here down (planning value), °C. */
const cold = 14
/** Steps one after another are followed back so far. */
const deepest = 12

interface Compared { facts: PlanFacts, given: StudioProblem, made: Plan, toCome: WaitsToCome, names: ReadonlyMap<number, string>, now: number, ready: ReadonlyMap<string, Ready> }
interface Spot { id: string, turnId: number, work: StepWork, activity: Activity, entry: PlanEntry, was: number, is: number, wasReady: number | null }

/**
 * Why turns lie elsewhere than in the last plan, as far as the facts of now prove it: the old start is tried against each
 * rule, and the first that forbids it is the cause. Where none does, nothing is claimed.
 */
export class MoveCauses {
  private readonly works: Map<string, StepWork>
  private readonly activities: Map<string, Activity>
  private readonly entries: Map<string, PlanEntry>
  private readonly last: Map<number, PlanFacts['last'][number]>
  private readonly busy: Map<string, Busy[]>
  private readonly knownBatches: Set<number>
  private readonly pieces: Map<number, PlanFacts['pieces'][number]>
  private readonly shutFrom: Map<string, number>
  private readonly dustFrom: Map<string, number>
  private readonly freed: FreedCauses

  constructor(private readonly compared: Compared) {
    const { facts, given, made, toCome } = compared
    this.works = new Map(given.works.flatMap(work => work.turns.map(turn => [activityId(turn.id), work] as const)))
    this.activities = new Map(given.problem.activities.map(each => [each.id, each]))
    this.entries = new Map(made.entries.map(each => [each.activity, each]))
    this.last = new Map(facts.last.map(each => [each.turnId, each]))
    this.busy = busyOf(made)
    this.pieces = new Map(facts.pieces.map(each => [each.id, each]))
    this.knownBatches = new Set(given.works.flatMap(work => work.turns.some(turn => this.last.has(turn.id)) ? [this.batchOf(work)?.batchId ?? 0] : []))
    this.shutFrom = new Map(keptOut(given.works, facts, toCome.shut, given.hands, given.zeroAt).map(lag => [lag.to, lag.min ?? 0]))
    this.freed = new FreedCauses(compared)
    this.dustFrom = new Map(dustKeptOff(given.works, facts, given.zeroAt).map(lag => [lag.to, lag.min ?? 0]))
  }

  /** Why a turn that was to begin at `wasAt` begins at `isAt` (ms UTC). */
  of(turnId: number, wasAt: number, isAt: number): MoveCause {
    const spot = this.spot(turnId, wasAt, isAt)
    if (!spot) return { code: 'fits better' }
    const pinned = this.pinned(spot)
    if (pinned) return pinned
    if (this.missedNow(spot)) return { code: 'window missed' }
    const cause = spot.is > spot.was ? this.notReady(spot, 0) ?? this.forbidden(spot) : this.sooner(spot, 0)
    return cause ?? { code: 'fits better' }
  }

  private spot(turnId: number, wasAt: number, isAt: number): Spot | null {
    const id = activityId(turnId)
    const [work, activity, entry] = [this.works.get(id), this.activities.get(id), this.entries.get(id)]
    const readyAt = this.last.get(turnId)?.readyAt ?? null
    return work && activity && entry ? { id, turnId, work, activity, entry, was: this.minutes(wasAt), is: this.minutes(isAt), wasReady: readyAt === null ? null : this.minutes(readyAt) } : null
  }

  /** Somebody gave it this time. */
  private pinned({ id, turnId }: Pick<Spot, 'id' | 'turnId'>): MoveCause | null {
    const { given, facts, names } = this.compared
    const pin = facts.pins.find(each => each.turnId === turnId)
    return pin && given.problem.fixed.some(each => each.activity === id) ? { code: 'pinned', by: names.get(pin.madeByMemberId ?? 0) ?? null } : null
  }

  private minutes(at: number): number {
    return Math.round((at - this.compared.given.zeroAt) / minute)
  }

  private instant(minutes: number): number {
    return this.compared.given.zeroAt + minutes * minute
  }

  private batchOf(work: StepWork) {
    return this.pieces.get(work.step.pieceId)
  }

  /** At its old time what it waits for would not be there yet. */
  private notReady(spot: Spot, depth: number): MoveCause | null {
    const ready = this.compared.ready.get(spot.id)
    // What may begin by now holds nothing up: only the hour has passed.
    if (!ready || ready.at <= 0 || ready.at < spot.was + slack) return null
    if (this.shutFrom.get(spot.id) === ready.at) return { code: 'shut room', room: this.roomName(spot.work) ?? '' }
    if (ready.lag.from === null && this.dustFrom.get(spot.id) === ready.at) return { code: 'dust', step: null }
    if (ready.lag.from === null) return this.film('film later', spot, ready.at)
    return this.before(ready.lag.from, depth) ?? this.film('film later', spot, ready.at)
  }

  /** What became of the step before; null where it lies where it lay, so that only the wait after it can have grown. */
  private before(id: string, depth: number): MoveCause | null {
    const turnId = turnIdOf(id)
    const [work, entry, was] = [this.works.get(id), this.entries.get(id), this.last.get(turnId)]
    if (!work || !entry) return null
    const step = work.step.name
    if (!was) return work.step.origin === 'recovery' ? { code: 'recovery', step } : { code: 'step added', step }
    const spot = this.spot(turnId, was.startsAt, this.instant(entry.start))
    const waiting = work.turns.some(turn => turn.id === turnId && turn.status === 'waiting')
    // What is pinned lies where somebody wants it, whatever nobody has told.
    if (waiting && was.dueAt <= this.compared.now && !(spot && this.pinned(spot))) return this.silentRoot(spot, depth) ?? { code: 'not told', step, dueAt: was.dueAt }
    if (entry.start < this.minutes(was.startsAt) + slack) return null
    const because = spot && depth < deepest ? this.later(spot, depth + 1) : null
    // The root alone is told, not every step on the way.
    return because?.code === 'follows' ? because : { code: 'follows', step, startsAt: this.instant(entry.start), because }
  }

  /** What nobody has told may itself wait for work that is pinned, or that nobody has told either. */
  private silentRoot(spot: Spot | null, depth: number): MoveCause | null {
    const root = spot && depth < deepest ? this.notReady(spot, depth + 1) : null
    return root?.code === 'not told' || (root?.code === 'follows' && root.because?.code === 'pinned') ? root : null
  }

  private later(spot: Spot, depth: number): MoveCause | null {
    const pinned = this.pinned(spot)
    if (pinned) return pinned
    return this.missedNow(spot) ? { code: 'window missed' } : this.notReady(spot, depth) ?? this.forbidden(spot)
  }

  /** Its old time is forbidden by something other than what it waits for. */
  private forbidden(spot: Spot): MoveCause | null {
    const hands = this.noHands(spot)
    // Where nobody works at all, nobody is named.
    return (hands?.code === 'hours' ? hands : this.handAway(spot.turnId)) ?? hands ?? this.noPlace(spot) ?? this.keptApart(spot)
  }

  /** Its recovery is in this plan and was not in the last, which gave it as long as it takes without. */
  private missedNow({ turnId, entry }: Spot): boolean {
    const was = this.last.get(turnId)
    return entry.afterRecovery && was !== undefined && this.minutes(was.endsAt) - this.minutes(was.startsAt) < entry.end - entry.start
  }

  /** Whoever the last plan gave it to may no longer do it, or no longer works then. */
  private handAway(turnId: number): MoveCause | null {
    const { given, names } = this.compared
    const was = this.last.get(turnId)
    const hand = was && given.hands.find(each => each.memberId === was.memberId)
    if (!was || !hand || was.startsAt < given.zeroAt) return null
    const work = this.works.get(activityId(turnId))
    if (work && !hand.may(work.step.kind)) return { code: 'not theirs', name: names.get(hand.memberId) ?? '' }
    const start = this.minutes(was.startsAt)
    const end = work?.step.mayRunOver ? start + 1 : this.minutes(was.endsAt)
    return worksThrough(hand, start, end) ? null : { code: 'hours', name: names.get(hand.memberId) ?? null }
  }

  private film(code: 'film later' | 'film sooner', { work, id }: Spot, ready: number): MoveCause {
    const { facts, toCome } = this.compared
    const from = this.compared.ready.get(id)?.lag.from
    const before = from ? this.works.get(from)?.step.name : facts.links.filter(link => link.toStepId === work.step.id).flatMap(link => facts.steps.find(step => step.id === link.fromStepId)?.name ?? [])[0]
    const readyAt = this.instant(ready)
    const coldest = code === 'film later' ? toCome.coldest(work.roomId, readyAt) : null
    const isCold = coldest !== null && coldest <= cold
    return { code, step: before ?? work.step.name, readyAt, room: isCold ? this.roomName(work) : null, tempC: isCold ? Math.round(coldest) : null }
  }

  private roomName(work: StepWork): string | null {
    return this.compared.facts.vapour.rooms.get(work.roomId ?? 0)?.name ?? null
  }

  /** At its old time too few of those who may do it were there and free. */
  private noHands({ id, activity, was, entry, work }: Spot): MoveCause | null {
    const { given, names } = this.compared
    for (const { of, count } of activity.choices) {
      const end = was + (activity.mayRunOver ? 1 : entry.end - entry.start)
      const there = of.filter(hand => given.hands.some(each => each.id === hand && worksThrough(each, was, end)))
      if (there.length < count) return { code: 'hours', name: of.length === 1 ? names.get(memberIdOf(of[0] ?? '')) ?? null : null }
      const taken = there.map(hand => ({ hand, by: (this.busy.get(hand) ?? []).filter(each => !each.activities.includes(id) && overlaps(each, was, end)) }))
      const free = taken.filter(each => each.by.length === 0).length
      if (free >= count) continue
      const others = taken.flatMap(({ hand, by }) => by.flatMap(each => this.taker(hand, each)))
      // The same work of its own batch is no reason by itself: what came between is.
      const told = others.find(each => each.added) ?? others.find(each => each.because !== null) ?? others.find(each => each.batchId !== this.batchOf(work)?.batchId)
      return told ? { code: 'hands', name: there.length > 1 ? null : names.get(told.memberId) ?? null, step: told.step, batch: told.batch, added: told.added, because: told.because } : null
    }
    return null
  }

  private taker(hand: string, { activities }: Busy) {
    const work = this.works.get(activities[0] ?? '')
    const piece = work && this.batchOf(work)
    return work && piece ? [{ memberId: memberIdOf(hand), step: work.step.name, batch: piece.batch, batchId: piece.batchId, added: !this.knownBatches.has(piece.batchId), because: activities.reduce<MoveCause | null>((found, id) => found ?? this.broughtHere(id), null) }] : []
  }

  /** Why work lies at another time or in other hands than the last plan gave it, where that is somebody's doing. */
  private broughtHere(id: string): MoveCause | null {
    const turnId = turnIdOf(id)
    const [was, entry] = [this.last.get(turnId), this.entries.get(id)]
    const stands = !was || !entry || (Math.abs(entry.start - this.minutes(was.startsAt)) < slack && entry.resources.includes(handsId(was.memberId ?? 0)))
    return stands ? null : this.pinned({ id, turnId }) ?? this.handAway(turnId)
  }

  /** Where it will rest was full at its old time. */
  private noPlace({ id, was, entry }: Spot): MoveCause | null {
    const { problem } = this.compared.given
    for (const rest of problem.rests.filter(each => each.from === id)) {
      for (const [resource, units] of Object.entries(rest.uses)) {
        const capacity = problem.resources.find(each => each.id === resource)?.capacity ?? Infinity
        const kind = placeKinds.find(each => `p ${each}` === resource)
        if (kind && restsAt(problem, this.compared.made, resource, was + entry.end - entry.start, id) + units > capacity) return { code: 'place', kind }
      }
    }
    return null
  }

  /** Dust or vapour of something else was in the room at its old time. */
  private keptApart({ id, was, entry }: Spot): MoveCause | null {
    for (const rule of this.compared.given.problem.apart) {
      const own = rule.one.find(each => each.activity === id) ?? rule.other.find(each => each.activity === id)
      if (!own) continue
      const others = rule.one.includes(own) ? rule.other : rule.one
      const end = was + entry.end - entry.start
      const met = others.find(({ activity, after }) => {
        const other = this.entries.get(activity)
        return other && was < other.end + after && other.start < end + own.after
      })
      if (met) return { code: rule.id.startsWith('dust') ? 'dust' : 'vapour', step: this.works.get(met.activity)?.step.name ?? '' }
    }
    return null
  }

  private sooner(spot: Spot, depth: number): MoveCause | null {
    return this.readySooner(spot, depth) ?? this.freed.of(spot)
  }

  /** What it waited for in the last plan has been done since. */
  private doneBefore({ work }: Spot, waitsFor: string | null): MoveCause | null {
    const { facts } = this.compared
    const before = new Set(facts.links.filter(link => link.toStepId === work.step.id).map(link => link.fromStepId))
    const done = waitsFor === null ? facts.lastOver.find(each => each.status === 'done' && before.has(each.stepId)) : undefined
    return done ? { code: 'done before', step: done.step } : null
  }

  /** By the last reckoning it could not have begun so soon. */
  private readySooner(spot: Spot, depth: number): MoveCause | null {
    const ready = this.compared.ready.get(spot.id)
    if (!ready || spot.wasReady === null || spot.is >= spot.wasReady - slack || ready.at >= spot.wasReady - slack) return null
    const before = ready.lag.from === null ? undefined : this.entries.get(ready.lag.from)
    const was = before && this.last.get(turnIdOf(before.activity))
    if (!before || !was || before.start >= this.minutes(was.startsAt) - slack) return this.doneBefore(spot, ready.lag.from) ?? this.film('film sooner', spot, ready.at)
    const startsAt = this.instant(before.start)
    const earlier = this.spot(was.turnId, was.startsAt, startsAt)
    const because = earlier && depth < deepest ? this.pinned(earlier) ?? this.sooner(earlier, depth + 1) : null
    return because?.code === 'follows' ? because : { code: 'follows', step: this.works.get(before.activity)?.step.name ?? '', startsAt, because }
  }
}
