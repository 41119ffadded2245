import { driverRate } from '#shared/drying/rates'
import type { Air, DryingMaterial } from '#shared/drying/types'
import type { Driver } from '#shared/terms'

/** What carries glue that has been spread: the driver of the rung within which `minutes` of its sheet lie, of the last one past the ladder; null without a ladder. */
export function openDriver({ milestones }: Pick<DryingMaterial, 'milestones'>, minutes: number): Driver | null {
  return (milestones.find(rung => minutes <= rung.typical) ?? milestones.at(-1))?.driver ?? null
}

/** Minutes from spreading glue to the last in which a joint can be moved: its open time, and its closed assembly where the sheet has one; null where the sheet gives no open time. */
export function glueWorkMin(openMin: number | null, closedMin: number | null): number | null {
  return openMin === null ? null : openMin + (closedMin ?? 0)
}

/**
 * How long spread glue can still be joined in some air, in minutes, from its sheet's minutes: on the clock of the rung they lie
 * within, as the ends of a recoat window are. Cold slows it and no more: what stops under its minimum temperature is its strength,
 * not its skin. Infinity where the air takes up nothing. RangeError for `minutes` of 0 or less, NaN included, and for air outside of
 * -40..70 °C or 0..1.
 */
export function openTimeAt(minutes: number, material: Pick<DryingMaterial, 'milestones' | 'reference'>, air: Air): number {
  if (!(minutes > 0)) throw new RangeError(`minutes: expected more than 0, got ${minutes}`)
  const driver = openDriver(material, minutes)
  return driver === null ? minutes : minutes / driverRate(driver, air, material.reference)
}
