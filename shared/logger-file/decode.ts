/** Marks at the front of a file that name its letters. */
function byMark(bytes: Uint8Array): string | null {
  const [a, b, c] = bytes
  if (a === 0xEF && b === 0xBB && c === 0xBF) return 'utf-8'
  if (a === 0xFF && b === 0xFE) return 'utf-16le'
  return a === 0xFE && b === 0xFF ? 'utf-16be' : null
}

/** Plain letters written in two bytes each leave every other byte empty. */
function byGaps(bytes: Uint8Array): string | null {
  const head = bytes.subarray(0, 400)
  const empty = (odd: number) => head.filter((byte, index) => byte === 0 && index % 2 === odd).length
  if (empty(1) > head.length / 4) return 'utf-16le'
  return empty(0) > head.length / 4 ? 'utf-16be' : null
}

/**
 * The text of a file whose letters nobody named: by its mark, else UTF-8, else the Western letters old loggers write a degree sign in.
 * Null when it is no text at all.
 */
export function decodeText(bytes: Uint8Array): string | null {
  const named = byMark(bytes) ?? byGaps(bytes)
  let text: string
  try {
    text = new TextDecoder(named ?? 'utf-8', { fatal: named === null }).decode(bytes)
  }
  catch {
    text = new TextDecoder('windows-1252').decode(bytes)
  }
  return text.includes('\u0000') ? null : text
}
