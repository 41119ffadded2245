import { endedBy } from '#shared/promise/day'
import type { DateEstimate, PromiseBasis, PromiseStanding } from '#shared/schemas/promise'
import { promiseCauses } from '#shared/terms'
import type { PromiseCause } from '#shared/terms'
import { dateText, studioZone } from '#shared/time'
import type { Clock } from '#shared/time'
import type { Units } from '#shared/units'
import { moveText } from '#shared/words/plan-moves'

const greenwich = studioZone('UTC')

/** What a field of a promise wants, said when it did not get it. */
export const fields = {
  tell: 'Say who is told, and how, in at most 120 characters.',
  schedule: 'Choose one of the studio’s finishing schedules: a date rests on its steps.',
  place: 'Choose the place where the pieces stand at first.',
  rework: 'Of ten coats 0 to 9 are done again.',
  share: 'The share of the open hours is 10 to 100 per cent.',
} as const

export const promiseRefusals = {
  noDay: 'Choose the day that is promised.',
  past: 'That day is over. Promise a day that is still to come.',
  far: 'Promise a day within the next year.',
  noOrder: 'This batch belongs to no order. Give the order a name: a promise is made to somebody.',
  noPlace: 'Choose a place of this studio.',
  noEstimate: 'No date can be told, so none is kept. What stands in its way is on the week’s page.',
  newer: 'Something newer was asked meanwhile. Ask again.',
} as const

/** Why nobody can say when a batch ends. */
export const noDate = {
  stuck: 'Part of it finds no time in the plan, so nobody can say when it ends.',
  done: 'Nothing is left for hands.',
  unplanned: 'There is no plan of it yet. Ask again in a moment.',
} as const

export const promiseWords = {
  open: 'A date to promise',
  openFor: (name: string) => `A date to promise for ${name}`,
  waiting: 'Going through 200 ways the work may go',
  failed: 'The date could not be worked out. Nothing was changed.',
  needs: 'Choose a schedule, how many pieces, a place and a start: then a date can be worked out.',
  likely: 'likely',
  promise: 'promise',
  table: 'The same as figures',
  day: 'Day',
  ends: 'Ready on it',
  sofar: 'Ready by then',
  causes: 'What the days go on',
  basis: 'What this rests on',
  basisAsk: 'What this rests on: say how often a coat is done again',
  rework: 'Of ten coats, how many are done again?',
  reworkHint: 'A run, nibs, bleed. Said once; the record joins in as it grows.',
  share: 'Open hours that reach the bench, per cent',
  shareHint: 'The rest goes on customers, errands and absence.',
  keep: 'Keep these figures',
  orderName: 'Whom it is promised to: name of the order',
  dayChosen: 'Day that is promised',
  tell: 'Who is told if it slips, and how',
  tellHint: 'May stay empty. A name with a number or an address; it stands in the call that tells of the slip.',
  chosen: (when: string) => `${when} is promised with the start of the batch.`,
  unchoose: 'Do not promise it',
  notKept: 'The batch has started, but its date was not kept. Promise it on the week’s page.',
  key: 'Each column is a day; its height, how many of the 200 ways end on it. Full columns are kept by the promise, hatched ones are not.',
} as const

export const promiseKey = (at: number | null, clock: Clock) => at === null ? 'Promise a day' : `Promise ${dateText(at, clock)}`

/** "likely Tue 8 Dec, 9 of 10 by Fri 11 Dec". */
export function datesText({ likelyAt, cautiousAt }: DateEstimate, clock: Clock): string {
  return `Likely ${dateText(likelyAt, clock)}; nine of ten ways are done by ${dateText(cautiousAt, clock)}.`
}

/**
 * What share of the drawn ways end by a chosen day, before it is promised; rounded down, so that it never says more than was drawn. A day before nine of ten is told
 * with the likely day and the one that nine of ten keep to. `dateAt` in ms UTC.
 */
export function byThenText({ ends, likelyAt, cautiousAt, promiseAt }: Pick<DateEstimate, 'ends' | 'likelyAt' | 'cautiousAt' | 'promiseAt'>, dateAt: number, clock: Clock): string {
  const says = shareText(endedBy(ends, dateAt), ends.length)
  return dateAt < cautiousAt ? `${says} Likely: ${dateText(likelyAt, clock)}, nine of ten by: ${dateText(promiseAt, clock)}.` : says
}

function shareText(ended: number, all: number): string {
  if (ended === 0) return `None of the ${all} ways ends by then.`
  if (ended === all) return `All ${all} ways end by then.`
  const ofTen = Math.floor(ended * 10 / all)
  if (ofTen === 0) return 'Fewer than 1 of 10 ways end by then.'
  return ofTen === 1 ? '1 of 10 ways ends by then.' : `${ofTen} of 10 ways end by then.`
}

const causeNames: Record<PromiseCause, string> = {
  drying: 'drying slower than the plan counts on',
  rework: 'coats done again',
  minutes: 'work that takes longer',
  hours: 'open hours that do not reach the bench',
  waiting: 'waiting for busy hands and its turn',
}
export const causeText = (cause: PromiseCause) => causeNames[cause]

/** Days no finer than anybody plans by: "half a day", "3 days"; null for less than a quarter of a day. */
export function daysText(days: number): string | null {
  const halves = Math.round(days * 2) / 2
  if (days < 0.25) return null
  if (halves <= 0.5) return 'half a day'
  return halves === 1 ? '1 day' : `${halves} days`
}

/** "Coats done again: 2 days", most first; those that take no half day are left out. */
export function causeLines({ causes }: Pick<DateEstimate, 'causes'>): { cause: PromiseCause, days: string, share: number }[] {
  const most = Math.max(...promiseCauses.map(cause => causes[cause]))
  return [...promiseCauses].sort((a, b) => causes[b] - causes[a]).flatMap((cause) => {
    const days = daysText(causes[cause])
    return days === null ? [] : [{ cause, days, share: causes[cause] / most }]
  })
}

export const causesNote = 'Each: how much sooner the cautious date would be without it alone. They overlap, so they do not add up.'
export const noCauses = 'Nothing of it moves the date by half a day.'

const tenths = (chance: number) => `${Number((chance * 10).toFixed(1))}`

/** What the figures rest on, one sentence each. */
export function basisSentences({ reworkOfTen, benchShare, coats, redone, rework, share }: PromiseBasis): string[] {
  const said = reworkOfTen === null ? 'Nobody has said how many coats are done again, so 1 of 10 is taken' : `${tenths(reworkOfTen / 10)} of 10 coats are said to be done again`
  const seen = coats === 0 ? 'No coat is on record yet.' : `On record of the last year: ${redone} of ${coats}. Together that makes ${tenths(rework)} of 10.`
  return [
    `${said}. ${seen}`,
    `${Math.round(share * 100)} % of the open hours are taken to reach the bench${benchShare === null ? ', a planning value' : ', as was said'}. It is not learned: what is told says when work was done, not when hands were free.`,
    'Drying is drawn from the material’s own spread, with what this bench has taught. Minutes swing by a quarter. Nothing begins before the plan says, and each takes a place after whom the plan has it; dust and wet film, vapour and other people wait for each other.',
  ]
}

/** Of how a promise stands: "Promised Fri 11 Dec. It holds: nine of ten ways are done by Thu 10 Dec." */
export function standingText({ promisedAt, slipping, cause, moved, cautiousAt }: PromiseStanding, clock: Clock, units: Units): string {
  const promised = `Promised ${dateText(promisedAt, clock)}.`
  if (cautiousAt === null) return promised
  if (!slipping) return `${promised} It holds: nine of ten ways are done by ${dateText(cautiousAt, clock)}.`
  return `${promised} It slips: nine of ten ways take till ${dateText(cautiousAt, clock)}.${slipReason({ cause, moved }, clock, units)}`
}

/** What happened, where a start of the order moved; else what may still hold it up most, which is no claim that anything happened. */
function slipReason({ cause, moved }: Pick<PromiseStanding, 'cause' | 'moved'>, clock: Clock, units: Units): string {
  if (moved) return ` ${moveText([moved], clock, units)}`
  return cause ? ` No start of it has moved by enough to be told; of all that may still hold it up, most is ${causeText(cause)}.` : ''
}

/** What would save a promise that slips. */
export const rescueText = (rescue: string | null) => rescue === null ? 'No other batch, moved back alone, would save the date.' : `Say no to it, or move ${rescue} back: then the date holds.`

/** Of a promise that slips, beside its batch: how it stands, whom to tell and what would save it. */
export const slipText = (order: string, standing: PromiseStanding, clock: Clock, units: Units) => `${standingText(standing, clock, units)} Tell ${standing.tell ?? `whoever ordered ${order}`}. ${rescueText(standing.rescue)}`

/** "by Tue 8 Dec 100 of 200 are ready": the picture in one sentence. */
export function pictureText({ days, scenarios, likelyAt, promiseAt }: DateEstimate, clock: Clock): string {
  const first = days[0]
  const last = days[days.length - 1]
  const spanText = first && last ? ` The first of them end on ${dayText(first.date)}, the last on ${dayText(last.date)}.` : ''
  return `Of ${scenarios} ways the work may go, half are ready by ${dateText(likelyAt, clock)} and nine of ten by ${dateText(promiseAt, clock)}.${spanText}`
}

/** "Tue 8 Dec" of a local date. */
export const dayText = (date: string) => dateText(Date.parse(`${date}T12:00:00Z`), { now: Date.parse(`${date}T12:00:00Z`), zone: greenwich })

interface Slip extends Pick<PromiseStanding, 'cause' | 'moved' | 'rescue' | 'tell'> { order: string, promisedAt: number, cautiousAt: number }

/** The call when a promised date is likely to pass. */
export const slipCall = {
  title: (order: string) => `A promise slips: ${order}`,
  body: ({ order, tell, promisedAt, cautiousAt, rescue, ...why }: Slip, clock: Clock, units: Units) =>
    `${order} is promised for ${dateText(promisedAt, clock)}; nine of ten ways now take till ${dateText(cautiousAt, clock)}.${slipReason(why, clock, units)} Tell ${tell ?? `whoever ordered ${order}`}. ${rescueText(rescue)}`,
} as const
