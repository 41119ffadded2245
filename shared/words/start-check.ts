import type { PushedBatch, StartPlan } from '#shared/schemas/promise'
import { clockTime, roughTime, span } from '#shared/time'
import type { Clock } from '#shared/time'
import { titled } from '#shared/words/steps'

/** What the comparison of starts says. */
export const startCheckWords = {
  open: 'Compare starts: now, later, tomorrow, best',
  waiting: 'Planning each start on a copy of the studio',
  failed: 'The starts could not be compared. Nothing was changed.',
  needs: 'Choose a schedule, how many pieces and a place: then starts can be compared.',
  again: 'Compare again',
  choose: 'Start then',
  chosen: 'Chosen',
  note: 'Each is planned with all that is under way. Nothing is kept before you start.',
} as const

const names: Record<StartPlan['start'], string> = { now: 'Now', afternoon: 'This afternoon', opening: 'At the next opening', best: 'Best' }

/** "Best: Wed 8:30". */
export const startName = ({ start, startsAt }: StartPlan, clock: Clock) => (start === 'now' ? names.now : `${names[start]}: ${clockTime(startsAt, clock)}`)

/** "Start now", for one who hears only the key. */
export const chooseText = (plan: StartPlan, clock: Clock) => `${startCheckWords.choose}: ${startName(plan, clock)}`

const finishText = ({ endsAt, without }: StartPlan, clock: Clock) =>
  endsAt === null || without > 0 ? `${without === 1 ? 'One step finds' : `${without} steps find`} no time.` : `Last hand on it ${roughTime(endsAt, clock, 'up', Math.min(Math.abs(endsAt - clock.now), 6 * 86_400_000))}.`

const shutText = ({ step, opensAt, shutsAt }: StartPlan['missed'][number], clock: Clock) => `The window for ${titled(step)}, ${clockTime(opensAt, clock)} to ${clockTime(shutsAt, clock)}, shuts with nobody at it.`

const handsText = ({ hands }: StartPlan) => hands.minutes === 0 ? [] : [`${hands.most === 1 ? 'One person' : `${hands.most} people`} at the most at once, ${hands.minutes < 600 ? span(hands.minutes) : `${Math.round(hands.minutes / 60)} h`} of hands in all.`]

function pushText({ name, minutes, past }: PushedBatch): string {
  const late = minutes < 48 * 60 ? span(Math.round(minutes / 15) * 15) : `${Math.round(minutes / 720) / 2} days`
  return `${name} ends ${late} later${past === 'promise' ? ', past what was promised' : past === 'date' ? ', past its date' : past === 'late already' ? ', and is late already' : ''}.`
}

/** What a start would mean, one sentence each: when it ends, what would be missed, whose hands, whom it pushes. `warns` marks what speaks against it. */
export function startLines(plan: StartPlan, clock: Clock): { says: string, warns: boolean }[] {
  const shown = plan.pushes.slice(0, 3)
  const more = plan.pushes.length - shown.length
  return [
    ...plan.closed ? [{ says: 'Nobody works at that hour.', warns: true }] : [],
    { says: finishText(plan, clock), warns: plan.endsAt === null || plan.without > 0 },
    ...plan.missed.map(each => ({ says: shutText(each, clock), warns: true })),
    ...plan.missed.length === 0 && plan.endsAt !== null ? [{ says: 'No window of it shuts unused.', warns: false }] : [],
    ...handsText(plan).map(says => ({ says, warns: false })),
    ...shown.map(each => ({ says: pushText(each), warns: each.past !== null })),
    ...more > 0 ? [{ says: `${more === 1 ? 'One more batch ends' : `${more} more batches end`} later.`, warns: plan.pushes.slice(3).some(each => each.past !== null) }] : [],
    ...plan.pushes.length === 0 && plan.endsAt !== null ? [{ says: 'Nothing else ends later.', warns: false }] : [],
  ]
}
