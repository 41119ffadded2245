/** A row as it lies in its box, px from the top of the contents. */
export interface MeasuredRow { top: number, height: number }

/**
 * Which rows make up which page: as many whole ones as fit, at least one. A row higher than the box is a page of its own.
 * @param height of the box, px
 * @returns row numbers by page; one page when all of them fit
 */
export function pagesOf(rows: readonly MeasuredRow[], height: number): number[][] {
  const pages: number[][] = []
  let from = 0
  rows.forEach(({ top, height: own }, index) => {
    const last = pages.at(-1)
    if (last && top + own - from <= height) {
      last.push(index)
      return
    }
    from = top
    pages.push([index])
  })
  return pages
}
