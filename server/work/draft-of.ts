import type { ScheduleEdition } from '~~/server/work/schedule'
import type { ScheduleDraft } from '#shared/schemas/schedule-draft'

/** An edition as a draft: the same by key, without row numbers, so that editions and drafts compare. */
export function draftOf(name: string, summary: string, edition: ScheduleEdition): ScheduleDraft {
  return {
    name, summary,
    parts: edition.parts.map(part => ({ key: part.key, name: part.name, grip: part.grip, faces: part.faces.map(face => ({ key: face.key, name: face.name })) })),
    steps: edition.steps.map(step => ({
      key: step.key, name: step.name, kind: step.kind, materialId: step.materialId, coatSize: step.coatSize, ground: step.ground, hold: step.hold, placeKind: step.placeKind,
      perDay: step.perDay, days: step.days, untilEnough: step.untilEnough, setupMin: step.setupMin, pieceMin: step.pieceMin, cleanMin: step.cleanMin, releaseMin: step.releaseMin,
      hands: step.hands, dust: step.dust, mayRunOver: step.mayRunOver,
      targets: step.targets.map(target => ({ part: target.partKey, face: target.faceKey })),
      checks: step.checks.map(check => ({ name: check.name, afterMin: check.afterMin, minutes: check.minutes })),
    })),
    links: edition.links,
  }
}
