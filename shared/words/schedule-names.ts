import { stepKindWords } from '#shared/words/step-kinds'
import type { StepKind } from '#shared/terms'

/** What a step is called until somebody names it: "Acrylic gesso", "Glue up with white PVA", "Sand lightly". */
export function stepNameOf(kind: StepKind, material: string | null): string {
  const { title } = stepKindWords[kind]
  if (material === null) return title
  return kind === 'glue-up' ? `${title}: ${material}` : material
}

/** The same told apart from its like: "Sand lightly, second time". */
export function nameApart(name: string, taken: readonly string[]): string {
  const nth = ['second', 'third', 'fourth', 'fifth', 'sixth']
  return [name, ...nth.map(word => `${name}, ${word} time`)].find(each => !taken.includes(each)) ?? `${name} ${taken.length + 1}`
}

export const nameOfCopy = (name: string) => `${name.slice(0, 70)}, a copy`

/** The one part of a piece that was put on without a schedule. */
export const onePart = 'Piece'

export const keptName = (batch: string) => `As ${batch}`.slice(0, 80)
