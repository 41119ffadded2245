/** What a tag is printed on: sheets of two sizes, or a roll of labels as wide as a tag. */
export const papers = ['a4', 'letter', 'roll'] as const
export type Paper = typeof papers[number]
export const sheetPapers = ['a4', 'letter'] as const satisfies readonly Paper[]

/** mm. ISO 216 and ANSI/ASME Y14.1; a label printer's 62 mm roll is cut after each tag. */
export const tagMm = { width: 62, height: 42 } as const
export const paperMm: Record<Paper, { width: number, height: number }> = { a4: { width: 210, height: 297 }, letter: { width: 215.9, height: 279.4 }, roll: tagMm }

/** Printers leave this much of a sheet's edge blank. mm, planning value. */
const blankEdge = 5

/** How tags lie on one sheet. mm from its upper left corner. */
export interface TagLayout { columns: number, rows: number, perSheet: number, left: number, top: number, width: number, height: number }

/** As many tags side by side as a paper holds, in its middle, so that what a printer cannot reach stays blank on either side. */
export function tagLayout(paper: Paper): TagLayout {
  const { width, height } = paperMm[paper]
  const edge = paper === 'roll' ? 0 : blankEdge
  const columns = Math.floor((width - 2 * edge) / tagMm.width)
  const rows = Math.floor((height - 2 * edge) / tagMm.height)
  return { columns, rows, perSheet: columns * rows, left: (width - columns * tagMm.width) / 2, top: (height - rows * tagMm.height) / 2, width, height }
}

/** Tags in the order they are printed, sheet by sheet. */
export function tagSheets<Tag>(tags: readonly Tag[], paper: Paper): Tag[][] {
  const { perSheet } = tagLayout(paper)
  return Array.from({ length: Math.ceil(tags.length / perSheet) }, (_, sheet) => tags.slice(sheet * perSheet, (sheet + 1) * perSheet))
}

/** The edge of a code with the blank rim it needs, mm, and that rim in squares on each side (ISO/IEC 18004: four). */
export const qrMm = 28
export const qrRim = 4

/** The edge of one square of a code, mm. @param squares of one side of the code without its rim, 21 or more */
export const qrSquareMm = (squares: number) => qrMm / (squares + 2 * qrRim)

/**
 * A code as one SVG path: a rectangle for each run of dark squares in a row, one unit a square, the rim included.
 * @param isDark by row and column
 */
export function qrPath(squares: number, isDark: (row: number, column: number) => boolean): string {
  const runs: string[] = []
  for (let row = 0; row < squares; row++) {
    for (let from = 0; from < squares; from++) {
      if (!isDark(row, from)) continue
      let to = from
      while (to < squares && isDark(row, to)) to++
      runs.push(`M${from + qrRim} ${row + qrRim}h${to - from}v1h${from - to}z`)
      from = to
    }
  }
  return runs.join('')
}

/** Points of a name on a tag, so that even 80 letters stay whole beside the code. */
export function tagNamePoints(name: string): number {
  const longest = Math.max(...name.split(/\s+/).map(word => word.length))
  if (name.length <= 18 && longest <= 11) return 13
  if (name.length <= 40 && longest <= 15) return 10
  return name.length <= 60 ? 8.5 : 7.5
}

/** Letters of the caution line that three lines of a tag hold. */
export const tagCautionRoom = 110
