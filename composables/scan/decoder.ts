import { decodePicture } from './picture'

/** The longer edge that a frame is brought to, px: a tag that fills a third of it has some three dots for each of its squares. */
const longestEdge = 1000

/** Texts of the codes in what the camera shows now; none while nothing is found. */
export type Decoder = (video: HTMLVideoElement) => Promise<string[]>

interface Detector { detect: (from: HTMLVideoElement) => Promise<{ rawValue: string }[]> }
interface DetectorMaker { new (options: { formats: string[] }): Detector, getSupportedFormats: () => Promise<string[]> }

/** The browser's own detector, where it has one that reads these codes. */
async function ownDetector(): Promise<Decoder | null> {
  const Maker = (window as { BarcodeDetector?: DetectorMaker }).BarcodeDetector
  const formats = await Maker?.getSupportedFormats().catch(() => [] as string[]) ?? []
  if (!Maker || !formats.includes('qr_code')) return null
  const detector = new Maker({ formats: ['qr_code'] })
  return async video => (await detector.detect(video)).map(each => each.rawValue)
}

/** A frame as its dots, brought to a size that is read in time. */
function frameOf(video: HTMLVideoElement, canvas: HTMLCanvasElement): ImageData | null {
  const { videoWidth, videoHeight } = video
  const shrink = Math.min(1, longestEdge / Math.max(videoWidth, videoHeight, 1))
  canvas.width = Math.round(videoWidth * shrink)
  canvas.height = Math.round(videoHeight * shrink)
  const drawing = canvas.getContext('2d', { willReadFrequently: true })
  if (!drawing || canvas.width === 0 || canvas.height === 0) return null
  drawing.drawImage(video, 0, 0, canvas.width, canvas.height)
  return drawing.getImageData(0, 0, canvas.width, canvas.height)
}

/** The browser's own detector or ours: this file and the package behind it are fetched when a camera is to be read. */
export async function makeDecoder(): Promise<Decoder> {
  const own = await ownDetector()
  if (own) return own
  const canvas = document.createElement('canvas')
  return async (video) => {
    const frame = frameOf(video, canvas)
    return frame ? decodePicture(frame) : []
  }
}
