import { clockTime, roughTime } from '#shared/time'
import { stepKindWords } from '#shared/words/step-kinds'
import { betterText, predictionReason } from '#shared/words/verdict'
import { lowerFirst, milestoneText, stepAct, stepNoun, titled } from '#shared/words/steps'
import type { BeginReason, StepState } from '#shared/verdict/begin'
import type { NextMoment, StartBy } from '#shared/verdict/next'
import type { Clock } from '#shared/time'
import type { DoubtCause, Hold, StepStatus } from '#shared/terms'

const someText = (count: number) => (count === 1 ? 'one' : `${count}`)

function piecesText(pieces: StartBy['pieces']): string {
  if (pieces === null || pieces.all === 1) return ''
  // Which ones is not said: those that can still be done are not the first, their windows shut last.
  if (pieces.some < pieces.all) return ` to do ${someText(pieces.some)} of ${pieces.all}`
  return pieces.all === 2 ? ' to do both' : ` to do all ${pieces.all}`
}

const byText = ({ at, pieces }: StartBy, clock: Clock) => `by ${at < clock.now ? clockTime(at, clock) : roughTime(at, clock, 'down')}${piecesText(pieces)}`

/** What a last moment that has gone by begins with. */
export const late = 'late: '

function startText(start: StartBy, clock: Clock): string {
  const noun = stepNoun(start.stepKind, start.what)
  return start.at < clock.now ? `${late}${noun} was to start ${byText(start, clock)}` : `start ${noun} ${byText(start, clock)}`
}

/** "by 14:35 for 4 of them": as many as can still be done when the last moment for all is over. */
export const fewText = (count: number, at: number, clock: Clock, doubtMs?: number) => `by ${roughTime(at, clock, 'down', doubtMs)} for ${someText(count)} of them`

/** "start by 14:35 to do both", where the line says already what. */
export function startByText(start: StartBy, clock: Clock): string {
  return start.at < clock.now ? `${late}was to start ${byText(start, clock)}` : `start ${byText(start, clock)}`
}

type Check = Extract<NextMoment, { kind: 'check' }>

/** When a check or a taking out is wanted, where the line says already what: "at 14:00", "from 14:05", "now". */
export function checkTimeText({ at, out, due }: Pick<Check, 'at' | 'out' | 'due'>, clock: Clock): string {
  if (due) return 'now'
  return out === null ? `at ${roughTime(at, clock, 'down')}` : `from ${roughTime(at, clock, 'up')}`
}

const takeOut: Record<Hold, string> = { clamps: 'take out of clamps', press: 'take out of the press', weight: 'take out from under the weight' }

function checkText(check: Check, clock: Clock): string {
  if (check.out === null) return `${lowerFirst(check.what)} ${checkTimeText(check, clock)}`
  return check.due ? takeOut[check.out] : `${takeOut[check.out]} ${checkTimeText(check, clock)}`
}

/** Sooner than this a planned start is now. ms, planning value. */
const soonMs = 5 * 60_000

/** " from now, planned 15:40" of what may begin though the plan has it later: neither time alone would be true. */
const plannedLater = (plannedAt: number | null, clock: Clock) => (plannedAt === null || plannedAt - clock.now < soonMs ? '' : ` from now, planned ${roughTime(plannedAt, clock, 'down')}`)

/** A next moment where the line says already what it is about: "start by 14:35", "from 13:55", "now". */
export function aboutText(moment: NextMoment, clock: Clock): string {
  switch (moment.kind) {
    case 'start by': return startByText(moment, clock)
    case 'may begin': return `from ${moment.open ? 'now' : roughTime(moment.at, clock, 'up')}`
    case 'better': return momentText(moment, clock)
    case 'check': return checkTimeText(moment, clock)
  }
}

/** The next moment of a piece: "sand lightly from 13:55", "start second varnish by 14:35 to do both", "hold by the back from 15:20". */
export function momentText(moment: NextMoment, clock: Clock): string {
  switch (moment.kind) {
    case 'start by': return startText(moment, clock)
    case 'may begin': {
      const act = stepAct(moment.stepKind, moment.what)
      return moment.open ? `${act}${plannedLater(moment.plannedAt, clock)}` : `${act} from ${roughTime(moment.at, clock, 'up')}`
    }
    case 'better': return betterText({ betterAt: moment.at, betterKind: moment.what, betterGrip: moment.grip }, clock) ?? ''
    case 'check': return checkText(moment, clock)
  }
}

/**
 * Why hands must start so early: "the window shuts at 15:05", or null. Pieces of one session may have windows of their own, so it says whose it names.
 * @param shuts when the windows shut that a line for several pieces is about, ms UTC; none given: the line is about one piece
 */
export function momentReason(moment: NextMoment, clock: Clock, shuts: readonly number[] = []): string | null {
  if (moment.kind !== 'start by' || moment.shutsAt === null) return null
  const said = (at: number) => roughTime(at, clock, 'down')
  const time = said(moment.shutsAt)
  const alone = shuts.length === 0 && moment.pieces !== null && moment.pieces.all > 1
  const window = alone ? 'this one’s window' : shuts.some(at => said(at) !== time) ? 'the first window' : 'the window'
  return `${window} ${moment.shutsAt <= clock.now ? 'shut' : 'shuts'} at ${time}`
}

const notWaiting: Record<StepStatus, string> = {
  'waiting': 'waits', 'doing': 'being done', 'resting': 'resting', 'done': 'done', 'set aside': 'set aside', 'left out': 'left out',
}
const doubts: Record<DoubtCause, string> = {
  chilled: 'chilled while wet: test or strip before anything else',
  failed: 'a test failed: test or strip before anything else',
  unknown: 'something went wrong: test or strip before anything else',
}
const holds: Record<Hold, string> = { clamps: 'in clamps', press: 'in the press', weight: 'under weight' }

/** Why a step may or may not begin. */
export function beginReason(reason: BeginReason): string {
  switch (reason.code) {
    case 'may begin': return 'may begin'
    case 'not waiting': return notWaiting[reason.status]
    case 'doubt': return doubts[reason.cause]
    case 'waits for': return `waits for ${titled(reason.step)}`
    case 'held': return `${titled(reason.step)} is still ${holds[reason.hold]}`
    case 'unknown film': return `nobody knows when ${titled(reason.step)} is dry: only after a touch test`
    case 'no promise': return reason.reason ? `${predictionReason(reason.reason)}: only after a touch test` : 'only after a touch test'
    case 'drying': return `waits until ${titled(reason.step)} is ${milestoneText(reason.milestone)}`
    case 'window to come': return `the window after ${titled(reason.step)} is not open yet`
    case 'window shut': return `the window after ${titled(reason.step)} has shut`
    case 'keep out': return `keep out of ${reason.room}`
    case 'role': return `${stepKindWords[reason.kind].many}: for those the owner allows`
  }
}

const states: Record<StepState, string> = {
  'waits for': 'waits', 'may begin': 'may begin', 'being done': 'being done', 'drying': 'drying', 'clamped': 'clamped', 'pressed': 'pressed',
  'weighted': 'under weight', 'done': 'done', 'late': 'late', 'set aside': 'set aside', 'left out': 'left out', 'doubtful': 'doubtful',
}

/** Why a step is late while its window is still open: "late: the window shuts at 15:05". */
export const lateWhy = (shutsAt: number, clock: Clock) => `${late}the window shuts at ${roughTime(shutsAt, clock, 'down')}`

/** Where a step stands in its life. `because` fills in what it waits for or why it was set aside: "waits until gesso is dry to sand lightly". */
export function stepStateText(state: StepState, because: BeginReason | null = null, asideReason: string | null = null): string {
  if (state === 'waits for' && because) return beginReason(because)
  if (state === 'set aside' && asideReason) return `set aside: ${asideReason}`
  if (state === 'late' && because?.code === 'window shut') return `late: ${beginReason(because)}`
  return states[state]
}
