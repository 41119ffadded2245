import { wordsOf } from '#shared/sentence/tokens'
import type { Token } from '#shared/sentence/tokens'

/** A thing of the studio that has a name. */
export interface Named { id: number, name: string }
/** What a sentence names, and what it may have meant instead, the likeliest first. */
export interface Found extends Named { others: Named[] }

/** Words that say nothing about which thing is meant. */
const small = new Set(['a', 'an', 'the', 'of', 'and', 'in', 'on', 'with', 'to', 'for', 'i', 'it', 'is', 'has', 'have', 'been', 'was', 'are', 'were', 'all', 'some', 'my', 'our', 'at', 'put', 'went'])

/**
 * The thing whose name shares most words with the sentence, and takes those words out of it. Among equals the one whose
 * name has fewest other words, then the one listed first; the rest are kept as `others`.
 * @param tokens changed: what was understood is taken out
 */
export function takeName(tokens: Token[], things: readonly Named[]): Found | null {
  const scored = things.map((thing) => {
    const own = [...new Set(wordsOf(thing.name).filter(word => !small.has(word)))]
    return { thing, own, hits: own.filter(word => tokens.some(token => token.word === word)).length }
  }).filter(each => each.hits > 0)
  const most = Math.max(0, ...scored.map(each => each.hits))
  const best = scored.filter(each => each.hits === most)
  const closest = Math.min(...best.map(each => each.own.length))
  const [first, ...others] = [...best.filter(each => each.own.length === closest), ...best.filter(each => each.own.length > closest)]
  if (!first) return null
  // Said whole, nothing else was meant.
  const whole = first.hits === first.own.length
  drop(tokens, first.own)
  return { ...first.thing, others: whole ? [] : others.map(each => each.thing) }
}

/** Takes each of these words out once. */
export function drop(tokens: Token[], words: readonly string[]): void {
  for (const word of words) {
    const at = tokens.findIndex(token => token.word === word)
    if (at >= 0) tokens.splice(at, 1)
  }
}

/** What is left of a sentence that means something and was not understood, as it was said. */
export const leftOver = (tokens: readonly Token[], known: ReadonlySet<string>): string[] => tokens.filter(token => !small.has(token.word) && !known.has(token.word)).map(token => token.said)
