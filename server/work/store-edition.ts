import { scheduleCheck, scheduleFace, scheduleLink, schedulePart, scheduleStep, scheduleStepTarget, scheduleVersion } from '~~/db/schema'
import type { Transaction } from '~~/server/utils/database'
import type { ScheduleDraft } from '#shared/schemas/schedule-draft'

interface Surfaces { parts: Map<string, number>, faces: Map<string, number> }

function storeParts(tx: Transaction, studioId: number, versionId: number, draft: ScheduleDraft): Surfaces {
  const parts = new Map<string, number>()
  const faces = new Map<string, number>()
  for (const { key, name, grip, faces: own } of draft.parts) {
    const partId = tx.insert(schedulePart).values({ studioId, versionId, key, name, grip: grip === '' ? null : grip }).returning({ id: schedulePart.id }).get().id
    parts.set(key, partId)
    for (const face of own) faces.set(`${key}.${face.key}`, tx.insert(scheduleFace).values({ studioId, partId, ...face }).returning({ id: scheduleFace.id }).get().id)
  }
  return { parts, faces }
}

function storeSteps(tx: Transaction, studioId: number, versionId: number, draft: ScheduleDraft, { parts, faces }: Surfaces): Map<string, number> {
  const ids = new Map<string, number>()
  draft.steps.forEach(({ targets, checks, ...step }, ordinal) => {
    const stepId = tx.insert(scheduleStep).values({ studioId, versionId, ordinal, ...step }).returning({ id: scheduleStep.id }).get().id
    ids.set(step.key, stepId)
    const on = targets.map(({ part, face }) => ({ studioId, stepId, partId: parts.get(part) ?? 0, faceId: face === null ? null : faces.get(`${part}.${face}`) ?? 0 }))
    if (on.length > 0) tx.insert(scheduleStepTarget).values(on).run()
    if (checks.length > 0) tx.insert(scheduleCheck).values(checks.map((check, at) => ({ studioId, stepId, ordinal: at, ...check }))).run()
  })
  return ids
}

/**
 * Writes a draft that holds together as an edition of its own; nothing of an earlier edition is touched.
 * @returns the number of the edition's row
 */
export function storeEdition(tx: Transaction, studioId: number, scheduleId: number, no: number, draft: ScheduleDraft): number {
  const versionId = tx.insert(scheduleVersion).values({ studioId, scheduleId, no, summary: draft.summary }).returning({ id: scheduleVersion.id }).get().id
  const steps = storeSteps(tx, studioId, versionId, draft, storeParts(tx, studioId, versionId, draft))
  const links = draft.links.map(({ from, to, recovery, ...link }) => ({ studioId, fromStepId: steps.get(from) ?? 0, toStepId: steps.get(to) ?? 0, ...link, recovery: recovery?.name ?? null, recoveryMin: recovery?.minutes ?? null }))
  if (links.length > 0) tx.insert(scheduleLink).values(links).run()
  return versionId
}
