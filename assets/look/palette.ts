/**
 * Every colour of the product, once: Tailwind, the style sheet and the contrast test read this list.
 * Hex sRGB. The names are the studio's own and none of them is a name Tailwind ships.
 */
export const tokens = [
  'gesso', 'paper', 'chalk', 'shelf', 'ink', 'graphite', 'wet', 'ochre', 'verdigris', 'verdigris-wash',
  'madder', 'madder-wash', 'cinnabar', 'film-top', 'film', 'film-deep', 'sheen',
] as const
export type Token = typeof tokens[number]
export type Palette = Readonly<Record<Token, string>>

export const light: Palette = {
  'gesso': '#f7f4ec',
  'paper': '#fffdf8',
  'chalk': '#d8d1c0',
  'shelf': '#b9ae97',
  'ink': '#1d2433',
  'graphite': '#4d5566',
  'wet': '#28506e',
  'ochre': '#80480a',
  'verdigris': '#1a5f4a',
  'verdigris-wash': '#dcefe4',
  'madder': '#9c2f3f',
  'madder-wash': '#f7dfe0',
  'cinnabar': '#b5391b',
  'film-top': '#6f9cbb',
  'film': '#28506e',
  'film-deep': '#1d3f58',
  'sheen': '#b9d6ea',
}

export const dark: Palette = {
  'gesso': '#171b22',
  'paper': '#1f242d',
  'chalk': '#69645a',
  'shelf': '#857a66',
  'ink': '#efe9dc',
  'graphite': '#b9bdc6',
  'wet': '#8fc0e2',
  'ochre': '#e8b26a',
  'verdigris': '#83d2b0',
  'verdigris-wash': '#1d3a30',
  'madder': '#f4a3a9',
  'madder-wash': '#46242a',
  'cinnabar': '#ff8a66',
  'film-top': '#3f7197',
  'film': '#173f5e',
  'film-deep': '#0c2a42',
  'sheen': '#7fb2d6',
}

/** Text on ground, as used. The ratio is the least the pair may have in either scheme. */
export const textPairs: ReadonlyArray<readonly [text: Token, ground: Token, least: number]> = [
  ['ink', 'gesso', 7], ['ink', 'chalk', 4.5], ['ink', 'verdigris-wash', 4.5], ['ink', 'madder-wash', 4.5],
  ['graphite', 'gesso', 4.5], ['wet', 'gesso', 4.5], ['ochre', 'gesso', 4.5], ['verdigris', 'gesso', 4.5],
  ['madder', 'gesso', 4.5], ['cinnabar', 'gesso', 4.5],
  ['graphite', 'paper', 4.5], ['wet', 'paper', 4.5], ['cinnabar', 'paper', 4.5],
  // Buttons turn the pair round: the ground takes the ink.
  ['paper', 'ink', 7], ['paper', 'madder', 4.5], ['madder', 'madder-wash', 4.5], ['verdigris', 'verdigris-wash', 4.5],
  // The handling sheet is read at three metres, on paper; its washes carry ink only.
  ['ink', 'paper', 7], ['verdigris', 'paper', 7], ['ochre', 'paper', 7], ['madder', 'paper', 7],
]

/** What must be told from its ground without being text: outlines, the focus ring, the now-line, the two textures. */
export const shapePairs: ReadonlyArray<readonly [shape: Token, ground: Token, least: number]> = [
  ['ink', 'gesso', 3], ['ink', 'paper', 3], ['cinnabar', 'gesso', 3], ['cinnabar', 'paper', 3],
  ['madder', 'madder-wash', 3], ['verdigris', 'verdigris-wash', 3],
  // Dried against wet at its darkest, so that a grey print still shows which is which.
  ['chalk', 'film-deep', 2.4], ['sheen', 'film-deep', 3],
]
