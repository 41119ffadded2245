import { cautionParts } from '#shared/library/caution-parts'
import { clockTime, localDate, localMinutes, addDays, roughTime } from '#shared/time'
import { lowerFirst, titled } from '#shared/words/steps'
import type { Clock } from '#shared/time'
import type { ReasonCode } from '#shared/drying/types'
import type { DoubtCause, Hold } from '#shared/terms'
import type { Limit, LimitKind, Verdict, VerdictKind, VerdictReason } from '#shared/verdict/types'

// Fragments in lower case, to be joined into one line; `asSentence` makes a sentence of one.

/** "the back", "the long board"; a numbered carrier goes by its own name: "Tray 3". */
function gripText(grip: string): string {
  return /\d/.test(grip) ? grip : `the ${lowerFirst(grip)}`
}

/** "hands off", "ask first", "hold by the back", "may be handled". Without a grip (a group with several): as each piece says. */
export function verdictTitle(kind: VerdictKind, grip: string | null): string {
  if (kind !== 'hold by') return kind
  return grip === null ? 'hold by the grip each piece names' : `hold by ${gripText(grip)}`
}

const predictionReasons: Record<ReasonCode, string> = {
  'below-minimum': 'below the material’s minimum temperature',
  'too-damp': 'too damp to promise',
  'never': 'no end in sight in this air',
  'outside-sheet': 'slower than its sheet allows: something is wrong with this coat',
}

/** Why a time cannot be promised. */
export function predictionReason(reason: ReasonCode): string {
  return predictionReasons[reason]
}

const holding: Record<Hold, { state: string, not: string, out: string }> = {
  clamps: { state: 'in clamps', not: 'do not loosen', out: 'out of clamps' },
  press: { state: 'in the press', not: 'do not loosen', out: 'out of the press' },
  weight: { state: 'under weight', not: 'do not lift the weight', out: 'out from under the weight' },
}

function heldText(hold: Hold, giveTillAt: number | null, clock: Clock): string {
  const { state, not, out } = holding[hold]
  if (giveTillAt === null) return `${state}: ${not}`
  if (giveTillAt <= clock.now) return `${state}: ${not} until a maker says it is out`
  return `${state}: ${not}; ${out} from ${roughTime(giveTillAt, clock, 'up')}`
}

/** Between eight in the evening and six in the morning of the night just gone. */
function lastNight(at: number, { now, zone }: Clock): boolean {
  const today = localDate(now, zone)
  const date = localDate(at, zone)
  const minutes = localMinutes(at, zone)
  return (date === today && minutes < 360) || (date === addDays(today, -1) && minutes >= 1200)
}

function doubtText(cause: DoubtCause, fromAt: number, clock: Clock): string {
  if (cause === 'chilled') return lastNight(fromAt, clock) ? 'chilled in the night' : `chilled ${clockTime(fromAt, clock)}`
  return cause === 'failed' ? `failed a test ${clockTime(fromAt, clock)}` : `something went wrong ${clockTime(fromAt, clock)}`
}

/** What an unanswered question about an old object leaves open. */
export const intakeHazards = {
  'lead': 'lead not ruled out',
  'green cloth': 'arsenic in green cloth not ruled out',
  'mould': 'mould not ruled out',
  'metal coating': 'lead, chrome or cadmium in its metal coat not ruled out',
}

function notThereText(where: string | null, seenAt: number | null, clock: Clock): string {
  if (where === null) return 'nobody has said where it stands'
  const seen = [where, seenAt === null ? '' : clockTime(seenAt, clock)].filter(Boolean).join(', ')
  return seen === '' ? 'not where it should be' : `not where it should be: last seen ${seen}`
}

/** Why a verdict says what it says. */
export function verdictReason(reason: VerdictReason, clock: Clock): string {
  switch (reason.code) {
    case 'keep out': return `keep out of ${reason.room}`
    case 'in hand': return `${reason.by} has it: ${lowerFirst(reason.what)}`
    case 'held': return heldText(reason.hold, reason.giveTillAt, clock)
    case 'unknown film': return 'nobody knows what is on it: a maker tests it first'
    case 'doubt wet': return `${doubtText(reason.cause, reason.fromAt, clock)} while wet: test or strip`
    case 'doubt': return `${doubtText(reason.cause, reason.fromAt, clock)}: test first`
    case 'wet': return reason.until === null && reason.reason ? `wet, ${predictionReason(reason.reason)}` : 'wet'
    case 'no promise': return predictionReason(reason.reason)
    case 'coat due': return `${reason.what === '' ? 'a coat' : titled(reason.what)} was due ${clockTime(reason.at, clock)}`
    case 'not there': return notThereText(reason.where, reason.seenAt, clock)
    case 'intake': return `${intakeHazards[reason.question]}: ${cautionParts.untested}`
    case 'grip wet': return `wet away from ${gripText(reason.grip)}`
    case 'dry': return 'dry to handle'
    case 'cut off': return `not heard from the studio since ${clockTime(reason.since, clock)}`
  }
}

/** "hold by the back from 15:20": when the verdict gets better by itself, or null. */
export function betterText({ betterAt, betterKind, betterGrip }: Pick<Verdict, 'betterAt' | 'betterKind' | 'betterGrip'>, clock: Clock): string | null {
  if (betterAt === null || betterKind === null) return null
  return `${verdictTitle(betterKind, betterGrip)} from ${roughTime(betterAt, clock, 'up')}`
}

const limitVerbs: Record<Exclude<LimitKind, 'gloves'>, string> = { stack: 'stack', wrap: 'wrap', glaze: 'glaze', strain: 'strain' }

/** "gloves till Mon", "do not stack before 18:00"; for ever: "gloves", "do not stack". */
export function limitText({ kind, until }: Limit, clock: Clock): string {
  return limitsOfOneEnd([kind], until, clock)
}

function limitsOfOneEnd(kinds: LimitKind[], until: number | null, clock: Clock): string {
  const time = until === null ? null : roughTime(until, clock, 'up')
  if (kinds.includes('gloves')) return time === null ? 'gloves' : `gloves till ${time}`
  const verbs = kinds.flatMap(kind => kind === 'gloves' ? [] : [limitVerbs[kind]])
  const said = `do not ${verbs.join(' or ')}`
  return time === null ? said : `${said} before ${time}`
}

/** Every limit, those that end together in one: "do not stack before 18:00", "do not wrap or glaze before Mon 14 Dec". */
export function limitTexts(limits: readonly Limit[], clock: Clock): string[] {
  const groups: Limit[][] = []
  for (const limit of limits) {
    const group = groups.find(([first]) => first?.until === limit.until && first.kind !== 'gloves' && limit.kind !== 'gloves')
    if (group) group.push(limit)
    else groups.push([limit])
  }
  return groups.map(group => limitsOfOneEnd(group.map(limit => limit.kind), group[0]?.until ?? null, clock))
}

/** Reasons that say nothing the verdict's own words do not say already. */
const plain = ['dry', 'grip wet']

/** A whole verdict in one line: "ask first: a coat was due 14:00", "hands off: wet; hold by the back from 15:20; ...". */
export function verdictLine(verdict: Verdict, clock: Clock): string {
  const title = verdictTitle(verdict.kind, verdict.grip)
  const head = plain.includes(verdict.reason.code) ? title : `${title}: ${verdictReason(verdict.reason, clock)}`
  const better = betterText(verdict, clock)
  return [head, ...better ? [better] : [], ...limitTexts(verdict.limits, clock)].join('; ')
}

/** "Not heard from the studio since 13:50." for the head of a page that is cut off. */
export function cutOffText(since: number, clock: Clock): string {
  return asSentence(verdictReason({ code: 'cut off', since }, clock))
}

/** "not told yet": beside a verdict that counts acts this device has not sent. */
export const notToldYet = 'not told yet'

/** A fragment as a sentence of its own: "Sand lightly from 13:55." */
export function asSentence(fragment: string): string {
  return fragment === '' ? '' : `${fragment.charAt(0).toUpperCase()}${fragment.slice(1)}.`
}
