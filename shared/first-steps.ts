export const firstStepKeys = ['rooms', 'places', 'hours', 'materials', 'batch'] as const
export type FirstStepKey = typeof firstStepKeys[number]

export interface FirstStep { key: FirstStepKey, done: boolean }

/** What a new studio still lacks, in a good order; any may be done first. `there`: how many of each the studio has. */
export function firstSteps(there: Readonly<Record<FirstStepKey, number>>): FirstStep[] {
  return firstStepKeys.map(key => ({ key, done: there[key] > 0 }))
}
