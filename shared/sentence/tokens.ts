/** A word of a sentence as the grammar reads it: lower case, one of a thing, figures for numbers said as words. */
export interface Token { word: string, number: number | null, said: string }

const ones = ['zero', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve', 'thirteen', 'fourteen', 'fifteen', 'sixteen', 'seventeen', 'eighteen', 'nineteen']
const tens = ['twenty', 'thirty', 'forty', 'fifty', 'sixty', 'seventy', 'eighty', 'ninety']

/** One of a thing, where the end of the word shows it was several: boxes, berries, ledgers. */
export function singular(word: string): string {
  if (/[^aeiou]ies$/.test(word) && word.length > 4) return `${word.slice(0, -3)}y`
  if (/(ss|x|zz|ch|sh)es$/.test(word)) return word.slice(0, -2)
  return word.length > 3 && /[^su]s$/.test(word) ? word.slice(0, -1) : word
}

function numberOf(word: string): number | null {
  if (/^\d+(\.\d+)?$/.test(word)) return Number(word)
  const one = ones.indexOf(word)
  if (one >= 0) return one
  const ten = tens.indexOf(word)
  return ten >= 0 ? (ten + 2) * 10 : null
}

/** "twenty", "one" is 21; "fourteen", "point", "five" is 14.5. Figures are left as they were typed. */
function joined(tokens: readonly Token[]): Token[] {
  const out: Token[] = []
  for (const token of tokens) {
    const last = out.at(-1)
    const before = out.at(-2)
    const spoken = token.number !== null && !/^\d/.test(token.said)
    if (spoken && last && last.number !== null && !/^\d/.test(last.said) && last.number >= 20 && last.number % 10 === 0 && token.number !== null && token.number > 0 && token.number < 10) {
      out[out.length - 1] = { word: String(last.number + token.number), number: last.number + token.number, said: `${last.said} ${token.said}` }
    }
    else if (last?.word === 'point' && before?.number != null && token.number !== null && token.number < 10) {
      const number = before.number + token.number / 10
      out.splice(-2, 2, { word: String(number), number, said: `${before.said} point ${token.said}` })
    }
    else out.push(token)
  }
  return out
}

/** The words of a typed or dictated sentence. A dash between figures is "to"; °, % and c after a figure are words. */
export function tokensOf(text: string): Token[] {
  const plain = text.normalize('NFD').replaceAll(/\p{M}/gu, '').toLowerCase().replaceAll('’', '\'')
  const spaced = plain.replaceAll(/(\d)\s*[-–—]\s*(?=\d)/g, '$1 to ').replaceAll(/(\d)\s*°\s*([cf])\b/g, '$1 degrees $2').replaceAll(/(\d)([cf])\b/g, '$1 degrees $2')
    .replaceAll('°', ' degrees ').replaceAll('%', ' percent ').replaceAll(/(\d)(min|h)\b/g, '$1 $2').replaceAll(/\bper cent\b/g, 'percent').replaceAll(/(\D)-(?=\D)/g, '$1 ')
  const words = spaced.match(/\d+:\d\d|\d+\.\d+|\d+|-\d+|[\p{L}']+/gu) ?? []
  return joined(words.map(said => ({ word: numberOf(said) === null ? singular(said.replace(/'s$/, '')) : said, number: numberOf(said), said })))
}

/** The words of a name, as `tokensOf` reads a sentence. */
export const wordsOf = (name: string): string[] => tokensOf(name).map(token => token.word)
