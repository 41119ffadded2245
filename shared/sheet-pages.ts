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

/** So many cells of a shelf beside one another: `from` counts from the shelf's first cell. */
export interface ShelfStretch<Shelf> { shelf: Shelf, from: number, cells: number }

/**
 * Shelves in lines of so many columns, in their own order. Short shelves stand side by side; a shelf that is wider than
 * what is left of a line begins the next one, and a longer one than a whole line goes on beneath itself.
 * @param columns of one line, at least 1
 */
export function shelfLines<Shelf extends { cells: readonly unknown[] }>(shelves: readonly Shelf[], columns: number): ShelfStretch<Shelf>[][] {
  const lines: ShelfStretch<Shelf>[][] = []
  let left = 0
  for (const shelf of shelves) {
    for (let from = 0; from < shelf.cells.length; from += columns) {
      const cells = Math.min(columns, shelf.cells.length - from)
      const line = cells <= left ? lines.at(-1) : undefined
      if (line) line.push({ shelf, from, cells })
      else lines.push([{ shelf, from, cells }])
      left = (line ? left : columns) - cells
    }
  }
  return lines
}
