import { getRequestHeader, setResponseHeaders, setResponseStatus } from 'h3'
import type { H3Event } from 'h3'
import { isRefusal } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'

/** Sends a WebP picture, or that it is the one the browser has. It is asked for again each time, so that nothing of a studio is shown after signing out. */
export function sendPicture(event: H3Event, found: { data: Buffer, sha256: string } | Refusal): Buffer | string | Refusal {
  if (isRefusal(found)) return found
  const etag = `"${found.sha256.slice(0, 32)}"`
  setResponseHeaders(event, { 'cache-control': 'private, no-cache', etag, 'content-type': 'image/webp', 'content-disposition': 'inline' })
  if (getRequestHeader(event, 'if-none-match') !== etag) return found.data
  setResponseStatus(event, 304)
  return ''
}
