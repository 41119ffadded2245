import decodeQr from 'qr/decode.js'

/** How long a single frame is looked at, ms: longer than a frame lasts, for what is turned, dim or blurred is found late. */
const patience = 120

/** The text of the code in a picture of RGBA dots, or none. */
export function decodePicture({ width, height, data }: { width: number, height: number, data: Uint8Array | Uint8ClampedArray }): string[] {
  try {
    return [decodeQr({ width, height, data }, { timeLimit: patience })]
  }
  catch {
    // The package says by an error that it found nothing; a frame without a code is the common case.
    return []
  }
}
