import { materialWords } from '#shared/words/materials'

/** What an edition says otherwise than the one before. */
export const changeWords = {
  added: (label: string, is: string) => `New: ${label}, ${is}.`,
  gone: (label: string, was: string) => `Gone: ${label}, which was ${was}.`,
  changed: (label: string, was: string, is: string) => `${label}: ${is}, was ${was}.`,
  noWindow: 'No window shuts on it any more.',
  solvent: 'Thinner',
  level: materialWords.level,
  notLevel: 'It need not lie level any more.',
  caution: (text: string) => `New caution: ${text}`,
  noCaution: (text: string) => `Caution gone: ${text}`,
  parts: 'Its parts are others.',
  sameFigures: 'The same figures.',
  first: 'The first edition.',
  starter: 'The first edition, from the starter library.',
} as const
