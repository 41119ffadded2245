import { filmOf, hardeningOf } from '#shared/data-sheet/hardening'
import type { Hardening } from '#shared/data-sheet/hardening'
import { libraryMaterials } from '#shared/library/index'
import { libraryFigure } from '#shared/library/types'
import type { FigureName, LibraryMaterial, MaterialKind } from '#shared/library/types'
import type { MilestoneName } from '#shared/terms'

/** A rung as materials of a kind usually have it: the middle of theirs, the quickest and the slowest of all. Minutes. */
export interface UsualRung { name: MilestoneName, low: number, typical: number, high: number }

const family: Partial<Record<Hardening, Hardening>> = { 'isocyanate': 'epoxy', 'two parts': 'epoxy' }

/** Materials of the starter library to go by: of this kind and hardening, else of this hardening, else of this kind, else all that lie like it. */
export function fellowsOf(kind: MaterialKind, hardening: Hardening): readonly LibraryMaterial[] {
  const film = filmOf(kind)
  const alike = libraryMaterials.filter(each => each.film === film && (each.kind === 'size') === (kind === 'size'))
  const hardened = alike.filter(each => hardeningOf(each) === (family[hardening] ?? hardening))
  const found = [hardened.filter(each => each.kind === kind), hardened, alike.filter(each => each.kind === kind), alike].find(each => each.length > 0)
  return found ?? libraryMaterials
}

/** The usual ladder of a kind, from the rungs that at least half of its fellows have, by time. */
export function usualLadder(kind: MaterialKind, hardening: Hardening): UsualRung[] {
  const fellows = fellowsOf(kind, hardening)
  const names = new Set(fellows.flatMap(each => each.milestones.map(rung => rung.name)))
  return [...names].flatMap((name): UsualRung[] => {
    const rungs = fellows.flatMap(each => each.milestones.filter(rung => rung.name === name))
    if (rungs.length * 2 < fellows.length) return []
    const typical = Math.exp(rungs.reduce((sum, rung) => sum + Math.log(rung.typical), 0) / rungs.length)
    return [{ name, low: Math.min(...rungs.map(rung => rung.low)), typical, high: Math.max(...rungs.map(rung => rung.high)) }]
  }).sort((a, b) => a.typical - b.typical)
}

/** A limit that the sheet leaves out, as the most careful of the fellows has it; null when none has it. */
export function usualLimit(kind: MaterialKind, hardening: Hardening, name: FigureName, careful: 'highest' | 'lowest'): number | null {
  const found = fellowsOf(kind, hardening).flatMap(each => libraryFigure(each, name)?.typical ?? [])
  return found.length === 0 ? null : careful === 'highest' ? Math.max(...found) : Math.min(...found)
}
