/** What a file is by its first bytes. Its name and what the browser says of it are claims, and not looked at. */
export type FileType = 'application/pdf' | 'image/jpeg' | 'image/png' | 'image/heic' | 'image/webp' | 'image/gif'

/** The ending a file of each type is given when it is fetched. */
export const fileEndings: Record<FileType, string> = { 'application/pdf': 'pdf', 'image/jpeg': 'jpg', 'image/png': 'png', 'image/heic': 'heic', 'image/webp': 'webp', 'image/gif': 'gif' }

/** The brands that a still picture of a phone's own format begins with (ISO/IEC 23008-12, file type box). */
const heicBrands = ['heic', 'heix', 'heim', 'heis', 'hevc', 'hevx', 'mif1', 'msf1']

const starts = (data: Uint8Array, bytes: readonly number[], at = 0) => data.length >= at + bytes.length && bytes.every((byte, index) => data[at + index] === byte)
const letters = (data: Uint8Array, from: number, to: number) => String.fromCharCode(...data.slice(from, to))

/** The type of a file by its signature, or null when it is none of those we know. @param data at least the first 12 bytes */
export function sniffType(data: Uint8Array): FileType | null {
  if (letters(data, 0, 5) === '%PDF-') return 'application/pdf'
  if (starts(data, [0xff, 0xd8, 0xff])) return 'image/jpeg'
  if (starts(data, [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a])) return 'image/png'
  if (letters(data, 4, 8) === 'ftyp' && heicBrands.includes(letters(data, 8, 12))) return 'image/heic'
  if (letters(data, 0, 4) === 'RIFF' && letters(data, 8, 12) === 'WEBP') return 'image/webp'
  if (['GIF87a', 'GIF89a'].includes(letters(data, 0, 6))) return 'image/gif'
  return null
}
