import { cautionParts } from '#shared/library/caution-parts'
import type { InputSource, UsedInput } from '#shared/vapour/facts'
import type { VapourPhase } from '#shared/solvent-rooms'
import type { Contribution, Levers, RoomSums } from '#shared/vapour/picture'
import type { FireStage, VapourBand, VapourInput } from '#shared/vapour/types'
import type { VapourAnswers } from '#shared/schemas/act'
import type { AirMove } from '#shared/terms'
import { clockTime } from '#shared/time'
import type { Clock } from '#shared/time'
import type { Units } from '#shared/units'
import { airflowText, neededFlowText, volumeText } from '#shared/units'
import { grouped } from '#shared/grouped'
import { groupNames, listText } from '#shared/words/group'

/** Why a setting of air and fire stays as it is. */
export const vapourRefusals = {
  stated: 'An owner has stated this already. Withdraw that first.',
} as const

/** Everything the page about air and fire says. It grants nothing: each sentence asks for something or tells what is not known. */
export const vapourWords = {
  title: 'Safety',
  head: 'Air and fire',
  intro: 'Sums for a well-mixed room, with the cautious end of every figure. Over a wet panel there is more. They are no leave to go in or to go on.',
  failed: 'The air of the rooms could not be reckoned.',
  waiting: 'Reckoning the air of the rooms',
  noRooms: 'There are no rooms yet',
  noRoomsSays: 'Give the studio its rooms first: then their air can be reckoned.',
  toRooms: 'To the rooms',
  print: 'Print this sheet',
  printed: (time: string) => `Printed ${time}. A room can change within the hour: ask the board.`,
  rooms: 'Room by room',
  now: 'Now',
  ahead: 'With what is planned within a day',
  nothingWet: 'Nothing in here gives off vapour now, as far as anybody has told.',
  nothingAhead: 'Nothing that gives off vapour is planned in here within a day.',
  outdoors: 'Outdoors: there is no room to fill, so nothing is reckoned. Stand upwind, and keep flames away.',
  sleptIn: 'Slept in: solvent work and wet solvent films are refused in here.',
  sprayArea: cautionParts.phonesOut,
  inTheAir: 'In the air now',
  worstQuarter: 'Worst quarter of an hour',
  worstDay: 'Worst eight hours',
  lel: 'of the lowest explosive limit',
  ofLimit: 'of its limit',
  noLimit: 'no limit known',
  mixed: (factor: number) => `Shares count ${factor} times the sum, for air that does not mix.`,
  needs: 'Air it asks for',
  has: 'Air the room has',
  noFigure: 'No figure: see what is not known',
  askFirst: 'No figure: ask first',
  notKnown: 'not known',
  clearBefore: 'Not expected clear before',
  noClear: 'cannot be told',
  opener: 'It stays shut till a named person has looked in and opened it.',
  contributions: 'What it comes from',
  planned: 'planned',
  rests: 'What these figures rest on',
  assumed: 'assumed',
  bringsDown: 'What would bring it down',
  setUp: 'How this room is aired',
  change: (room: string) => `Set up ${room}`,
  starts: 'Solvent work that began',
  seen: 'I have seen it',
  seenBy: (names: readonly string[]) => names.length > 0 ? `Seen by ${listText(names)}.` : 'Nobody has said that they saw it.',
  unseenBy: (names: readonly string[]) => `Not yet: ${listText(names)}.`,
  started: (name: string | null, room: string, time: string, phase: VapourPhase, { exhaust, flamesOff, nobodyElse }: VapourAnswers) => `${name ?? 'The bench'} ${phase === 'film on' ? 'put a solvent film on' : 'began solvent work'} in ${room}, ${time}. ${exhaust === 'running' ? 'The exhaust was said to run.' : 'There is no exhaust.'} ${flamesOff ? `No ${cautionParts.ignition} were said to be on` : `It was said that not all ${cautionParts.ignition} were off`}, and ${nobodyElse ? 'nobody else' : 'others'} inside.`,
  rags: 'Oily rags',
  noRags: 'Nobody has to answer for rags now. Every drying oil asks again.',
  ragsCount: `${cautionParts.ragsHeat} ${cautionParts.ragsAll}`,
  sizes: 'Pieces nobody has measured',
  sizesSays: 'Without the surface of a piece half a square metre stands in for each, and the room counts as not known.',
  size: (batch: string) => `Surface of one piece of ${batch}`,
  sizeHint: (pieces: number) => pieces === 1 ? 'One piece, all its coated sides together.' : `${pieces} pieces; all coated sides of one together.`,
  keep: 'Keep it',
  sheets: 'From the data sheets',
  sheetsSays: 'What an owner has read in parts 8 and 9 of the safety data sheet wins over our figures.',
  sheetOf: (material: string) => `Data sheet of ${material}`,
  changeSheet: 'Change',
  enter: 'Enter',
  usesOurs: 'no sheet read: ours stand in',
  usesSheet: 'own figures',
  inUse: 'in use',
  moreSheets: (count: number) => count === 1 ? '1 more material with solvent in it' : `${count} more materials with solvent in them`,
  solvent: 'Solvent',
  limit: 'Limit over eight hours',
  ceiling: 'Limit over a quarter of an hour',
  explosive: 'Lowest explosive limit',
  voc: 'VOC, as it is in the can',
  exempt: 'Solvent not counted as VOC',
  spread: 'Spread rate',
  touch: 'Touch-dry',
  sheetHint: 'Empty where the sheet says nothing.',
  cautions: 'Standing cautions',
  inForce: 'In force: of what is wet, or comes on within a day',
  otherCautions: (count: number) => count === 1 ? '1 caution of what stands on the shelves unopened' : `${count} cautions of what stands on the shelves unopened`,
  figures: 'The figures',
  topics: { fire: 'Fire', health: 'Breath and skin', work: 'What spoils the work' },
  onThisPage: 'On this page',
  basis: 'Rests on',
  scope: 'Goes for',
  rules: 'Rules of this studio',
  noRules: 'The studio has no rules of its own yet.',
  addRule: 'Add a rule',
  rule: 'The rule, in your own words',
  ruleBy: (name: string) => `Set by ${name}.`,
  withdraw: 'Withdraw',
  withdrawRule: (rule: string) => `Withdraw the rule: ${rule}`,
  isocyanate: 'Isocyanate',
  noStatement: 'No owner has stated how it is used here, so every step with it is refused.',
  stateIt: 'State it in writing',
  statement: 'Which material, how it is put on, where, and what is worn',
  statementHint: 'At least 40 characters. Sprayed, it takes a booth and air from outside through a hose. Ask a work health expert first.',
  stated: (name: string, time: string) => `Stated by ${name} ${time}.`,
  ownerOnly: 'An owner sees to this.',
  estimate: 'Help to estimate the air changes',
  estimateSays: 'Three ways, each on the low side. A measured fan is worth more.',
  byWindows: 'By its windows',
  byFan: 'By its fan',
  byPuff: 'By a puff',
  fanFlow: 'What the fan moves, measured at its grille',
  halfLife: 'Minutes till a harmless smell or mist has fallen to half',
  windows: { shut: 'All shut', one: 'One window ajar', cross: 'Windows open on two sides' },
  airMoves: 'How the air is moved',
  moves: { 'measured fan': 'A measured fan blows out beside the work', 'fan and windows': 'A fan, and windows open', 'windows only': 'Windows only' } satisfies Record<AirMove, string>,
  airChanges: 'Air changes without the exhaust',
  airChangesHint: 'How often an hour the air of the room is new. Empty when nobody knows: then it counts as shut.',
  exhaust: 'Exhaust',
  volume: 'Volume',
  unknownHint: 'Empty when nobody knows it: then the caution stays high.',
  takes: (changes: string) => `That makes about ${changes} air changes an hour.`,
  take: 'Take that',
} as const

export const bandText: Record<VapourBand, string> = {
  'keep-moving': 'Keep the air moving.',
  'open-exhaust': 'Open up and exhaust.',
  'strong-exhaust': 'Strong exhaust, and stay out between tasks.',
  'not-here': 'Do not do this here.',
  'unknown': 'Not known: count it as too much.',
}

export const fireText: Record<FireStage, string | null> = {
  'none': null,
  'sources-off': `Ignition sources off: ${cautionParts.ignition}, and phones.`,
  'stop': 'Stop: so much vapour can burn. Leave, air from outside, call for help if in doubt.',
  'unknown': 'Nobody can say how near it comes to burning: ignition sources off.',
}

const inputNames: Record<UsedInput['name'], string> = {
  'volume': 'volume', 'air changes': 'air changes', 'mixing': 'mixing', 'touch-dry': 'touch-dry', 'limit': 'limit over eight hours', 'ceiling': 'limit over a quarter of an hour',
  'explosive limit': 'lowest explosive limit', 'area': 'surface', 'VOC': 'VOC', 'spread rate': 'spread rate', 'thinner': 'thinner', 'exempt solvent': 'solvent not counted as VOC',
}
const inputUnits: Record<UsedInput['name'], string> = {
  'volume': 'm³', 'air changes': 'an hour', 'mixing': 'times', 'touch-dry': 'min', 'limit': 'mg/m³', 'ceiling': 'mg/m³', 'explosive limit': 'g/m³', 'area': 'm²', 'VOC': 'g/L', 'spread rate': 'm²/L', 'thinner': 'g', 'exempt solvent': 'g/L',
}
const sourceText: Record<InputSource, string> = {
  'told': 'told', 'data sheet': 'from its data sheet', 'library': 'from the library: check the data sheet', 'foretold': 'foretold for this air', 'kind': 'usual for its kind: check the data sheet', 'assumed': 'assumed, on the side of caution',
}

/** Two figures of three places: 1,473; 351; 52; 8.1; 0.27. No more than the sum can bear. */
export function roundly(value: number): string {
  if (value === 0) return '0'
  const places = Math.max(0, 1 - Math.floor(Math.log10(Math.abs(value))))
  const rounded = value >= 100 ? Number(value.toPrecision(3)) : Number(value.toFixed(Math.min(4, places)))
  return rounded.toLocaleString('en-GB', { maximumFractionDigits: 4 })
}

/** "351 mg/m³", or "351 to 480 mg/m³" where the figures are in doubt. */
export function amountText(likely: number, cautious: number): string {
  const [low, high] = [Math.min(likely, cautious), Math.max(likely, cautious)]
  if (high < leastShown) return `under ${leastShown} mg/m³`
  return roundly(low) === roundly(high) ? `${roundly(high)} mg/m³` : `${low < leastShown ? '0' : roundly(low)} to ${roundly(high)} mg/m³`
}

/** No sum of a room's air is good to less than this, mg/m3; nor does it come to nothing. */
const leastShown = 0.01

/** A share of a limit: "0.9 of its limit", "2.7 times its limit". */
export function shareText(share: number): string {
  return share >= 1 ? `${roundly(share)} times its limit` : `${share < 0.01 ? 'under 0.01' : roundly(share)} ${vapourWords.ofLimit}`
}

/** "8.0 % of the lowest explosive limit". */
export const lelText = (share: number) => `${share < 0.0005 ? 'under 0.05' : roundly(share * 100)} % ${vapourWords.lel}`

/** One input: "VOC 450 g/L, from its data sheet". */
export function inputText({ name, value, source }: UsedInput): string {
  return value === null ? `${inputNames[name]}: ${vapourWords.notKnown}` : `${inputNames[name]} ${roundly(value)} ${inputUnits[name]}, ${sourceText[source]}`
}

const notKnownWords: Record<VapourInput, string> = {
  'volume': 'how large the room is', 'air changes': 'how its air changes', 'mixing': 'how its air is moved', 'touch-dry': 'when a film is touch-dry', 'limit': 'the limit of a vapour', 'explosive limit': 'an explosive limit', 'area': 'how large the pieces are', 'VOC': 'how much solvent is in it', 'spread rate': 'how far it spreads',
}

/** "Nobody has said how large the room is and how its air changes.", or null when all is told. */
export function assumedText(sums: RoomSums): string | null {
  const { assumed } = sums.cautious
  return assumed.length === 0 ? null : `Nobody has said ${listText(assumed.map(each => notKnownWords[each]))}.`
}

/** What would bring a room's air down, each line one thing. */
export function leverTexts(levers: Levers | null, units: Units, clock: Clock): string[] {
  if (!levers) return []
  return [
    ...levers.exhaustM3PerHour === null ? [] : [`An exhaust rated for vapour that moves ${neededFlowText(levers.exhaustM3PerHour, units)}.`],
    ...levers.atMost === null ? [] : [`At most ${levers.atMost} of these coats at once.`],
    ...levers.rooms.length === 0 ? [] : [`Another place: ${listText(levers.rooms)}.`],
    ...levers.after === null ? [] : [`A later hour: what is wet now counts till ${clockTime(levers.after, clock)} at least.`],
  ]
}

/** "28 m³, exhaust 900 m³/h, a measured fan blows out beside the work". */
export function setUpText(room: { volumeM3: number | null, exhaustM3H: number | null, airChangesPerHour: number | null, airMoves: string | null }, units: Units): string {
  const moves = (Object.keys(vapourWords.moves) as AirMove[]).find(each => each === room.airMoves)
  return [
    room.volumeM3 === null ? 'volume not known' : volumeText(room.volumeM3, units),
    room.exhaustM3H === null ? 'no exhaust known' : `exhaust ${airflowText(room.exhaustM3H, units)}`,
    ...room.airChangesPerHour === null ? [] : [`${roundly(room.airChangesPerHour)} air changes an hour without it`],
    moves ? vapourWords.moves[moves].toLowerCase() : 'nobody has said how its air is moved',
  ].join(', ')
}

/** "Almanacs 1–4: Water-based varnish", and of a planned coat that it is planned: what adds to a room's air, coats of one material together. */
export function contributionLines(contributions: readonly Contribution[]): { key: string, says: string, grams: number }[] {
  return [...grouped(contributions, each => `${each.material} ${each.planned}`)].map(([key, coats]) => ({
    key,
    says: `${groupNames([...new Set(coats.map(each => each.piece))])}: ${coats[0]?.material || vapourWords.notKnown}${coats[0]?.planned ? `, ${vapourWords.planned}` : ''}`,
    grams: coats.reduce((sum, each) => sum + each.grams, 0),
  }))
}
