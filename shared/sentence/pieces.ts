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
    const no = /^\d+$/.test(words.at(-1) ?? '') ? Number(words.at(-1)) : null
    const stem = no === null ? words : words.slice(0, -1)
    add(stem, piece.id, no)
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
    for (let no = first; no <= Math.min(last ?? first, first + 999); no += 1) numbers.push(no)
    at = last === null ? next + 1 : next + 3
  }
}

const exceptions = ['but', 'except', 'without', 'not']

/**
 * The pieces a sentence names, and takes those words out of it: "ledgers one to four and the clock case", "all ledgers
 * but 3". A number that no piece has is left in the sentence.
 * @param tokens changed: what was understood is taken out
 */
export function takePieces(tokens: Token[], pieces: readonly NamedPiece[]): number[] {
  const kinds = kindsOf(pieces)
  const meant = new Set<number>()
  for (let at = 0; at < tokens.length; at += 1) {
    const found = kindAt(tokens, at, kinds)
    if (!found) continue
    const { kind } = found
    const plain = numbersAt(tokens, at + found.length)
    let end = at + found.length + plain.length
    const known = (numbers: readonly number[]) => numbers.filter(no => kind.pieces.some(piece => piece.no === no))
    const left: Token[] = missed(tokens.slice(at + found.length, end), plain.numbers.filter(no => !known([no]).length))
    let out: number[] = []
    if (plain.numbers.length === 0 && exceptions.includes(tokens[end]?.word ?? '')) {
      const but = numbersAt(tokens, tokens[end + 1]?.word === 'number' ? end + 2 : end + 1)
      out = but.numbers
      left.push(...missed(tokens.slice(end + 1, end + 1 + but.length), but.numbers.filter(no => !known([no]).length)))
      if (but.numbers.length > 0) end += 1 + but.length
    }
    const chosen = plain.numbers.length > 0 ? known(plain.numbers) : null
    for (const piece of kind.pieces) if (chosen ? chosen.includes(piece.no ?? -1) : !out.includes(piece.no ?? -1)) meant.add(piece.id)
    tokens.splice(at, end - at, ...left)
    at += left.length - 1
  }
  drop(tokens, ['piece'])
  return pieces.filter(piece => meant.has(piece.id)).map(piece => piece.id)
}

/** The words of numbers that no piece has; of a row that runs too far, its end. */
function missed(said: readonly Token[], numbers: readonly number[]): Token[] {
  const own = said.filter(token => token.number !== null && numbers.includes(token.number))
  return own.length > 0 || numbers.length === 0 ? own : said.filter(token => token.number !== null).slice(-1)
}
