import { malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { photoRefusals } from '#shared/words/photos'

/** The long edges of the two sizes, dots. */
const edges = { full: 1600, small: 320 } as const
const mostDots = 80_000_000
const quality = 80

/** A picture in two sizes, both WebP; width and height of the larger, dots. */
export interface Pictures { full: Buffer, small: Buffer, width: number, height: number }

const refuse = (message: string) => malformed({ photo: message }, message)

/**
 * Makes a picture ready to be kept: upright as its EXIF says, no longer than 1600 dots, and drawn anew, so that nothing
 * a camera wrote beside it (place, time, make, owner) is left. Only the first picture of a moving one.
 */
export async function makePictures(data: Uint8Array): Promise<Pictures | Refusal> {
  // Loaded when the first picture comes: the server starts without it.
  const { default: sharp } = await import('sharp')
  const within = (edge: number) => ({ width: edge, height: edge, fit: 'inside' as const, withoutEnlargement: true })
  try {
    const source = sharp(data, { failOn: 'error', limitInputPixels: mostDots, pages: 1 })
    const full = await source.rotate().resize(within(edges.full)).toColourspace('srgb').webp({ quality }).toBuffer({ resolveWithObject: true })
    const small = await sharp(full.data).resize(within(edges.small)).webp({ quality }).toBuffer()
    return { full: full.data, small, width: full.info.width, height: full.info.height }
  }
  catch (error) {
    return refuse(error instanceof Error && /pixel limit/i.test(error.message) ? photoRefusals.tooManyDots : photoRefusals.broken)
  }
}
