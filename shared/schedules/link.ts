import { leavesFilm } from '#shared/step-kinds'
import type { ScheduleMaterialWire } from '#shared/schemas/schedule'
import type { DraftLink, DraftStep } from '#shared/schemas/schedule-draft'
import type { MilestoneName, Risk, StepKind } from '#shared/terms'

/** The studio's materials by number. */
export type Sheets = ReadonlyMap<number, ScheduleMaterialWire>

/** The material of a step that leaves a film, or null. */
export function sheetOf(step: Pick<DraftStep, 'kind' | 'materialId'>, sheets: Sheets): ScheduleMaterialWire | null {
  return leavesFilm(step.kind) && step.materialId !== null ? sheets.get(step.materialId) ?? null : null
}

/** What a step's film must have come to before the next begins, the best word first; which is there depends on the ladder. */
const wantedBy: Record<StepKind, { rungs: readonly MilestoneName[], risk: Risk }> = {
  'coat': { rungs: ['ready-to-recoat', 'dry-to-sand-lightly', 'dry-to-sand-flat', 'cured', 'at-tack', 'dry-to-handle', 'full-strength'], risk: 'p90' },
  'glue-up': { rungs: ['dry-to-sand-flat', 'cured', 'dry-to-sand-lightly', 'ready-to-recoat', 'dry-to-handle', 'full-strength'], risk: 'p98' },
  'light sanding': { rungs: ['dry-to-sand-lightly', 'dry-to-sand-flat', 'ready-to-recoat', 'cured', 'full-strength'], risk: 'likely' },
  'flat sanding': { rungs: ['dry-to-sand-flat', 'cured', 'dry-to-sand-lightly', 'ready-to-recoat', 'full-strength'], risk: 'p90' },
  'levelling': { rungs: ['dry-to-sand-flat', 'cured', 'dry-to-sand-lightly', 'ready-to-recoat', 'full-strength'], risk: 'p90' },
  'turn over': { rungs: ['dry-to-handle', 'dry-to-sand-lightly', 'ready-to-recoat', 'cured', 'full-strength'], risk: 'p90' },
  'bench work': { rungs: ['dry-to-sand-flat', 'cured', 'dry-to-handle', 'dry-to-sand-lightly', 'ready-to-recoat', 'full-strength'], risk: 'p98' },
  'packing': { rungs: ['cured', 'full-strength', 'dry-to-sand-flat', 'dry-to-handle'], risk: 'p98' },
}

/** A joint is strong, or at least out of what holds it, before anything is done to it. */
const joint: readonly MilestoneName[] = ['full-strength', 'out-of-clamps', 'cured', 'dry-to-handle']

/** The milestones of a step's film, in the order of its ladder; none where it leaves no film. */
export function milestonesAfter(step: Pick<DraftStep, 'kind' | 'materialId'>, sheets: Sheets): string[] {
  return sheetOf(step, sheets)?.drying.milestones.map(rung => rung.name) ?? []
}

/**
 * The wait that makes sense between two steps: sanding by the middle of the forecast, a coat at nine in ten and in the
 * recoat window where the sheet has one, all that strains the film at 98 in a hundred. A proposal, to be changed.
 */
export function linkBetween(from: DraftStep, to: DraftStep, sheets: Sheets): DraftLink {
  const sheet = sheetOf(from, sheets)
  const done: DraftLink = { from: from.key, to: to.key, milestone: null, risk: 'p90', windowed: false, recovery: null }
  if (!sheet) return done
  const has = milestonesAfter(from, sheets)
  const { rungs, risk } = wantedBy[to.kind]
  const milestone = (from.kind === 'glue-up' ? joint : rungs).find(name => has.includes(name)) ?? null
  const windowed = from.kind === 'coat' && to.kind === 'coat' && sheet.drying.windows.length > 0
  return { ...done, milestone, risk: from.kind === 'glue-up' && to.kind !== 'coat' ? 'p98' : risk, windowed }
}

/** A wait as it can still be after its first step has changed: what its film no longer has is proposed anew, the rest stays. */
export function mendedLink(link: DraftLink, from: DraftStep, to: DraftStep, sheets: Sheets): DraftLink {
  const sheet = sheetOf(from, sheets)
  const fits = link.milestone === null ? sheet === null || link.windowed : milestonesAfter(from, sheets).includes(link.milestone)
  if (!fits) return linkBetween(from, to, sheets)
  return link.windowed && (sheet?.drying.windows.length ?? 0) === 0 ? { ...link, windowed: false, recovery: null } : link
}
