import { glueWorkMin } from '#shared/drying/open-time'
import { dryingMaterial, libraryFigure } from '#shared/library/types'
import type { FigureName, LibraryMaterial, LibrarySchedule } from '#shared/library/types'
import type { ScheduleMaterialWire } from '#shared/schemas/schedule'
import type { ScheduleDraft } from '#shared/schemas/schedule-draft'

/** The library's materials numbered from 1, as an editor sees a studio's. */
export function librarySheets(materials: readonly LibraryMaterial[]): ReadonlyMap<number, ScheduleMaterialWire> {
  const least = (material: LibraryMaterial, name: FigureName) => {
    const figure = libraryFigure(material, name)
    return figure?.low ?? figure?.typical ?? null
  }
  return new Map(materials.map((material, at) => [at + 1, {
    id: at + 1, name: material.name, kind: material.kind, glue: material.film === 'joint', solventBorne: !['water', 'none'].includes(material.solvent), drying: dryingMaterial(material),
    recoveries: material.windows.map(({ recovery, recoveryMin }) => (recovery === null ? null : { name: recovery, minutes: recoveryMin })), cautions: [...material.cautions], workMin: glueWorkMin(least(material, 'open time'), least(material, 'closed assembly')),
  }]))
}

/** A schedule of the library as a draft over materials numbered as by `librarySheets`; an unknown one gets a number that nobody has. */
export function libraryDraft(schedule: LibrarySchedule, materials: readonly LibraryMaterial[]): ScheduleDraft {
  const numberOf = (key: string | undefined) => (key === undefined ? null : materials.findIndex(material => material.key === key) + 1 || materials.length + 1)
  return {
    name: schedule.name, summary: schedule.summary,
    parts: schedule.parts.map(({ key, name, grip, faces }) => ({ key, name, grip, faces: faces.map(face => ({ ...face })) })),
    steps: schedule.steps.map(({ material, hold, placeKind, targets, checks, ...step }) => ({
      ...step, materialId: numberOf(material), hold: hold ?? null, placeKind: placeKind ?? null,
      targets: targets.map(({ part, face }) => ({ part, face: face ?? null })), checks: checks.map(check => ({ ...check })),
    })),
    links: schedule.links.map(link => ({ ...link, recovery: null })),
  }
}
