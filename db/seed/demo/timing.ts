import { libraryMaterials } from '#shared/library/index'
import { dryingMaterial } from '#shared/library/types'
import { roomClock } from '#shared/drying/clock'
import { prepareMaterial } from '#shared/drying/material'
import { predictCoat } from '#shared/drying/predict'
import type { DryingTools } from '#shared/drying/tools'
import type { CoatCase, RoomAir } from '#shared/drying/types'

const minute = 60_000

/**
 * When a coat must have gone on so that its recoat window shuts at a wanted instant.
 * @param now the instant of the prediction, ms UTC
 * @returns ms UTC, right to a minute; null when no time within a week before makes it so
 */
export function appliedFor(materialKey: string, coat: Omit<CoatCase, 'appliedAt'>, air: RoomAir, wantedShut: number, now: number, tools: DryingTools): number | null {
  const found = libraryMaterials.find(each => each.key === materialKey)
  if (!found) throw new Error(`The library has no material ${materialKey}.`)
  const material = prepareMaterial(dryingMaterial(found), tools)
  const earliest = now - 7 * 24 * 60 * minute
  const clock = roomClock(air, earliest, tools)
  const shutsAt = (appliedAt: number) => predictCoat(material, { ...coat, appliedAt }, [{ clock, fromAt: appliedAt, toAt: null }], { now }).windows[0]?.shutsAt ?? Infinity
  let early = earliest
  let late = now
  if (shutsAt(early) > wantedShut || shutsAt(late) < wantedShut) return null
  while (late - early > minute) {
    const middle = Math.round((early + late) / 2)
    if (shutsAt(middle) > wantedShut) late = middle
    else early = middle
  }
  return early
}
