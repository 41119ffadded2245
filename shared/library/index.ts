import { groundMaterials } from '#shared/library/materials/grounds'
import { lacquerMaterials } from '#shared/library/materials/lacquers'
import { otherGlueMaterials } from '#shared/library/materials/other-glues'
import { paintMaterials } from '#shared/library/materials/paints'
import { sizeMaterials } from '#shared/library/materials/sizes'
import { varnishMaterials } from '#shared/library/materials/varnishes'
import { waterGlueMaterials } from '#shared/library/materials/water-glues'
import { librarySchedules } from '#shared/library/schedules'
import type { LibraryMaterial, LibrarySchedule } from '#shared/library/types'

export { librarySchedules }

/** Every material of the starter library. */
export const libraryMaterials: readonly LibraryMaterial[] = [
  ...groundMaterials, ...paintMaterials, ...varnishMaterials, ...lacquerMaterials, ...sizeMaterials, ...waterGlueMaterials, ...otherGlueMaterials,
]

/** A library material by key, or null. */
export function findLibraryMaterial(key: string): LibraryMaterial | null {
  return libraryMaterials.find(material => material.key === key) ?? null
}

/** A library finishing schedule by key, or null. */
export function findLibrarySchedule(key: string): LibrarySchedule | null {
  return librarySchedules.find(schedule => schedule.key === key) ?? null
}
