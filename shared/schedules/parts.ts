import { changeStep, freeKey, removeStep } from '#shared/schedules/edit'
import type { Sheets } from '#shared/schedules/link'
import type { DraftPart, ScheduleDraft } from '#shared/schemas/schedule-draft'

/** Adds a part. `meetsAt` names the step that joins it to the rest, which then works on it too: there the branches meet. */
export function addPart(draft: ScheduleDraft, given: { name: string, meetsAt: string | null }, sheets: Sheets): ScheduleDraft {
  const part: DraftPart = { key: freeKey(given.name, draft.parts.map(each => each.key)), name: given.name, grip: null, faces: [] }
  const added = { ...draft, parts: [...draft.parts, part] }
  const step = added.steps.find(each => each.key === given.meetsAt)
  return step ? changeStep(added, step.key, { targets: [...step.targets, { part: part.key, face: null }] }, sheets) : added
}

/** Where a step more of a part's own branch belongs in the list: after its last one, else before the step where it meets the rest, else at the end. */
export function branchEnd({ steps }: ScheduleDraft, partKey: string): number {
  const alone = steps.findLastIndex(step => step.targets.length > 0 && step.targets.every(target => target.part === partKey))
  if (alone >= 0) return alone + 1
  const meeting = steps.findIndex(step => step.targets.some(target => target.part === partKey))
  return meeting >= 0 ? meeting : steps.length
}

/** Renames a part or says where to hold it. */
export function changePart(draft: ScheduleDraft, key: string, patch: Partial<Pick<DraftPart, 'name' | 'grip'>>): ScheduleDraft {
  return { ...draft, parts: draft.parts.map(part => (part.key === key ? { ...part, ...patch } : part)) }
}

/** Takes a part away, with the steps that worked on nothing else. */
export function removePart(draft: ScheduleDraft, key: string, sheets: Sheets): ScheduleDraft {
  const alone = draft.steps.filter(step => step.targets.length > 0 && step.targets.every(target => target.part === key))
  const shorter = alone.reduce((left, step) => removeStep(left, step.key, sheets), draft)
  const dropped = shorter.steps.filter(step => step.targets.some(target => target.part === key))
    .reduce((left, step) => changeStep(left, step.key, { targets: step.targets.filter(target => target.part !== key) }, sheets), shorter)
  return { ...dropped, parts: dropped.parts.filter(part => part.key !== key) }
}

/** Gives a part a face more. The first face of a part takes over nothing: steps on the whole part stay on the whole part. */
export function addFace(draft: ScheduleDraft, partKey: string, name: string): ScheduleDraft {
  return { ...draft, parts: draft.parts.map(part => (part.key === partKey ? { ...part, faces: [...part.faces, { key: freeKey(name, part.faces.map(face => face.key)), name }] } : part)) }
}

/** Renames a face. */
export function renameFace(draft: ScheduleDraft, partKey: string, faceKey: string, name: string): ScheduleDraft {
  return { ...draft, parts: draft.parts.map(part => (part.key === partKey ? { ...part, faces: part.faces.map(face => (face.key === faceKey ? { ...face, name } : face)) } : part)) }
}

/** Takes a face away, and the steps that worked on nothing else. */
export function removeFace(draft: ScheduleDraft, partKey: string, faceKey: string, sheets: Sheets): ScheduleDraft {
  const on = (target: { part: string, face: string | null }) => target.part === partKey && target.face === faceKey
  const alone = draft.steps.filter(step => step.targets.length > 0 && step.targets.every(on))
  const shorter = alone.reduce((left, step) => removeStep(left, step.key, sheets), draft)
  const dropped = shorter.steps.filter(step => step.targets.some(on)).reduce((left, step) => changeStep(left, step.key, { targets: step.targets.filter(target => !on(target)) }, sheets), shorter)
  return { ...dropped, parts: dropped.parts.map(part => (part.key === partKey ? { ...part, faces: part.faces.filter(face => face.key !== faceKey) } : part)) }
}

/** A schedule with one part and nothing to do yet. */
export const emptyDraft = (name: string, part: { name: string, faces: readonly string[] }): ScheduleDraft => ({
  name, summary: '', steps: [], links: [],
  parts: [{ key: freeKey(part.name, []), name: part.name, grip: null, faces: part.faces.map(face => ({ key: freeKey(face, []), name: face })) }],
})
