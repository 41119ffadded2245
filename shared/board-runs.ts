import type { StandingPiece } from '#shared/shelf'
import { groupNames } from '#shared/words/group'

/** Swatches beside one another in one row. Where they say the same of one batch, the words stand under them once and each has a short label. */
export interface SwatchRun<Swatch extends StandingPiece = StandingPiece> { key: string | number, swatches: Swatch[], caption: string | null, labels: string[] }

/** A grid has so many column spans ready; a longer run begins again. */
export const longestRun = 12

function saysTheSame(a: StandingPiece, b: StandingPiece): boolean {
  return a.series === b.series && a.suffix === b.suffix && a.verdict === b.verdict && a.moment === b.moment && a.tone === b.tone && (a.was ?? null) === (b.was ?? null)
}

/**
 * Cuts a row of swatches into runs, none over the end of a row.
 * @param columns swatches that fit beside one another, at least 1
 */
export function swatchRuns<Swatch extends StandingPiece>(swatches: readonly Swatch[], columns: number): SwatchRun<Swatch>[] {
  const runs: Swatch[][] = []
  swatches.forEach((swatch, index) => {
    const last = runs.at(-1)
    const first = last?.[0]
    const joins = last && first && last.length < longestRun && index % columns !== 0 && (first.count ?? 1) === 1 && (swatch.count ?? 1) === 1 && saysTheSame(first, swatch)
    if (joins) last.push(swatch)
    else runs.push([swatch])
  })
  return runs.flatMap((run) => {
    const [first] = run
    const names = run.map(each => each.pieceName)
    return first ? [{ key: first.key, swatches: run, caption: run.length > 1 ? groupNames(names) + first.suffix : null, labels: run.length > 1 ? shortNames(names) : [] }] : []
  })
}

/** What tells swatches apart when the caption has named the series: the rest of each name after the words all begin with. */
export function shortNames(names: readonly string[]): string[] {
  const words = names.map(name => name.split(' '))
  const shared = (words[0] ?? []).findIndex((word, index) => words.some(each => each[index] !== word || each.length === index + 1))
  return words.map(each => each.slice(Math.max(0, shared)).join(' '))
}
