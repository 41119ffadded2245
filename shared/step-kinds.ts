import { coatKinds } from '#shared/terms'
import type { CoatKind, DustClass, StepKind } from '#shared/terms'

/** Whether doing a step of this kind leaves something that dries or sets. */
export function leavesFilm(kind: StepKind): kind is CoatKind {
  return coatKinds.some(each => each === kind)
}

/** What a kind of step does to the surface under it. Bench work may be piercing or cutting, and nobody says that it is not. */
const surfaceWork: Record<StepKind, 'none' | 'sands' | 'may cut'> = {
  'coat': 'none', 'glue-up': 'none', 'light sanding': 'sands', 'flat sanding': 'sands', 'levelling': 'sands', 'turn over': 'none', 'bench work': 'may cut', 'packing': 'none',
}

/** The dust that a kind of step makes where nobody has said otherwise (common practice: wet work makes none, and its own step says so). */
export const usualDust: Record<StepKind, DustClass> = {
  'coat': 'none', 'glue-up': 'none', 'light sanding': 'some', 'flat sanding': 'much', 'levelling': 'some', 'turn over': 'none', 'bench work': 'none', 'packing': 'none',
}

/** Whether the surface is cut back, so that there is dust of what lies on it. */
export const sands = (kind: StepKind) => surfaceWork[kind] === 'sands'

/** Whether dust or metal may come off an old object. */
export const loosens = (kind: StepKind) => surfaceWork[kind] !== 'none'
