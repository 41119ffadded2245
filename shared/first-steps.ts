import type { Stretch } from '#shared/schemas/hours'

export const firstStepKeys = ['rooms', 'places', 'hours', 'materials', 'batch'] as const
export type FirstStepKey = typeof firstStepKeys[number]

/** `as it came`: filled by us, and nobody has changed it; it may fit, but only somebody of the studio knows. */
export interface FirstStep { key: FirstStepKey, state: 'open' | 'as it came' | 'done' }

/** The hours that a new studio is given: Monday to Friday, 9:00 to 17:00. */
export const usualHours: readonly Stretch[] = [1, 2, 3, 4, 5].map(weekday => ({ weekday, fromMin: 9 * 60, toMin: 17 * 60 }))

const isUsual = (hours: readonly Stretch[]) => hours.length === usualHours.length
  && usualHours.every(usual => hours.some(each => each.weekday === usual.weekday && each.fromMin === usual.fromMin && each.toMin === usual.toMin))

export interface WhatIsThere {
  rooms: number
  places: number
  pieces: number
  hours: readonly Stretch[]
  /** Materials that are the studio's own, or a library's with figures of its own. */
  ownMaterials: number
}

/** What a new studio still lacks, in a good order; any may be done first. */
export function firstSteps(there: WhatIsThere): FirstStep[] {
  const counted = (count: number) => count > 0 ? 'done' : 'open'
  const states: Record<FirstStepKey, FirstStep['state']> = {
    rooms: counted(there.rooms),
    places: counted(there.places),
    hours: there.hours.length === 0 ? 'open' : isUsual(there.hours) ? 'as it came' : 'done',
    materials: there.ownMaterials > 0 ? 'done' : 'as it came',
    batch: counted(there.pieces),
  }
  return firstStepKeys.map(key => ({ key, state: states[key] }))
}
