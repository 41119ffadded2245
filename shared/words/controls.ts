/** What the base controls say by themselves. Screens give the rest. */
export const controlWords = {
  working: 'One moment',
  tryAgain: 'Try again',
  close: 'Close',
  cancel: 'Leave it',
  less: 'less',
  more: 'more',
  choose: 'Choose',
  optional: 'may stay empty',
  on: 'on',
  off: 'off',
  caution: 'Caution.',
  moreCautions: (count: number) => count === 1 ? '1 more caution' : `${count} more cautions`,
  note: 'Note.',
  when: 'When',
  timeNow: 'now',
  timeAgo: 'ago',
  timeMinutes: 'min',
  timeOther: 'other',
  timeDay: 'Day',
  timeClock: 'Time',
  timeWanted: 'Give the time it was done.',
  timeWrong: 'Time: give hours and minutes, such as 13:40, not later than now.',
  dayWrong: (back: number) => `Day: give today or ${back === 1 ? 'yesterday' : `one of the ${back} days before`}.`,
} as const

/** "10 min ago"; for a screen reader as for the eye. */
export function minutesAgo(minutes: number): string {
  return minutes === 0 ? controlWords.timeNow : `${minutes} ${controlWords.timeMinutes} ${controlWords.timeAgo}`
}

/** "Warmth: less": the name of a stepper's key. */
export function stepName(direction: 'less' | 'more', label: string): string {
  return `${label}: ${direction}`
}
