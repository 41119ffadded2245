import type { PieceSort } from '#shared/piece-finder'
import type { PlaceState } from '#shared/schemas/piece-state'
import type { GoneWay } from '#shared/terms'
import { goneTexts } from '#shared/words/steps'

/** The words of the list of pieces. */
export const piecesWords = {
  title: 'Pieces',
  find: 'Find',
  findHint: 'Name, batch, order, material on it, or the code of its tray',
  asked: (count: number) => (count === 0 ? 'Filter and order' : `Filter and order: ${count} set`),
  room: 'Room',
  place: 'Place',
  batch: 'Batch',
  verdict: 'Verdict',
  any: 'any',
  hands: 'Waiting for hands',
  wet: 'Wet',
  gone: 'Gone',
  state: 'Only those that are',
  sort: 'Order by',
  clear: 'Show all',
  nowhere: 'Nobody has said where',
  noOrder: 'For no order',
  none: 'No piece is like that',
  noneSays: 'Ask for less, or show all.',
  empty: 'There are no pieces yet',
  emptySays: 'Start a batch, and its pieces stand here.',
  start: 'Start a batch',
  noneGone: 'Nothing has left the studio',
  noneGoneSays: 'What is sold, given away, lost or discarded stands here, and can come back.',
  moreGone: 'Show earlier ones',
  goneFailed: 'Those that are gone could not be read.',
  loading: 'Fetching the pieces',
  stale: 'The studio cannot be reached. These are the pieces as last heard.',
  choose: (name: string) => `Choose ${name}`,
  chooseAll: (name: string, count: number) => (count === 1 ? name : `${name}, all ${count}`),
  some: (count: number, of: number) => `${count} of ${of}`,
  allShown: (count: number) => (count === 1 ? 'Choose the one shown' : `Choose all ${count} shown`),
  clearChosen: 'Choose none',
  show: 'Show',
  hide: 'Fold',
  showOf: (name: string) => `Show the pieces of ${name}`,
  hideOf: (name: string) => `Fold the pieces of ${name}`,
  acts: 'What to tell about the chosen pieces',
  move: 'Move',
  coat: 'Coat is on',
  dry: 'Tested: dry enough',
  tacky: 'Still tacky',
  more: 'More',
  moreTitle: 'More about the chosen',
  whereTo: 'Where they go',
  whereHint: 'A tap on a place moves them there now.',
  aside: 'Set aside',
  asideHint: 'The step each of them waits for stops, with a reason.',
  resume: 'Take up again',
  goneAct: 'Gone',
  goneHint: 'Sold, given away, lost or discarded. Each can come back.',
  goneTitle: 'What became of them',
  wetGone: (count: number) => (count === 1 ? 'One of them is still wet.' : `${count} of them are still wet.`),
  split: 'Put into another batch',
  splitHint: 'A new one, or one that goes by the same schedule. What was done stays with the pieces.',
  splitTitle: 'Put into another batch',
  into: 'Into',
  newBatch: 'A new batch',
  newName: 'Its name',
  splitAct: 'Put them there',
  mixed: 'These pieces go by different schedules. A batch has one: choose pieces of one schedule.',
  cancel: 'Cancel the batch',
  cancelHint: 'Nothing more is begun on these pieces.',
  cancelTitle: 'Cancel what is left to do',
  cancelSays: 'Every step that has not begun is left out. What was done stays in the history.',
  cancelWet: (count: number) => (count === 1 ? 'One of them is wet or held: it stays where it stands, with its verdict, until it is dry.' : `${count} of them are wet or held: they stay where they stand, with their verdicts, until they are dry.`),
  cancelDry: 'Then say of each what became of it: gone, or kept.',
  cancelAct: 'Cancel what is left',
  reason: 'Why, if you like',
  rename: 'Rename',
  renameHint: 'One piece, or the batch of the chosen.',
  renameTitle: 'Rename',
  renamePiece: 'The piece',
  renameBatch: 'The batch',
  nameOfPiece: 'Name of the piece',
  nameOfBatch: 'Name of the batch',
  renameAct: 'Rename',
  renamed: (was: string, name: string) => `${was} is called ${name} now.`,
  undo: 'Undo',
  close: 'Close',
  backAct: 'It is back',
  backOf: (name: string) => `It is back: ${name}`,
  backTitle: 'Where it stands now',
  notMaker: 'A maker tells these.',
} as const

const sorts: Record<PieceSort, string> = { moment: 'next moment', name: 'name', place: 'place', due: 'due date' }
export const sortText = (sort: PieceSort) => sorts[sort]

/** "12 pieces", "12 of 300 pieces". */
export function countText(shown: number, all: number): string {
  const noun = all === 1 ? 'piece' : 'pieces'
  return shown === all ? `${all} ${noun}` : `${shown} of ${all} ${noun}`
}

/** What a place has left for so many pieces, as its key says it: "3 of 12 free", "room for 2 of the 5", "full". */
export function freeText({ capacity, taken }: Pick<PlaceState, 'capacity' | 'taken'>, pieces = 1): string {
  const free = capacity - taken
  return free <= 0 ? 'full' : free < pieces ? `room for ${free} of the ${pieces}` : `${free} of ${capacity} free`
}

/** "Boxes, for the fair": what a piece belongs to. */
export const belongsText = (batch: string, order: string | null) => batch + (order === null ? '' : `, for ${order}`)

/** A way to go, as its key says it. */
export const goneKey = (how: GoneWay) => `${goneTexts[how].charAt(0).toUpperCase()}${goneTexts[how].slice(1)}`
