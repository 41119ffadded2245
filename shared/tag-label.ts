import type { TagWire } from '#shared/schemas/tag'
import { tagCaution } from '#shared/library/brief-cautions'
import { tagCautionRoom } from '#shared/tag-sheet'
import { tagPath } from '#shared/tag-code'
import { printWords } from '#shared/words/tags'

/** What one tag says. `code` is for the hand, `url` for the camera; `caution` null where nothing that stands there asks for one. */
export interface TagLabel { key: string, url: string, code: string | null, name: string, says: string, caution: string | null, asOf: string }

/** The caution line of what stands there, or null where nothing does. */
const cautionLine = (cautions: readonly string[]) => cautions.length === 0 ? null : tagCaution(cautions, tagCautionRoom)

/** The labels of places and carriers that have a code. @param origin where this installation is reached, without a slash at its end */
export function tagLabels(tags: readonly TagWire[], { origin, studio, day }: { origin: string, studio: string, day: string }): TagLabel[] {
  return tags.flatMap(tag => tag.code === null
    ? []
    : [{
        key: `${tag.kind} ${tag.id}`, url: origin + tagPath(tag.code), code: tag.code, name: tag.name,
        says: tag.room?.name ?? printWords.carrierOf(studio), caution: cautionLine(tag.cautions), asOf: printWords.asOf(day),
      }])
}

/** The labels of single pieces, to be tied on: the code leads to the piece itself. */
export function pieceLabels(pieces: readonly { id: number, name: string, cautions: readonly string[] }[], { origin, batch, day }: { origin: string, batch: string, day: string }): TagLabel[] {
  return pieces.map(piece => ({
    key: `piece ${piece.id}`, url: `${origin}/pieces/${piece.id}`, code: null, name: piece.name, says: batch, caution: cautionLine(piece.cautions), asOf: printWords.asOf(day),
  }))
}
