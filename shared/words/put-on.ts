import type { CoatSize, Hold } from '#shared/terms'
import { groupNames } from '#shared/words/group'
import { lowerFirst, titled } from '#shared/words/steps'
import type { PutOnPart } from '#shared/put-on'

export const putOnWords = {
  title: 'I put something on',
  what: 'What',
  other: 'Something else',
  on: 'On which',
  whole: (place: string, count: number) => (count === 1 ? place : `${place}, all ${count}`),
  someOf: (chosen: number, count: number) => `${chosen} of ${count}`,
  nowhere: 'Nobody has said where',
  show: 'Show',
  when: 'When it was done',
  size: 'How thick',
  sizeHint: 'Normal, unless you say otherwise.',
  hold: 'What holds it',
  free: 'Nothing',
  wantsMaterial: 'Choose what you put on.',
  wantsPieces: 'Choose the pieces it went on.',
  outside: 'Outside the schedule',
  noPieces: 'No pieces in the studio yet',
  noPiecesSays: 'Start a batch first; it needs no finishing schedule.',
  noMaterials: 'The materials could not be fetched.',
  notYours: 'Coats outside a finishing schedule are for makers, or helpers the owner allows to do coats.',
} as const

export const sizeWords: Record<CoatSize, string> = { thin: 'Thin', normal: 'Normal', full: 'Full', flood: 'Flood' }
export const holdWords: Record<Hold, string> = { clamps: 'Clamps', press: 'Press', weight: 'Weight' }

/** "Shellac is on 3 pieces", the main key; without pieces or material it only says what it does. */
export function putOnKey(material: string | null, count: number): string {
  if (material === null || count === 0) return 'It is on'
  return count === 1 ? `${material} is on` : `${material} is on ${count} pieces`
}

/** "Ledgers 1 and 2 wait for exactly this: second varnish." */
export function waitsForThis(parts: readonly PutOnPart[]): string | null {
  const waiting = parts.filter(part => part.step !== null)
  if (waiting.length === 0) return null
  return waiting.map(({ step, pieces }) => `${groupNames(pieces.map(each => each.piece.name))} ${pieces.length === 1 ? 'waits' : 'wait'} for exactly this: ${lowerFirst(step?.name ?? '')}.`).join(' ')
}

/** The key that takes the offer: "On, as “Second varnish”". */
export function asStep(parts: readonly PutOnPart[]): string {
  const steps = parts.flatMap(part => part.step ?? [])
  return steps.length === 1 && parts.length === 1 ? `On, as ${titled(steps[0]?.name ?? '')}` : 'On, as each waits for it'
}
