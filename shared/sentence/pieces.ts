import { drop } from '#shared/sentence/names'
import type { Named } from '#shared/sentence/names'
import { wordsOf } from '#shared/sentence/tokens'
import type { Token } from '#shared/sentence/tokens'

/** Pieces that are called alike, by what they are called: "ledger" for Ledger 1 to 12, or the name of their batch. */
interface Kind { words: string[], pieces: { id: number, no: number | null }[] }

export interface NamedPiece extends Named { batch: string }

function kindsOf(pieces: readonly NamedPiece[]): Kind[] {
  const kinds = new Map<string, Kind>()
  const add = (words: string[], id: number, no: number | null) => {
    const key = words.join(' ')
    const kind = kinds.get(key) ?? { words, pieces: [] }
    kind.pieces.push({ id, no })
    kinds.set(key, kind)
  }
  for (const piece of pieces) {
    const words = wordsOf(piece.name)
    // "Ledger 4, the tall one" is number 4 of the ledgers too.
    const head = wordsOf(piece.name.split(/[,;:(]/)[0] ?? '')
    const no = /^\d+$/.test(head.at(-1) ?? '') ? Number(head.at(-1)) : null
    const stem = no === null ? words : head.slice(0, -1)
    add(stem, piece.id, no)
    if (no !== null && head.length < words.length) add(words, piece.id, null)
    const batch = wordsOf(piece.batch)
    if (batch.join(' ') !== stem.join(' ')) add(batch, piece.id, no)
  }
  return [...kinds.values()].filter(kind => kind.words.length > 0)
}

/** The kind that is named at this place of the sentence: by all its words, or by its last where no other ends so. */
function kindAt(tokens: readonly Token[], at: number, kinds: readonly Kind[]): { kind: Kind, length: number } | null {
  const whole = kinds.filter(({ words }) => words.every((word, i) => tokens[at + i]?.word === word)).sort((a, b) => b.words.length - a.words.length)[0]
  if (whole) return { kind: whole, length: whole.words.length }
  const ending = kinds.filter(({ words }) => words.at(-1) === tokens[at]?.word)
  const same = (kind: Kind) => kind.pieces.map(piece => piece.id).join()
  return ending[0] && ending.every(kind => same(kind) === same(ending[0] ?? kind)) ? { kind: ending[0], length: 1 } : null
}

/** "1 to 4", "1 2 and 5", from here on: the numbers, and how many words that took. */
function numbersAt(tokens: readonly Token[], from: number): { numbers: number[], length: number } {
  const numbers: number[] = []
  let at = from
  const whole = (i: number) => {
    const number = tokens[i]?.number ?? null
    return number !== null && Number.isInteger(number) ? number : null
  }
  for (;;) {
    const next = tokens[at]?.word === 'and' || tokens[at]?.word === 'number' ? at + 1 : at
    const first = whole(next)
    if (first === null) return { numbers, length: at - from }
    const last = ['to', 'through', 'until', 'till'].includes(tokens[next + 1]?.word ?? '') ? whole(next + 2) : null
    const [low, high] = last === null ? [first, first] : [Math.min(first, last), Math.max(first, last)]
    for (let no = low; no <= Math.min(high, low + 999); no += 1) numbers.push(no)
    at = last === null ? next + 1 : next + 3
  }
}

const exceptions = ['but', 'except', 'without', 'not']
const excepts = (token: Token | undefined) => exceptions.includes(token?.word ?? '')

/** "but 3", "but not 1 and 6", from here on: the numbers, and how many words that took; none where no number follows. */
function exceptAt(tokens: readonly Token[], from: number): { numbers: number[], length: number } {
  let at = from
  while (excepts(tokens[at])) at += 1
  const but = at === from ? { numbers: [], length: 0 } : numbersAt(tokens, at)
  return but.numbers.length > 0 ? { numbers: but.numbers, length: at - from + but.length } : { numbers: [], length: 0 }
}

/** How many words before here leave out what is named here: "but", "but not the"; 0 where none does. */
function exceptBefore(tokens: readonly Token[], at: number): number {
  const before = tokens[at - 1]?.word === 'the' ? at - 1 : at
  let from = before
  while (excepts(tokens[from - 1])) from -= 1
  return from === before ? 0 : at - from
}

/** The pieces that a sentence means, and those that it leaves out of whatever else it names. */
export interface SaidPieces { meant: number[], but: number[] }

/**
 * The pieces a sentence names, and takes those words out of it: "ledgers one to four and the clock case", "all ledgers
 * but 3". A number that no piece has is left in the sentence.
 * @param tokens changed: what was understood is taken out
 */
export function takePieces(tokens: Token[], pieces: readonly NamedPiece[]): SaidPieces {
  const kinds = kindsOf(pieces)
  const meant = new Set<number>()
  const but = new Set<number>()
  for (let at = 0; at < tokens.length; at += 1) {
    const found = kindAt(tokens, at, kinds)
    if (!found) continue
    const own = found.kind.pieces
    const none = (no: number) => !own.some(piece => piece.no === no)
    const first = at + found.length
    const plain = numbersAt(tokens, first)
    const middle = first + plain.length
    const out = exceptAt(tokens, middle)
    const end = middle + out.length
    const left = [...missed(tokens.slice(first, middle), plain.numbers.filter(none)), ...missed(tokens.slice(middle, end), out.numbers.filter(none))]
    const before = exceptBefore(tokens, at)
    for (const { id, no } of own) if (no === null ? plain.numbers.length === 0 : (plain.numbers.length === 0 || plain.numbers.includes(no)) && !out.numbers.includes(no)) (before > 0 ? but : meant).add(id)
    tokens.splice(at - before, end - at + before, ...left)
    at += left.length - 1 - before
  }
  drop(tokens, ['piece'])
  const listed = (ids: ReadonlySet<number>) => pieces.filter(piece => ids.has(piece.id)).map(piece => piece.id)
  return { meant: listed(meant).filter(id => !but.has(id)), but: listed(but) }
}

/** The words of numbers that no piece has; of a row that runs too far, its end. */
function missed(said: readonly Token[], numbers: readonly number[]): Token[] {
  const own = said.filter(token => token.number !== null && numbers.includes(token.number))
  return own.length > 0 || numbers.length === 0 ? own : said.filter(token => token.number !== null).slice(-1)
}
