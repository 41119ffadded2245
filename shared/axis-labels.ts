/** A word centred under a point of an axis: where (0..1), what it says, and its rank, the lower the sooner it is shown. */
export interface AxisLabel { x: number, says: string, rank: number }

/** Room beside a word so that two of them are read as two, px. */
const gap = 8

/**
 * Which words along an axis are shown: in the order of their rank, and within a rank from the left, each that keeps apart from those shown already.
 * @param labels in any order
 * @param width of the axis, px
 * @param letter about how wide a letter is, px
 * @returns for each label whether it is shown
 */
export function clearLabels(labels: readonly AxisLabel[], width: number, letter: number): boolean[] {
  const spans: { from: number, to: number }[] = []
  const shown = labels.map(() => false)
  const inOrder = [...labels.entries()].sort(([, a], [, b]) => a.rank - b.rank || a.x - b.x)
  for (const [index, { x, says }] of inOrder) {
    const half = (says.length * letter + gap) / 2
    const span = { from: x * width - half, to: x * width + half }
    if (spans.some(other => span.from < other.to && span.to > other.from)) continue
    spans.push(span)
    shown[index] = true
  }
  return shown
}
