import { getRequestHeader } from 'h3'
import type { H3Event } from 'h3'
import { malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { fileRefusals } from '#shared/words/files'

/** Beyond so many times the limit a sender is cut off; up to there the rest is thrown away, so that the sentence is heard. */
const patience = 4

/**
 * The file that a request carries as its whole body, of whatever type it says it is. Never more than `limit` bytes are held.
 * @param limit bytes
 * @param field the field of the form that the refusal names
 */
export async function readUpload(event: H3Event, limit: number, field = 'file'): Promise<Uint8Array | Refusal> {
  const tooLarge = malformed({ [field]: fileRefusals.tooLarge(limit) }, fileRefusals.tooLarge(limit))
  if (Number(getRequestHeader(event, 'content-length') ?? 0) > limit * patience) return tooLarge
  const parts: Buffer[] = []
  let bytes = 0
  for await (const part of event.node.req as AsyncIterable<Buffer>) {
    bytes += part.length
    if (bytes <= limit) parts.push(part)
    else parts.length = 0
    if (bytes > limit * patience) return tooLarge
  }
  if (bytes > limit) return tooLarge
  return bytes === 0 ? malformed({ [field]: fileRefusals.empty }, fileRefusals.empty) : Buffer.concat(parts)
}
