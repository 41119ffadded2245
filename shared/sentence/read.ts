import { leftOver, takeName } from '#shared/sentence/names'
import type { Found, Named } from '#shared/sentence/names'
import { takePieces } from '#shared/sentence/pieces'
import type { NamedPiece } from '#shared/sentence/pieces'
import { tokensOf } from '#shared/sentence/tokens'
import type { Token } from '#shared/sentence/tokens'
import { takeWhen } from '#shared/sentence/when'
import type { SaidWhen } from '#shared/sentence/when'
import type { MilestoneName } from '#shared/terms'
import type { Clock } from '#shared/time'
import { celsius } from '#shared/units'
import type { Units } from '#shared/units'

/** What a sentence can name in this studio; materials with the last used first. */
export interface Vocabulary {
  materials: readonly Named[]
  pieces: readonly NamedPiece[]
  places: readonly (Named & { pieceIds: readonly number[] })[]
  rooms: readonly Named[]
}

const humidityWords = ['dry', 'normal', 'damp', 'wet'] as const
export type HumidityWord = typeof humidityWords[number]
type Told = SaidWhen & { unknown: string[] }

/** What a sentence says, as far as it was understood; null and empty for what it does not say. `unknown` are the words nobody understood. */
export type Sentence
  = | Told & { kind: 'put on', material: Found | null, pieceIds: number[] }
    | Told & { kind: 'touch test', milestone: MilestoneName, reached: boolean, pieceIds: number[] }
    | Told & { kind: 'moved', place: Found | null, pieceIds: number[] }
    | Told & { kind: 'reading', room: Found | null, tempC: number | null, rh: number | null, words: HumidityWord | null }

/** Phrases of a touch test, the longest first: what was asked and whether it was so. */
const tests: readonly [string, MilestoneName, boolean][] = [
  ['dry to the touch', 'set-to-touch', true], ['dry to touch', 'set-to-touch', true], ['touch dry', 'set-to-touch', true], ['set to touch', 'set-to-touch', true], ['set to the touch', 'set-to-touch', true],
  ['no longer tacky', 'tack-free', true], ['not tacky', 'tack-free', true], ['tack free', 'tack-free', true], ['still tacky', 'tack-free', false], ['tacky', 'tack-free', false], ['sticky', 'tack-free', false],
  ['dust free', 'dust-free', true], ['at tack', 'at-tack', true],
  ['dry to handle', 'dry-to-handle', true], ['can be handled', 'dry-to-handle', true], ['ready to handle', 'dry-to-handle', true],
  ['dry to sand flat', 'dry-to-sand-flat', true], ['ready to sand flat', 'dry-to-sand-flat', true], ['dry to sand', 'dry-to-sand-lightly', true], ['ready to sand', 'dry-to-sand-lightly', true], ['can be sanded', 'dry-to-sand-lightly', true],
  ['ready to recoat', 'ready-to-recoat', true], ['can be recoated', 'ready-to-recoat', true], ['hard through', 'cured', true], ['cured', 'cured', true],
  ['still wet', 'set-to-touch', false], ['wet', 'set-to-touch', false], ['dry enough', 'dry-to-handle', true], ['dry', 'dry-to-handle', true],
]
const negations = ['not', 'isn\'t', 'aren\'t', 'never']
const carried = ['moved', 'move', 'carried', 'brought', 'took', 'shifted']
const airWords = ['degree', 'percent', 'humidity', 'temperature']
const filler: ReadonlySet<string> = new Set(['still', 'yet', 'coat', 'coated', 'just', 'done', 'humidity', 'temperature', 'reading', 'air', 'over', 'into', 'onto', 'from', 'piece', 'everything', 'they', 'them', 'that', 'there', 'percent', 'degree', ...carried])

function takePhrase(tokens: Token[], phrase: string): boolean {
  const words = phrase.split(' ').map(word => tokensOf(word)[0]?.word ?? word)
  const at = tokens.findIndex((_, i) => words.every((word, j) => tokens[i + j]?.word === word))
  if (at >= 0) tokens.splice(at, words.length)
  return at >= 0
}

function takeTest(tokens: Token[]): { milestone: MilestoneName, reached: boolean } | null {
  for (const [phrase, milestone, reached] of tests) {
    if (!takePhrase(tokens, phrase)) continue
    const turned = negations.filter(word => takePhrase(tokens, word)).length > 0
    return { milestone, reached: reached !== turned }
  }
  return null
}

/** The number before a word, with both taken out. */
function takeFigure(tokens: Token[], units: readonly string[]): number | null {
  const at = tokens.findIndex((token, i) => units.includes(token.word) && tokens[i - 1]?.number != null)
  if (at < 1) return null
  const minus = tokens[at - 2]?.word === 'minus'
  const number = tokens[at - 1]?.number ?? null
  tokens.splice(minus ? at - 2 : at - 1, minus ? 3 : 2)
  return number === null ? null : minus ? -number : number
}

function readAir(tokens: Token[], { rooms }: Vocabulary, units: Units, when: SaidWhen): Sentence {
  const room = takeName(tokens, rooms)
  const rh = takeFigure(tokens, ['percent'])
  const said = takeFigure(tokens, ['degree'])
  const scale = ['f', 'fahrenheit'].some(word => takePhrase(tokens, word)) ? 'us' : ['c', 'celsius'].some(word => takePhrase(tokens, word)) ? 'metric' : units
  const words = humidityWords.find(word => takePhrase(tokens, word)) ?? null
  return { kind: 'reading', room, tempC: said === null ? null : scale === 'us' ? celsius(said) : said, rh: rh === null ? null : rh / 100, words: rh === null ? words : null, ...when, unknown: leftOver(tokens, filler) }
}

/** Everything that stands in a place that is named, where no piece is: "varnish on the long shelf". */
function takeStanding(tokens: Token[], { places }: Vocabulary, but: readonly number[]): number[] {
  const place = takeName(tokens, places)
  return (places.find(each => each.id === place?.id)?.pieceIds ?? []).filter(id => !but.includes(id))
}

/**
 * Reads one sentence about the studio's work: something put on, a touch test, pieces moved, or a room's air.
 * A small grammar over the studio's own names; nothing is guessed that was not said.
 * @param text what was typed or dictated, up to a few hundred characters
 * @param units in what degrees are meant where the sentence does not say
 * @returns null for a sentence of which nothing was understood
 */
export function readSentence(text: string, vocabulary: Vocabulary, clock: Clock, units: Units): Sentence | null {
  const tokens = tokensOf(text)
  const when = takeWhen(tokens, clock)
  const said = (words: readonly string[]): boolean => tokens.some(token => words.includes(token.word))
  if (said(airWords)) return readAir(tokens, vocabulary, units, when)
  const { meant: pieceIds, but } = takePieces(tokens, vocabulary.pieces)
  if (said(carried)) {
    const place = takeName(tokens, vocabulary.places)
    return { kind: 'moved', place, pieceIds, ...when, unknown: leftOver(tokens, filler) }
  }
  // "The shed is damp" is about the air; "the long shelf is dry" about what stands on it.
  const ofRoom = pieceIds.length === 0 && takeName([...tokens], vocabulary.places) === null && takeName([...tokens], vocabulary.rooms) !== null
  if (ofRoom && said(humidityWords)) return readAir(tokens, vocabulary, units, when)
  const test = takeTest(tokens)
  if (test) return { kind: 'touch test', ...test, pieceIds: pieceIds.length > 0 ? pieceIds : takeStanding(tokens, vocabulary, but), ...when, unknown: leftOver(tokens, filler) }
  const material = takeName(tokens, vocabulary.materials)
  const standing = pieceIds.length > 0 ? pieceIds : takeStanding(tokens, vocabulary, but)
  if (!material && standing.length === 0) return null
  return { kind: 'put on', material, pieceIds: standing, ...when, unknown: leftOver(tokens, filler) }
}
