import type { ParseResult, Parser } from 'papaparse'
import type { Delimiter } from '#shared/logger-file/types'

/** Characters at a time: some milliseconds of work, so that the page goes on answering. */
const chunkSize = 250_000
const breathe = () => new Promise<void>(resolve => setTimeout(resolve, 0))

/**
 * Splits a table's text into rows of cells. The splitter is fetched when first asked for: no other page needs it.
 * @param onShare told how much is done, 0..1
 */
export async function splitRows(text: string, delimiter: Delimiter, onShare: (share: number) => void): Promise<string[][]> {
  const { default: papa } = await import('papaparse')
  const rows: string[][] = []
  await new Promise<void>((resolve, reject) => {
    papa.parse<string[]>(text, {
      delimiter, chunkSize,
      chunk: ({ data, meta }: ParseResult<string[]>, parser: Parser) => {
        for (const row of data) rows.push(row)
        onShare(Math.min(1, meta.cursor / Math.max(1, text.length)))
        parser.pause()
        void breathe().then(() => parser.resume())
      },
      complete: () => resolve(),
      error: reject,
    })
  })
  return rows
}

/** Goes through rows some thousands at a time, with a breath between. `work` may answer false to stop. */
export async function inPieces<Row>(rows: readonly Row[], work: (piece: readonly Row[]) => boolean, onShare: (share: number) => void): Promise<void> {
  const size = 5000
  for (let from = 0; from < rows.length; from += size) {
    if (!work(rows.slice(from, from + size))) return
    onShare(Math.min(1, (from + size) / rows.length))
    await breathe()
  }
}
