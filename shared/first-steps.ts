import type { StudioState } from '#shared/schemas/piece-state'

export const firstStepKeys = ['rooms', 'places', 'hours', 'materials', 'batch'] as const
export type FirstStepKey = typeof firstStepKeys[number]
/** Steps that come with something usable, so that looking at them is all there is to do. */
export const lookedAt: readonly FirstStepKey[] = ['hours', 'materials']

export interface FirstStep { key: FirstStepKey, done: boolean }

/** What a new studio still lacks, in a good order; any may be done first. `looked`: what was opened to be looked at. */
export function firstSteps(state: Pick<StudioState, 'rooms' | 'places' | 'pieces'>, looked: readonly string[]): FirstStep[] {
  const there: Record<FirstStepKey, boolean> = { rooms: state.rooms.length > 0, places: state.places.length > 0, hours: looked.includes('hours'), materials: looked.includes('materials'), batch: state.pieces.length > 0 }
  return firstStepKeys.map(key => ({ key, done: there[key] }))
}
