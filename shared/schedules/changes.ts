import type { DraftLink, DraftStep, ScheduleDraft } from '#shared/schemas/schedule-draft'

export type StepField = 'name' | 'kind' | 'material' | 'faces' | 'size' | 'ground' | 'held' | 'place' | 'round' | 'minutes' | 'hands' | 'dust' | 'checks' | 'run over'

/** One difference between two editions. `of` and `after` are names as the newer edition has them, or the older one where it is gone. */
export type ScheduleChange =
  | { code: 'summary' | 'order' }
  | { code: 'part added' | 'part gone' | 'part changed' | 'step added' | 'step gone', of: string }
  | { code: 'step changed', of: string, was: string, fields: StepField[] }
  | { code: 'wait added' | 'wait gone' | 'wait changed', of: string, after: string }

const same = (a: unknown, b: unknown) => JSON.stringify(a) === JSON.stringify(b)

/** What of a step a field of the list speaks of. */
const read: Record<StepField, (step: DraftStep) => unknown> = {
  'name': step => step.name, 'kind': step => step.kind, 'material': step => step.materialId,
  'faces': step => step.targets.map(({ part, face }) => `${part}.${face ?? ''}`).sort(), 'size': step => step.coatSize, 'ground': step => step.ground, 'held': step => step.hold,
  'place': step => step.placeKind, 'round': step => [step.perDay, step.days, step.untilEnough], 'minutes': step => [step.setupMin, step.pieceMin, step.cleanMin, step.releaseMin],
  'hands': step => step.hands, 'dust': step => step.dust, 'checks': step => step.checks, 'run over': step => step.mayRunOver,
}
const fields = Object.keys(read) as StepField[]

function stepChanges(before: ScheduleDraft, after: ScheduleDraft): ScheduleChange[] {
  const gone = before.steps.filter(step => !after.steps.some(each => each.key === step.key)).map(step => ({ code: 'step gone' as const, of: step.name }))
  const others = after.steps.flatMap((step): ScheduleChange[] => {
    const old = before.steps.find(each => each.key === step.key)
    if (!old) return [{ code: 'step added', of: step.name }]
    const changed = fields.filter(field => !same(read[field](old), read[field](step)))
    return changed.length > 0 ? [{ code: 'step changed', of: step.name, was: old.name, fields: changed }] : []
  })
  const kept = (draft: ScheduleDraft, other: ScheduleDraft) => draft.steps.map(step => step.key).filter(key => other.steps.some(step => step.key === key))
  return [...gone, ...others, ...same(kept(before, after), kept(after, before)) ? [] : [{ code: 'order' as const }]]
}

function partChanges(before: ScheduleDraft, after: ScheduleDraft): ScheduleChange[] {
  return [
    ...before.parts.filter(part => !after.parts.some(each => each.key === part.key)).map(part => ({ code: 'part gone' as const, of: part.name })),
    ...after.parts.flatMap((part): ScheduleChange[] => {
      const old = before.parts.find(each => each.key === part.key)
      if (!old) return [{ code: 'part added', of: part.name }]
      return same(old, part) ? [] : [{ code: 'part changed', of: part.name }]
    }),
  ]
}

function linkChanges(before: ScheduleDraft, after: ScheduleDraft): ScheduleChange[] {
  const nameOf = (draft: ScheduleDraft, key: string) => draft.steps.find(step => step.key === key)?.name ?? key
  const find = (draft: ScheduleDraft, link: DraftLink) => draft.links.find(each => each.from === link.from && each.to === link.to)
  // A step that came or went brought or took its waits with it: that is said once, by the step.
  const both = ({ from, to }: DraftLink) => [from, to].every(key => [before, after].every(draft => draft.steps.some(step => step.key === key)))
  return [
    ...before.links.filter(link => both(link) && !find(after, link)).map(link => ({ code: 'wait gone' as const, of: nameOf(after, link.to), after: nameOf(after, link.from) })),
    ...after.links.filter(both).flatMap((link): ScheduleChange[] => {
      const old = find(before, link)
      const said = { of: nameOf(after, link.to), after: nameOf(after, link.from) }
      if (!old) return [{ code: 'wait added', ...said }]
      return old.milestone === link.milestone && old.risk === link.risk && old.windowed === link.windowed && same(old.recovery, link.recovery) ? [] : [{ code: 'wait changed', ...said }]
    }),
  ]
}

/** What changed from one edition to the next, by key: parts, steps, waits, order. Empty when nothing did. */
export function scheduleChanges(before: ScheduleDraft, after: ScheduleDraft): ScheduleChange[] {
  return [...before.summary === after.summary ? [] : [{ code: 'summary' as const }], ...partChanges(before, after), ...stepChanges(before, after), ...linkChanges(before, after)]
}
