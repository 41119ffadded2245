import { closedAirChanges } from '#shared/vapour/airflow'
import { airChanges, flowFromHalfLife } from '#shared/vapour/build-up'

/** How the windows stand. */
export const windowStates = ['shut', 'one', 'cross'] as const
export type WindowState = typeof windowStates[number]

/**
 * Air changes an hour by how the windows stand, each on the low side: shut is the median of measured houses, one ajar the median of one room with what
 * comes from the others, open on two sides a planning value for a still day.
 */
export const changesByWindows: Record<WindowState, number> = { shut: closedAirChanges, one: 0.6, cross: 2 }

/** Air changes an hour from what a fan was measured to move. m3/h and m3. */
export const changesByFan = (flowM3PerHour: number, volumeM3: number) => airChanges(flowM3PerHour, volumeM3)

/** Air changes an hour from the minutes in which a puff of something harmless falls to half: n = ln 2 / t, whatever the volume. */
export const changesByPuff = (halfLifeMinutes: number) => flowFromHalfLife(1, halfLifeMinutes / 60)
