import type { MorningQuestion } from '#shared/morning'
import { clockTime } from '#shared/time'
import type { Clock } from '#shared/time'
import { titled } from '#shared/words/steps'

/** Asked the next day about a tap that was forgotten. */
export const morningWords = {
  title: 'Nobody said how this ended',
  yes: (time: string) => `Yes, about ${time}`,
  other: 'At another time',
  notFinished: 'Did not finish',
  notOn: 'It did not go on',
} as const

/** "Yesterday 16:50 Mara began “Second varnish”, Ledgers 1–6. Finished about 17:40?" */
export function morningText({ job, by, beganAt, guessAt }: MorningQuestion, names: string, clock: Clock): string {
  const step = titled(job.turn.step.name)
  const guess = clockTime(guessAt, clock)
  return by === null ? `${step}, ${names}, was due ${clockTime(beganAt, clock)}. Did it go on, about ${guess}?` : `${by} began ${step}, ${names}, ${clockTime(beganAt, clock)}. Finished about ${guess}?`
}
