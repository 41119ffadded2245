import { crc32, inflateRawSync } from 'node:zlib'

/**
 * The files of a ZIP, read by its central directory (PKWARE APPNOTE 6.3, sections 4.3.7, 4.3.12 and 4.3.16).
 * @throws when a file's checksum is not the one written down
 */
export function unzip(zip: Buffer): Map<string, Buffer> {
  const end = zip.lastIndexOf(Buffer.from('PK\u0005\u0006', 'latin1'))
  const files = new Map<string, Buffer>()
  let at = zip.readUInt32LE(end + 16)
  for (let left = zip.readUInt16LE(end + 10); left > 0; left -= 1) {
    if (zip.readUInt32LE(at) !== 0x02014B50) throw new Error(`No entry of the central directory at ${at}.`)
    const [nameLength, extraLength, commentLength] = [zip.readUInt16LE(at + 28), zip.readUInt16LE(at + 30), zip.readUInt16LE(at + 32)]
    const name = zip.toString('utf8', at + 46, at + 46 + nameLength)
    const local = zip.readUInt32LE(at + 42)
    const begin = local + 30 + zip.readUInt16LE(local + 26) + zip.readUInt16LE(local + 28)
    const packed = zip.subarray(begin, begin + zip.readUInt32LE(at + 20))
    const content = zip.readUInt16LE(at + 10) === 8 ? inflateRawSync(packed) : packed
    if (crc32(content) !== zip.readUInt32LE(at + 16)) throw new Error(`${name} is not what its checksum says.`)
    files.set(name, content)
    at += 46 + nameLength + extraLength + commentLength
  }
  return files
}
