import type { FileType } from '#shared/file-types'
import { eitherText } from '#shared/words/group'

/** What each type of picture is called; a file that is none is a PDF. */
const pictureNames: Partial<Record<FileType, string>> = { 'image/jpeg': 'JPEG', 'image/png': 'PNG', 'image/heic': 'HEIC', 'image/webp': 'WebP', 'image/gif': 'GIF' }

/** "a PDF", "a JPEG or PNG picture", "a PDF, or a JPEG or PNG picture". */
function oneOf(types: readonly FileType[]): string {
  const names = types.flatMap(type => pictureNames[type] ?? [])
  const pictures = names.length > 0 ? [`a ${eitherText(names)} picture`] : []
  return [...types.includes('application/pdf') ? ['a PDF'] : [], ...pictures].join(', or ')
}

const megabyte = 1_000_000

/** "2.4 MB", "310 kB". Bytes. */
export function fileSizeText(bytes: number): string {
  return bytes >= megabyte ? `${Number((bytes / megabyte).toFixed(1))} MB` : `${Math.max(1, Math.round(bytes / 1000))} kB`
}

const isPicture = (type: FileType) => pictureNames[type] !== undefined

/** Why a file is not kept. */
export const fileRefusals = {
  empty: 'The file is empty. Choose another.',
  tooLarge: (limit: number) => `The file is larger than ${fileSizeText(limit)}. Choose a smaller one.`,
  heic: (wanted: readonly FileType[]) => `This is a HEIC picture, which many browsers cannot show. Save it as ${oneOf(wanted.filter(isPicture))} first; a phone’s camera settings call it “most compatible”.`,
  otherType: (found: FileType, wanted: readonly FileType[]) => `This is ${oneOf([found])}. It must be ${oneOf(wanted)}.`,
  unknownType: (wanted: readonly FileType[]) => `What is in this file cannot be read here, whatever its name says. It must be ${oneOf(wanted)}.`,
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
