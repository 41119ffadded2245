import { inGraphOrder } from '#shared/schedule-walk'
import { linkBetween, mendedLink } from '#shared/schedules/link'
import type { Sheets } from '#shared/schedules/link'
import { meet, stepsAfter, surfacesOf } from '#shared/schedules/graph'
import type { DraftLink, DraftStep, ScheduleDraft } from '#shared/schemas/schedule-draft'
import { leavesFilm, usualDust } from '#shared/step-kinds'
import { nameApart, stepNameOf } from '#shared/words/schedule-names'
import type { StepKind } from '#shared/terms'

// Every function returns a new draft and leaves the given one as it was, so that an edit can be undone.

/** A key that nobody has yet, made from words: "first-coat", "first-coat-2". */
export function freeKey(words: string, taken: readonly string[]): string {
  const stem = words.toLowerCase().normalize('NFKD').replace(/[^a-z0-9]+/g, '-').replace(/^-+|-+$/g, '').slice(0, 32).replace(/-+$/, '') || 'item'
  for (let no = 1; ; no++) {
    const key = no === 1 ? stem : `${stem}-${no}`
    if (!taken.includes(key)) return key
  }
}

/** Minutes of set-up, each piece, cleaning and taking out, where nobody has said any (planning values). */
const usualMinutes: Record<StepKind, readonly [setup: number, piece: number, clean: number, release: number]> = {
  'coat': [5, 8, 5, 0], 'glue-up': [10, 10, 5, 2], 'light sanding': [5, 6, 5, 0], 'flat sanding': [5, 15, 10, 0], 'levelling': [5, 10, 5, 0],
  'turn over': [2, 2, 0, 0], 'bench work': [5, 10, 5, 0], 'packing': [5, 5, 5, 0],
}

/** A step of a kind with everything at rest: one time, one pair of hands, no checks; a glue-up in clamps. */
export function freshStep(draft: ScheduleDraft, given: Pick<DraftStep, 'kind' | 'materialId' | 'targets'> & Partial<DraftStep>, sheets: Sheets): DraftStep {
  const { kind, materialId } = given
  const [setupMin, pieceMin, cleanMin, releaseMin] = usualMinutes[kind]
  const like = draft.steps.findLast(step => step.kind === kind && step.materialId === materialId)
  const minutes = like ? { setupMin: like.setupMin, pieceMin: like.pieceMin, cleanMin: like.cleanMin, releaseMin: like.releaseMin, ground: like.ground, placeKind: like.placeKind } : { setupMin, pieceMin, cleanMin, releaseMin }
  const name = nameApart(stepNameOf(kind, sheets.get(materialId ?? 0)?.name ?? null), draft.steps.map(step => step.name))
  const glues = kind === 'glue-up'
  const step: DraftStep = {
    key: '', name, coatSize: 'normal', ground: 'primed', hold: glues ? 'clamps' : null, placeKind: glues ? 'clamps' : null, perDay: 1, days: 1, untilEnough: false,
    hands: 1, dust: usualDust[kind], mayRunOver: false, checks: [], ...minutes, ...given,
  }
  return { ...step, targets: fittingTargets(step), key: given.key ?? freeKey(step.name, draft.steps.map(each => each.key)) }
}

/** A glue line lies between parts, so it names them and no face. */
function fittingTargets({ kind, targets }: Pick<DraftStep, 'kind' | 'targets'>): DraftStep['targets'] {
  return kind === 'glue-up' ? [...new Set(targets.map(target => target.part))].map(part => ({ part, face: null })) : targets
}

/** The steps next to a place in the list on the same faces: for each face the last before it, or the first after it. */
function neighbours(draft: ScheduleDraft, step: DraftStep, others: readonly DraftStep[]): DraftStep[] {
  const found = new Set<DraftStep>()
  for (const surface of surfacesOf(step, draft.parts)) {
    const near = others.find(each => surfacesOf(each, draft.parts).includes(surface))
    if (near) found.add(near)
  }
  return [...found]
}

/** Whether every face two steps share is one that a third works on too: then the third stands between them. */
function covered(draft: ScheduleDraft, a: DraftStep, b: DraftStep, between: DraftStep): boolean {
  const middle = surfacesOf(between, draft.parts)
  const second = surfacesOf(b, draft.parts)
  return surfacesOf(a, draft.parts).every(surface => !second.includes(surface) || middle.includes(surface))
}

/**
 * Puts a step in at a place of the list. It waits for the step before it on each of its faces, and the next on each waits
 * for it; a wait that went past it goes through it now.
 * @param remembered waits the step had before: those that still make sense are kept as they were
 */
export function insertStep(draft: ScheduleDraft, step: DraftStep, at: number, sheets: Sheets, remembered: readonly DraftLink[] = []): ScheduleDraft {
  const befores = neighbours(draft, step, draft.steps.slice(0, at).reverse())
  const afters = neighbours(draft, step, draft.steps.slice(at))
  const kept = draft.links.filter(({ from, to }) => {
    const before = befores.find(each => each.key === from)
    const after = afters.find(each => each.key === to)
    return !before || !after || !covered(draft, before, after, step)
  })
  const proposed = [...befores.map(each => linkBetween(each, step, sheets)), ...afters.map(each => linkBetween(step, each, sheets))]
  const made = proposed.map(link => remembered.find(each => each.from === link.from && each.to === link.to) ?? link)
  const others = remembered.filter(link => !made.some(each => each.from === link.from && each.to === link.to) && stillMeant(draft, step, at, link))
  return { ...draft, steps: [...draft.steps.slice(0, at), step, ...draft.steps.slice(at)], links: [...kept, ...made, ...others] }
}

/** A wait between steps that share no face was somebody's own wish; it stays while it does not run backwards. */
function stillMeant(draft: ScheduleDraft, step: DraftStep, at: number, link: DraftLink): boolean {
  const place = draft.steps.findIndex(each => each.key === (link.from === step.key ? link.to : link.from))
  const other = draft.steps[place]
  if (!other || meet(other, step, draft.parts)) return false
  return link.to === step.key ? place < at : place >= at
}

/** Takes a step out; what waited for it waits for what it waited for. */
export function removeStep(draft: ScheduleDraft, key: string, sheets: Sheets): ScheduleDraft {
  const steps = draft.steps.filter(step => step.key !== key)
  const links = draft.links.filter(link => link.from !== key && link.to !== key)
  for (const before of draft.links.filter(link => link.to === key)) {
    for (const after of draft.links.filter(link => link.from === key)) {
      const from = steps.find(step => step.key === before.from)
      const to = steps.find(step => step.key === after.to)
      if (from && to && !stepsAfter(links, from.key).has(to.key)) links.push(linkBetween(from, to, sheets))
    }
  }
  return { ...draft, steps, links }
}

/** Takes a step out and puts it in again elsewhere, with its own waits where they still make sense. */
function reposition(draft: ScheduleDraft, step: DraftStep, at: number, sheets: Sheets): ScheduleDraft {
  const own = draft.links.filter(link => link.from === step.key || link.to === step.key)
  const without = removeStep(draft, step.key, sheets)
  const bridges = without.links.filter(link => !draft.links.some(each => each.from === link.from && each.to === link.to))
  const placed = insertStep(without, step, at, sheets, own)
  const goes = (from: string, to: string) => placed.links.some(link => link.from === from && link.to === to)
  const bridged = (link: DraftLink) => {
    const from = draft.steps.find(each => each.key === link.from)
    const to = draft.steps.find(each => each.key === link.to)
    return from !== undefined && to !== undefined && bridges.includes(link) && goes(from.key, step.key) && goes(step.key, to.key) && covered(draft, from, to, step)
  }
  return { ...placed, links: placed.links.filter(link => !bridged(link)) }
}

/** Moves a step one or more places up (negative) or down the list; past the ends it stays. */
export function moveStep(draft: ScheduleDraft, key: string, by: number, sheets: Sheets): ScheduleDraft {
  const at = draft.steps.findIndex(step => step.key === key)
  const step = draft.steps[at]
  const to = Math.min(draft.steps.length - 1, Math.max(0, at + by))
  return !step || to === at ? draft : reposition(draft, step, to, sheets)
}

/** A second of its like right after a step, with a key and a name of its own. */
export function copyStep(draft: ScheduleDraft, key: string, sheets: Sheets): { draft: ScheduleDraft, key: string } {
  const at = draft.steps.findIndex(step => step.key === key)
  const step = draft.steps[at]
  if (!step) return { draft, key }
  const name = nameApart(step.name, draft.steps.map(each => each.name))
  const copy = { ...step, name, key: freeKey(name, draft.steps.map(each => each.key)), targets: step.targets.map(target => ({ ...target })), checks: step.checks.map(check => ({ ...check })) }
  return { draft: insertStep(draft, copy, at + 1, sheets), key: copy.key }
}

/** Changes a step. New faces find their waits anew; of a new kind or material the waits that no longer fit are proposed anew. */
export function changeStep(draft: ScheduleDraft, key: string, patch: Partial<DraftStep>, sheets: Sheets): ScheduleDraft {
  const at = draft.steps.findIndex(step => step.key === key)
  const old = draft.steps[at]
  if (!old) return draft
  const step = refitted(old, { ...old, ...patch }, draft, sheets)
  const changed = { ...draft, steps: draft.steps.map(each => (each.key === key ? step : each)) }
  if (surfacesOf(step, draft.parts).join() !== surfacesOf(old, draft.parts).join()) return reposition(changed, step, at, sheets)
  if (step.kind === old.kind && step.materialId === old.materialId) return changed
  return { ...changed, links: changed.links.map((link) => {
    const other = changed.steps.find(each => each.key === (link.from === key ? link.to : link.from))
    if (!other || (link.from !== key && link.to !== key)) return link
    if (link.from === key) return mendedLink(link, step, other, sheets)
    return step.kind === old.kind ? link : linkBetween(other, step, sheets)
  }) }
}

/** What follows from a new kind or material: the name while nobody has given one, the hold, the dust while it is the usual one, the faces of a glue-up. */
function refitted(old: DraftStep, wanted: DraftStep, draft: ScheduleDraft, sheets: Sheets): DraftStep {
  const lays = leavesFilm(wanted.kind)
  const step = { ...wanted, materialId: lays ? wanted.materialId : null }
  if (step.kind === old.kind && step.materialId === old.materialId) return { ...step, targets: fittingTargets(step) }
  const others = draft.steps.filter(each => each.key !== old.key)
  const called = (each: DraftStep) => stepNameOf(each.kind, sheets.get(each.materialId ?? 0)?.name ?? null)
  const unnamed = old.name === '' || old.name.startsWith(called(old))
  if (unnamed && wanted.name === old.name) step.name = nameApart(called(step), others.map(each => each.name))
  if (old.dust === usualDust[old.kind] && wanted.dust === old.dust) step.dust = usualDust[step.kind]
  if (step.kind !== old.kind) Object.assign(step, step.kind === 'glue-up' ? { hold: 'clamps', placeKind: 'clamps', releaseMin: Math.max(2, step.releaseMin) } : { hold: null, releaseMin: 0, placeKind: old.kind === 'glue-up' ? null : step.placeKind })
  return { ...step, targets: fittingTargets(step) }
}

/** Adds a wait, or changes the one there is; the list is put in the order of the waits again. */
export function setLink(draft: ScheduleDraft, link: DraftLink): ScheduleDraft {
  const links = [...draft.links.filter(each => each.from !== link.from || each.to !== link.to), link]
  return { ...draft, links, steps: inGraphOrder(draft.steps, links) }
}

/** Takes a wait away. */
export function removeLink(draft: ScheduleDraft, from: string, to: string): ScheduleDraft {
  return { ...draft, links: draft.links.filter(link => link.from !== from || link.to !== to) }
}
