import { mayDoStep } from '#shared/permissions'
import { liftingTime } from '#shared/verdict/verdict'
import type { ReasonCode } from '#shared/drying/types'
import type { DoubtCause, Hold, MilestoneName, Risk, Role, StepKind, StepStatus } from '#shared/terms'
import type { Moment } from '#shared/verdict/types'

/** A recoat window of one coat, ms UTC. `opensAt` null: cannot be promised. `shutsAt` null: never. `fromStart`: open from the application on. */
export interface WindowTime { opensAt: number | null, shutsAt: number | null, fromStart: boolean }

/** A film of the step before, as the link to the next one sees it. `moment` is the link's own milestone; null when it is unknown. */
export interface LinkFilm { moment: Moment | null, windows: readonly WindowTime[], hold: Hold | null }

/** One link that leads to a step: the step before it and what is asked of its films. No films left to ask counts as met. */
export interface LinkState {
  step: string
  status: StepStatus
  milestone: MilestoneName | null
  risk: Risk
  windowed: boolean
  films: readonly LinkFilm[]
}

export interface BeginFacts {
  status: StepStatus
  kind: StepKind
  links: readonly LinkState[]
  /** An open doubt on a film of the parts the step works on. */
  doubt: DoubtCause | null
  /** An open keep-out of the room the parts stand in or the step is done in. */
  keepOut: { room: string } | null
}

/** Who asks. `equipped`: the named maker of the same work, with the exhaust running. */
export interface Who { role: Role, helperKinds: readonly StepKind[], equipped: boolean, memberId?: number }

export type BeginReason =
  | { code: 'may begin' }
  | { code: 'not waiting', status: StepStatus }
  | { code: 'doubt', cause: DoubtCause }
  | { code: 'waits for', step: string }
  | { code: 'held', step: string, hold: Hold }
  | { code: 'unknown film', step: string }
  | { code: 'no promise', step: string, reason: ReasonCode | null }
  | { code: 'drying', step: string, milestone: MilestoneName }
  | { code: 'window to come', step: string }
  | { code: 'window shut', step: string }
  | { code: 'keep out', room: string }
  | { code: 'role', kind: StepKind }

/** `from` is the first instant at which it may begin, past or to come; `till` when that chance shuts, null for never. ms UTC. */
export interface MayBegin { may: boolean, from: number | null, till: number | null, because: BeginReason }

interface Chance { from: number, till: number, link: LinkState | null }

/** The instant a link is met at its own risk: a maker's word, else the likely, 90 % or 98 % time. */
function metAt(moment: Moment, risk: Risk): number | null {
  const at = { likely: moment.likelyAt, p90: moment.p90At, p98: moment.p98At }[risk]
  return moment.reachedAt ?? at
}

/** Why a link cannot be met by waiting, or null when time alone can meet it. */
function obstacle(link: LinkState): BeginReason | null {
  const { step, status } = link
  if (status === 'left out') return null
  if (link.milestone === null && !link.windowed) return status === 'done' ? null : { code: 'waits for', step }
  if (status !== 'done' && status !== 'resting') return { code: 'waits for', step }
  for (const { moment, hold } of link.films) {
    if (hold) return { code: 'held', step, hold }
    if (link.milestone === null) continue
    if (moment === null) return { code: 'unknown film', step }
    if (metAt(moment, link.risk) === null) return { code: 'no promise', step, reason: moment.reason }
  }
  return null
}

const dryEnough = ({ moment }: LinkFilm, { milestone, risk }: LinkState) => milestone === null ? -Infinity : (moment && metAt(moment, risk)) ?? Infinity

/** When one film lets the next step begin: past its milestone, and inside a window where the link asks for one; with no milestone the window alone says. */
function chancesOf(film: LinkFilm, link: LinkState): Chance[] {
  const met = dryEnough(film, link)
  if (!link.windowed || film.windows.length === 0) return [{ from: met, till: Infinity, link }]
  return film.windows.flatMap(({ opensAt, shutsAt, fromStart }) => {
    if (opensAt === null) return []
    const chance = { from: fromStart ? opensAt : Math.max(opensAt, met), till: shutsAt ?? Infinity, link }
    return chance.from < chance.till ? [chance] : []
  })
}

function overlap(some: readonly Chance[], others: readonly Chance[]): Chance[] {
  const both = some.flatMap(a => others.map(b => ({ from: Math.max(a.from, b.from), till: Math.min(a.till, b.till), link: b.from >= a.from ? b.link : a.link })))
  return both.filter(chance => chance.from < chance.till).sort((a, b) => a.from - b.from)
}

function chances(links: readonly LinkState[]): Chance[] {
  const asking = links.filter(link => (link.milestone !== null || link.windowed) && link.status !== 'left out')
  const films = asking.flatMap(link => link.films.map(film => chancesOf(film, link)))
  return films.reduce<Chance[]>(overlap, [{ from: -Infinity, till: Infinity, link: null }])
}

const no = (because: BeginReason, from: number | null = null, till: number | null = null): MayBegin => ({ may: false, from, till, because })
const finite = (at: number) => Number.isFinite(at) ? at : null

/**
 * Whether a step may begin: it waits, every link is met at its own risk (inside a window, if it asks for one), no film
 * is in doubt, the room is open or the asker is the equipped operator, and the asker may do such a step.
 * It never changes a verdict. A page cut off lets nothing begin by its own clock, but sees windows shut.
 * @param now ms UTC
 * @param heardAt as for `pieceVerdict`
 * @param who null asks for anybody who may
 */
export function mayBegin(step: BeginFacts, now: number, heardAt: number | null, who: Who | null): MayBegin {
  if (step.status !== 'waiting') return no({ code: 'not waiting', status: step.status })
  if (step.doubt) return no({ code: 'doubt', cause: step.doubt })
  for (const link of step.links) {
    const because = obstacle(link)
    if (because) return no(because)
  }
  const windowed = step.links.find(link => link.windowed)
  const chance = chances(step.links).find(each => now < each.till)
  if (!chance) return no({ code: 'window shut', step: windowed?.step ?? '' })
  const from = finite(chance.from) ?? now
  const till = finite(chance.till)
  if (step.keepOut && !who?.equipped) return no({ code: 'keep out', room: step.keepOut.room }, null, till)
  if (from > liftingTime(now, heardAt) && chance.link) return no(waiting(chance.link, chance.from), from, till)
  if (who && !mayDoStep(who.role, who.helperKinds, step.kind)) return no({ code: 'role', kind: step.kind }, from, till)
  return { may: true, from, till, because: { code: 'may begin' } }
}

/** What the waiting is for: the film itself, or a window that opens later than the film would allow. */
function waiting(link: LinkState, from: number): BeginReason {
  const dry = Math.max(...link.films.map(film => dryEnough(film, link)))
  if (link.windowed && dry < from) return { code: 'window to come', step: link.step }
  return { code: 'drying', step: link.step, milestone: link.milestone ?? 'dry-to-handle' }
}

/** A window is about to shut from so long before the last moment to start. ms, planning value. */
export const aboutToShutMs = 60 * 60_000

/**
 * Whether a step is late: its window shut, or about to shut.
 * @param lastStartAt last moment to start and still do all of them, ms UTC; null: the window's own end stands in
 */
export function lateness(begin: MayBegin, lastStartAt: number | null, now: number): 'shut' | 'shutting' | null {
  if (begin.because.code === 'window shut') return 'shut'
  if (begin.till === null || (begin.from !== null && begin.from > now)) return null
  const last = Math.min(lastStartAt ?? begin.till, begin.till)
  return now >= last - aboutToShutMs ? 'shutting' : null
}

export const stepStates = ['waits for', 'may begin', 'being done', 'drying', 'clamped', 'pressed', 'weighted', 'done', 'late', 'set aside', 'left out', 'doubtful'] as const
export type StepState = typeof stepStates[number]

/** `doubtful`: an open doubt on the step's own film. `hold`: what holds it now, null once it is out. */
export interface StepStateFacts { status: StepStatus, hold: Hold | null, doubtful: boolean, begin: MayBegin, late: 'shut' | 'shutting' | null }

const held: Record<Hold, StepState> = { clamps: 'clamped', press: 'pressed', weight: 'weighted' }

/** Where a step stands in its life, from what is stored and what is derived. */
export function stepState({ status, hold, doubtful, begin, late }: StepStateFacts): StepState {
  if (status === 'set aside' || status === 'left out') return status
  if (doubtful) return 'doubtful'
  if (status === 'done') return 'done'
  if (status === 'doing') return 'being done'
  if (status === 'resting') return hold ? held[hold] : 'drying'
  if (late) return 'late'
  return begin.may ? 'may begin' : 'waits for'
}
