import { OPS, getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs'

const mm = (points: number) => points * 25.4 / 72
type Matrix = [number, number, number, number, number, number]

/** A word on a page and its place; a filled shape and its extent. mm from the page's upper left corner. */
export interface PdfText { says: string, x: number, y: number }
export interface PdfShape { x: number, y: number, width: number, height: number }
export interface PdfPage { width: number, height: number, texts: PdfText[], shapes: PdfShape[], says: string }

const times = (a: Matrix, b: Matrix): Matrix => [a[0] * b[0] + a[2] * b[1], a[1] * b[0] + a[3] * b[1], a[0] * b[2] + a[2] * b[3], a[1] * b[2] + a[3] * b[3], a[0] * b[4] + a[2] * b[5] + a[4], a[1] * b[4] + a[3] * b[5] + a[5]]
const at = ([a, b, c, d, e, f]: Matrix, x: number, y: number) => ({ x: a * x + c * y + e, y: b * x + d * y + f })

/** Reads a PDF as a stranger would: sizes, words and filled shapes with their true places. */
export async function readPdf(file: Uint8Array): Promise<PdfPage[]> {
  const task = getDocument({ data: new Uint8Array(file), useSystemFonts: true, verbosity: 0 })
  const document = await task.promise
  const pages: PdfPage[] = []
  for (let no = 1; no <= document.numPages; no++) {
    const page = await document.getPage(no)
    const [, , width = 0, height = 0] = page.view
    const content = await page.getTextContent()
    const texts = content.items.flatMap(item => 'str' in item && item.str.trim() !== '' ? [{ says: item.str, x: mm(item.transform[4] as number), y: mm(height - (item.transform[5] as number)) }] : [])
    pages.push({ width: mm(width), height: mm(height), texts, shapes: shapesOf(await page.getOperatorList(), height), says: content.items.map(item => 'str' in item ? item.str + (item.hasEOL ? ' ' : '') : '').join('').replace(/\s+/g, ' ') })
  }
  await task.destroy()
  return pages
}

/** The extents of all paths, through every change of the coordinate system. */
function shapesOf({ fnArray, argsArray }: { fnArray: number[], argsArray: unknown[][] }, height: number): PdfShape[] {
  const shapes: PdfShape[] = []
  const kept: Matrix[] = []
  let now: Matrix = [1, 0, 0, 1, 0, 0]
  fnArray.forEach((operation, index) => {
    const args = argsArray[index] ?? []
    if (operation === OPS.save || operation === OPS.paintFormXObjectBegin) kept.push(now)
    if (operation === OPS.restore || operation === OPS.paintFormXObjectEnd) now = kept.pop() ?? now
    if (operation === OPS.transform) now = times(now, args as Matrix)
    if (operation === OPS.paintFormXObjectBegin && args[0]) now = times(now, args[0] as Matrix)
    if (operation === OPS.constructPath && args[2]) shapes.push(extent(now, args[2] as ArrayLike<number>, height))
  })
  return shapes
}

function extent(matrix: Matrix, box: ArrayLike<number>, height: number): PdfShape {
  const corners = [at(matrix, box[0] ?? 0, box[1] ?? 0), at(matrix, box[2] ?? 0, box[3] ?? 0)]
  const xs = corners.map(each => mm(each.x))
  const ys = corners.map(each => mm(height - each.y))
  return { x: Math.min(...xs), y: Math.min(...ys), width: Math.max(...xs) - Math.min(...xs), height: Math.max(...ys) - Math.min(...ys) }
}
