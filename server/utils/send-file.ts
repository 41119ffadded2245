import { setResponseHeaders } from 'h3'
import type { H3Event } from 'h3'
import type { FileType } from '#shared/file-types'

/** Hands out a kept file as what its first bytes say it is: nothing a browser could take for a page of ours. */
export function sendFile(event: H3Event, { data, type, fileName }: { data: Buffer, type: FileType, fileName: string }, how: 'attachment' | 'inline'): Buffer {
  const plain = fileName.replace(/[^\x20-\x7e]|["\\]/g, '_')
  setResponseHeaders(event, {
    'content-type': type,
    'content-disposition': `${how}; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(fileName)}`,
    'x-content-type-options': 'nosniff',
    'content-security-policy': 'default-src \'none\'; sandbox',
  })
  return data
}
