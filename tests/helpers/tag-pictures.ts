import { writeFileSync } from 'node:fs'
import QrCode from 'qrcode'
import sharp from 'sharp'
import type { Sharp } from 'sharp'
import { qrMm, qrPath, qrRim, tagMm } from '#shared/tag-sheet'

const width = 1280
const height = 720

/** What a camera may do to a tag: degrees it is turned, a blur in dots, the share of the light that is left, and how wide the tag is in the picture, dots. */
export interface Seen { turned?: number, blur?: number, light?: number, wide?: number }

/** Our tag as it is printed: the code at its own size on the label, the letters beside it. */
function tagSvg(text: string, name: string): string {
  const { size, data } = QrCode.create(text, { errorCorrectionLevel: 'M' }).modules
  const side = size + 2 * qrRim
  const code = `<g transform="translate(1 1) scale(${qrMm / side})"><path d="${qrPath(size, (row, column) => data[row * size + column] === 1)}" fill="#1d2433" shape-rendering="crispEdges"/></g>`
  return `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${tagMm.width} ${tagMm.height}" width="${tagMm.width * 20}" height="${tagMm.height * 20}"><rect width="100%" height="100%" fill="#fffdf8"/>${code}<text x="31" y="14" font-size="5">${name}</text></svg>`
}

/** A shelf's edge with our tag on it, as a camera sees it. */
export async function seenTag(text: string, { turned = 0, blur = 0, light = 1, wide = 620 }: Seen = {}): Promise<Sharp> {
  const tag = await sharp(Buffer.from(tagSvg(text, 'Shelf A'))).resize({ width: wide }).rotate(turned, { background: '#8a7a66' }).resize({ width: width - 20, height: height - 20, fit: 'inside', withoutEnlargement: true }).png().toBuffer()
  const shelf = await sharp({ create: { width, height, channels: 3, background: '#8a7a66' } }).composite([{ input: tag, gravity: 'centre' }]).png().toBuffer()
  const picture = sharp(shelf)
  if (blur > 0) picture.blur(blur)
  return light < 1 ? picture.linear(light, 8) : picture
}

/** The dots of a picture, RGBA. */
export async function dotsOf(picture: Sharp): Promise<{ width: number, height: number, data: Uint8ClampedArray }> {
  const { data, info } = await picture.ensureAlpha().raw().toBuffer({ resolveWithObject: true })
  return { width: info.width, height: info.height, data: new Uint8ClampedArray(data) }
}

/** Writes a picture as a film that stands still, for a camera that is none. */
export async function writeFilm(path: string, picture: Sharp): Promise<void> {
  const light = await picture.greyscale().toColourspace('b-w').raw().toBuffer()
  const frame = Buffer.concat([Buffer.from('FRAME\n'), light, Buffer.alloc(width * height / 2, 128)])
  writeFileSync(path, Buffer.concat([Buffer.from(`YUV4MPEG2 W${width} H${height} F10:1 Ip A1:1 C420jpeg\n`), frame, frame]))
}
