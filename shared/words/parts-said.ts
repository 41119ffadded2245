import { listText } from '#shared/words/group'
import { lowerFirst } from '#shared/words/steps'

/** So many parts are named one by one where a few words have to do. */
const named = 2

/** "Boxes 1–3: lid", "Dresser: drawer 1 and drawer 2, front", for what went on some parts or faces of pieces. */
export function partsOfNames(pieces: string, parts: readonly string[], faces: readonly string[]): string {
  const on = parts.length === 0 ? [] : [parts.length > named ? `${parts.length} parts` : listText(parts.map(lowerFirst))]
  const said = [...on, ...faces.length === 0 ? [] : [listText(faces.map(lowerFirst))]]
  return said.length === 0 ? pieces : `${pieces}: ${said.join(', ')}`
}

/** " (lid)" behind a verdict that is that of some parts only; nothing where all parts have it. */
export function ofParts(parts: readonly string[]): string {
  if (parts.length === 0) return ''
  return parts.length > named ? ` (${parts.length} parts)` : ` (${listText(parts.map(lowerFirst))})`
}
