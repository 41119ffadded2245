import type { FileType } from '#shared/file-types'

const typeNames: Record<FileType, string> = {
  'application/pdf': 'a PDF', 'image/jpeg': 'a JPEG picture', 'image/png': 'a PNG picture', 'image/heic': 'a HEIC picture', 'image/webp': 'a WebP picture', 'image/gif': 'a GIF picture',
}

/** "a PDF", "a JPEG picture". */
const fileTypeText = (type: FileType) => typeNames[type]

const megabyte = 1_000_000

/** "2.4 MB", "310 kB". Bytes. */
export function fileSizeText(bytes: number): string {
  return bytes >= megabyte ? `${Number((bytes / megabyte).toFixed(1))} MB` : `${Math.max(1, Math.round(bytes / 1000))} kB`
}

const oneOf = (types: readonly FileType[]) => types.map(fileTypeText).join(' or ')

/** Why a file is not kept. */
export const fileRefusals = {
  empty: 'The file is empty. Choose another.',
  tooLarge: (limit: number) => `The file is larger than ${fileSizeText(limit)}. Choose a smaller one.`,
  heic: (wanted: readonly FileType[]) => `This is a HEIC picture, which many browsers cannot show. Save it as ${oneOf(wanted)} first; a phone’s camera settings call it “most compatible”.`,
  otherType: (found: FileType, wanted: readonly FileType[]) => `This is ${fileTypeText(found)}. It must be ${oneOf(wanted)}.`,
  unknownType: (wanted: readonly FileType[]) => `What is in this file is none we know, whatever its name says. It must be ${oneOf(wanted)}.`,
  lost: 'The file itself is no longer in the storage folder. Put it back from a backup, or add it again.',
} as const

export const sheetFileWords = {
  title: 'Data sheets kept here',
  none: 'No data sheet is kept with this material yet.',
  unnamed: 'Data sheet',
  add: 'Add a data sheet',
  hint: 'A PDF, or a JPEG or PNG picture of it, up to 20 MB.',
  adding: 'Keeping the file',
  added: (name: string) => `${name} is kept.`,
  read: (name: string) => `Read ${name}`,
  remove: 'Take away',
  removeOne: (name: string) => `Take away ${name}`,
  removeAsk: (name: string) => `Take ${name} away?`,
  removeSays: 'The file is deleted. Its figures stay as they are.',
  since: (edition: number, size: string) => `with edition ${edition}, ${size}`,
  many: (most: number) => `A material has at most ${most === 1 ? 'one data sheet' : `${most} data sheets`}. Take one away first.`,
} as const
