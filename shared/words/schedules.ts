import type { ScheduleLinkWire, ScheduleStepWire, WaitWire } from '#shared/schemas/schedule'
import type { Hold, Risk } from '#shared/terms'
import { span } from '#shared/time'
import { lowerFirst, milestoneText, titled } from '#shared/words/steps'

/** What the pages of the finishing schedules say. */
export const scheduleWords = {
  title: 'Finishing schedules',
  intro: 'Elapsed is one piece around the clock in the studio’s usual air, to the last film dry to handle. Hands-on is attended work alone.',
  waiting: 'Fetching the finishing schedules',
  waitingOne: 'Fetching the schedule',
  failed: 'The finishing schedules could not be fetched.',
  failedOne: 'This finishing schedule could not be fetched.',
  empty: 'There are no finishing schedules here',
  back: 'All finishing schedules',
  backOne: 'The schedule as it stands',
  one: 'the schedule',
  start: 'Start a batch with it',
  elapsed: 'Elapsed',
  handsOn: 'Hands-on',
  steps: (count: number) => (count === 1 ? '1 step' : `${count} steps`),
  edition: (no: number) => `edition ${no}`,
  way: 'How the branches meet',
  wayHint: 'One column for each part, from top to bottom. Where a step works on several parts its line reaches across them: there they meet.',
  inOrder: 'Step by step',
  parts: 'Parts',
  grip: (grip: string) => `hold by the ${grip}`,
  checks: 'Meanwhile',
  cautions: 'Safety',
  about: (materials: readonly string[]) => materials.join(', '),
  first: 'Begins at once.',
} as const

const holds: Record<Hold, string> = { clamps: 'in clamps', press: 'in the press', weight: 'under weight' }

/** "45 min", "10 h", "3.5 days": minutes of waiting, no finer than anybody plans by. */
export function waitSpan(minutes: number): string {
  if (minutes >= 14_400) return `${Math.round(minutes / 1440)} days`
  if (minutes >= 2880) return `${Math.round(minutes / 720) / 2} days`
  return minutes >= 600 ? `${Math.round(minutes / 60)} h` : span(minutes < 120 ? Math.ceil(minutes / 5) * 5 : Math.ceil(minutes / 15) * 15)
}

/** "likely 3 h, up to 5 h"; a wait without an end says so. */
export function waitText({ likelyMin, giveTillMin, promised }: WaitWire): string {
  if (likelyMin === null) return 'no end in sight in the studio’s usual air'
  if (giveTillMin === null || !promised) return `likely ${waitSpan(likelyMin)}, then only a touch test tells`
  return `likely ${waitSpan(likelyMin)}, up to ${waitSpan(giveTillMin)}`
}

const risks: Record<Risk, string> = { likely: 'goes by likely', p90: 'goes by give-it-till', p98: 'goes by the slowest' }

/** What a step waits for, as one line: "Until “Ground” is dry to sand lightly: likely 3 h, up to 5 h. Goes by likely." */
export function linkText(link: ScheduleLinkWire, before: Pick<ScheduleStepWire, 'name'>): string {
  const from = titled(before.name)
  if (link.milestone === null || link.wait === null) return `After ${from}.`
  const risk = risks[link.risk]
  return `Until ${from} is ${milestoneText(link.milestone)}: ${waitText(link.wait)}. ${risk.charAt(0).toUpperCase()}${risk.slice(1)}.`
}

/** The windows of a link in words, or null: "The window is open from 2 h to 12 h after it." */
export function windowText({ windows }: Pick<ScheduleLinkWire, 'windows'>): string | null {
  if (windows.length === 0) return null
  const parts = windows.map(({ opensMin, shutsMin }) => `${opensMin <= 0 ? 'at once' : `from ${waitSpan(opensMin)}`}${shutsMin === null ? ' onwards' : ` until ${waitSpan(shutsMin)}`}`)
  return `Open ${parts.join(' and ')}.`
}

/** How often a step is done: "3 coats a day on 2 days, until it is enough", or null for once. */
export function roundText({ perDay, days, untilEnough }: Pick<ScheduleStepWire, 'perDay' | 'days' | 'untilEnough'>): string | null {
  if (perDay * days === 1) return untilEnough ? 'until it is enough' : null
  const times = days === 1 ? `${perDay} times` : `${perDay === 1 ? 'once' : `${perDay} times`} a day on ${days} days`
  return untilEnough ? `${times}, until it is enough` : times
}

/** Attended minutes of one going: "5 min to set up, 8 min a piece, 5 min to clean". */
export function minutesText({ setupMin, pieceMin, cleanMin, releaseMin, hands }: Pick<ScheduleStepWire, 'setupMin' | 'pieceMin' | 'cleanMin' | 'releaseMin' | 'hands'>): string {
  return [
    ...setupMin > 0 ? [`${setupMin} min to set up`] : [], `${pieceMin} min a piece`, ...cleanMin > 0 ? [`${cleanMin} min to clean`] : [],
    ...releaseMin > 0 ? [`${releaseMin} min to take it out`] : [], ...hands > 1 ? [`${hands} pairs of hands`] : [],
  ].join(', ')
}

/** What the step leaves lying: "In clamps: likely 40 min, up to 1 h.", or null. */
export function restText({ hold, held, again }: Pick<ScheduleStepWire, 'hold' | 'held' | 'again'>): string | null {
  if (hold && held) return `${holds[hold].charAt(0).toUpperCase()}${holds[hold].slice(1)}: ${waitText(held)}.`
  return again ? `Between its coats: ${waitText(again)}.` : null
}

/** "after 30 min: look over, 3 min". */
export const checkText = ({ name, afterMin, minutes }: ScheduleStepWire['checks'][number]) => `after ${waitSpan(afterMin)}: ${lowerFirst(name)}, ${minutes} min`

/** "15 min and 2 h 10 min a piece". */
export function handsOnText({ setupMin, pieceMin }: { setupMin: number, pieceMin: number }): string {
  return setupMin > 0 ? `${span(setupMin)} a batch and ${span(pieceMin)} a piece` : `${span(pieceMin)} a piece`
}

/** What a step works on: "front and edges of the cover", or the part's name alone. */
export function onText(on: readonly { part: string, faces: readonly string[] }[]): string {
  return on.map(({ part, faces }) => faces.length > 0 ? `${lowerFirst(part)} (${faces.map(lowerFirst).join(', ')})` : lowerFirst(part)).join(', ')
}
