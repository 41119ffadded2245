import type { TagMistake } from '#shared/tag-code'
import { tagLength, tagLetters } from '#shared/tag-code'

/** Why a carrier or a code stays as it is. */
export const tagRefusals = {
  carrierAbsent: 'There is no such carrier in this studio.',
  carrierTaken: (name: string) => `There is a carrier called ${name} already.`,
  carrierInUse: (pieces: string) => `These stand on it now: ${pieces}. Put them elsewhere first.`,
  carrierHasHistory: 'Pieces have stood on it, and their history names it. Rename it instead.',
  noSuchTag: (code: string) => `No shelf and no carrier of this studio has the code ${code}.`,
} as const

/** Why typed letters are no code of a tag. */
export function tagMistake(mistake: TagMistake): string {
  if (mistake.why === 'letter') return `A code has no ${mistake.letter}. It is made of ${tagLetters.split('').join(' ')}.`
  if (mistake.why === 'length') return `A code has ${tagLength} letters or figures; this has ${mistake.count}.`
  return 'These letters do not fit together. Look at the tag once more: one of them is another.'
}

/** Carriers in the settings. */
export const carrierWords = {
  title: 'Carriers',
  says: 'Boards and trays that pieces stand on. A wet cover cannot carry a tag; its board can.',
  none: 'No carriers yet.',
  add: 'Add a carrier',
  change: (name: string) => `Rename ${name}`,
  remove: (name: string) => `Take ${name} away`,
  askRemove: 'A carrier that pieces stand on, or have stood on, stays.',
  name: 'Name',
  nameHint: 'Such as Tray 3 or Long board.',
  code: (code: string) => `code ${code}`,
  empty: 'nothing on it now',
  holds: (pieces: string, places: string) => places === '' ? pieces : `${pieces}, in ${places}`,
  failed: 'The carriers could not be fetched.',
} as const

/** The page a tag leads to. */
export const tagWords = {
  failed: 'What stands here could not be fetched.',
  waiting: 'Fetching what stands here',
  heading: 'Shelf or carrier',
  notOurs: 'Not a tag of this studio',
  typed: (code: string) => `The tag says ${code}.`,
  elsewhere: (studio: string) => `This tag belongs to ${studio}`,
  elsewhereSays: 'You look at another of your studios now.',
  turnTo: (studio: string) => `Turn to ${studio}`,
  board: 'To the board',
  code: (code: string) => `Code ${code}`,
  carrier: 'Carrier',
  empty: 'Nothing stands here, as far as anybody has told.',
  emptyCarrier: 'Nothing stands on it, as far as anybody has told.',
  here: 'What stands here',
  toDo: 'What to do with it',
  nothingToDo: 'No step of these pieces wants to be told now.',
  putOn: 'Put something on these',
  all: (count: number) => count === 1 ? 'It is there' : 'All of these are there',
  missing: (count: number) => count === 1 ? 'It is not there' : 'These are not there',
  move: 'Put them elsewhere',
  moveAct: 'They stand there now',
  moveTo: 'Place',
  onCarrier: 'On a carrier',
  bare: 'on none',
  print: 'Print this tag',
  placeWanted: 'Choose the place.',
} as const

/** The pages that print. */
export const printWords = {
  tags: 'Tags to print',
  tagsSays: 'A code leads a phone’s camera to what stands there. The caution is that of today: print a tag anew when other work comes to the shelf.',
  paper: 'Paper',
  papers: { a4: 'A4', letter: 'Letter', roll: '62 mm roll' },
  which: 'Which tags',
  carriers: 'Carriers',
  print: 'Print',
  back: 'Back',
  preview: 'Preview at true size',
  nothing: 'No tag is chosen',
  nothingSays: 'Tick a room, a place or a carrier above.',
  waiting: 'Fetching the tags',
  failed: 'The tags could not be fetched.',
  noCode: (count: number) => count === 1 ? 'One tag has no code yet. A maker or an owner opens this page and it gets one.' : `${count} tags have no code yet. A maker or an owner opens this page and they get one.`,
  scale: (count: number, sheets: number, edge: string, module: string) => `${count === 1 ? '1 tag' : `${count} tags`} on ${sheets === 1 ? '1 sheet' : `${sheets} sheets`}. Print at 100 %, not fitted to the page. A tag is 62 by 42 mm; its code ${edge} mm with its rim, one square of it ${module} mm.`,
  loopback: (address: string, owner: boolean) => `The codes lead to ${address}, which only this computer can open. Open this page by the address that phones use, or ${owner ? 'give the server that address as STILLWET_PUBLIC_URL' : 'ask an owner which one that is'}.`,
  asOf: (day: string) => `As of ${day}`,
  carrierOf: (studio: string) => `Carrier, ${studio}`,
  pieceTags: 'Tags of the pieces',
  pieceTag: 'Print its tag',
  batchTags: 'Tags of the whole batch',
  card: 'Batch card',
  cardSays: 'The paper twin: fill the boxes at the bench, type them in later. What to wait is for the studio’s usual air; the board knows better.',
  cardFailed: 'The batch card could not be fetched.',
  cardWaiting: 'Fetching the batch card',
  cardPrint: 'Print the batch card',
  wall: 'Cautions for the wall',
  wallSays: 'Every caution of what stands on the shelves, to hang where the work is done. Print it anew when other materials come in.',
  wallFailed: 'The cautions could not be fetched.',
  wallWaiting: 'Fetching the cautions',
  wallPrint: 'Print the cautions for the wall',
  noSchedule: 'This batch has no finishing schedule: the rows are yours to fill.',
  printed: (time: string) => `Printed ${time}.`,
  due: (time: string) => `due ${time}`,
  started: (time: string) => `started ${time}`,
  columns: { what: 'Step and what to wait', date: 'Date', from: 'From', to: 'Till', but: 'All but', initials: 'Initials' },
  coatOf: (no: number, of: number) => `${no} of ${of}`,
  takeOut: 'Take it out',
} as const
