/** Between facts set side by side: the dot stays at the end of its line and never begins the next one. */
export const apart = '\u00a0· '

/** "Ledger 12" as "Ledger" and 12; a name without a number at its end as itself and null. */
function parseName(name: string): { stem: string, no: number | null } {
  const [, stem, figures] = /^(.*\S)\s+(\d{1,6})$/.exec(name.trim()) ?? []
  return stem === undefined || figures === undefined || figures.startsWith('0') ? { stem: name.trim(), no: null } : { stem, no: Number(figures) }
}

/** More than one of a thing, where the last word is plain English enough to be sure; otherwise the word as it is. */
function plural(stem: string): string {
  if (!/[a-z]$/.test(stem) || /[^s]s$/.test(stem)) return stem
  if (/(s|x|z|ch|sh)$/.test(stem)) return `${stem}es`
  return /[^aeiou]y$/.test(stem) ? `${stem.slice(0, -1)}ies` : `${stem}s`
}

/** "a", "a and b", "a, b and c". */
export function listText(words: readonly string[]): string {
  return words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`
}

/** "a", "a or b", "a, b or c". */
export function eitherText(words: readonly string[]): string {
  return words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} or ${words.at(-1)}`
}

/** Word joiner: a line may break behind a dash, and "Ledgers 1–" alone says nothing. */
const joiner = '\u2060'

/** 1, 2, 3, 5 as "1–3" and "5"; two in a row stay two. */
function runsOf(numbers: readonly number[]): string[] {
  const runs: [number, number][] = []
  for (const no of numbers) {
    const last = runs.at(-1)
    if (last && no === last[1] + 1) last[1] = no
    else runs.push([no, no])
  }
  return runs.flatMap(([from, to]) => (from === to ? [String(from)] : to === from + 1 ? [String(from), String(to)] : [`${from}–${joiner}${to}`]))
}

/**
 * Pieces called together: "Ledgers 1–4 and 6", "Tide boxes 3 and 4", "Clock case and Mirror frame"; of very many
 * different names the first three and how many more.
 */
export function groupNames(names: readonly string[]): string {
  const stems = new Map<string, { numbers: number[], bare: number }>()
  for (const { stem, no } of names.map(parseName)) {
    const known = stems.get(stem) ?? { numbers: [], bare: 0 }
    if (no === null) known.bare++
    else known.numbers.push(no)
    stems.set(stem, known)
  }
  const said = [...stems].flatMap(([stem, { numbers, bare }]) => {
    const sorted = [...new Set(numbers)].sort((a, b) => a - b)
    return [
      ...bare > 0 ? [stem] : [],
      ...sorted.length === 1 ? [`${stem} ${sorted[0]}`] : sorted.length > 1 ? [`${plural(stem)} ${listText(runsOf(sorted))}`] : [],
    ]
  })
  if (said.length > 4) return `${said.slice(0, 3).join(', ')} and ${said.length - 3} more`
  // A comma keeps "5 and 6, and Ferry cover 4" apart.
  return said.length === 2 && said[0]?.includes(' and ') ? said.join(', and ') : listText(said)
}
