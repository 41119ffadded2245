import type { MixBasis } from '#shared/terms'

/** Why a mix is not kept. */
export const mixRefusals = {
  parts: 'Parts: a number above 0 and up to 10,000, such as 3 or 0.5.',
  basis: 'Measured by: weight or volume.',
  two: 'A mix has at least two parts.',
  many: 'A mix has at most twelve parts.',
  twice: 'Each material stands in a mix once. Add its parts together.',
  wantsMaterial: 'Material: choose what this part is.',
  noMaterial: 'Choose a material of this studio for each part.',
  itself: (name: string) => `${name} holds this mix itself. A mix cannot be a part of its own parts.`,
  films: 'Parts: finishes and glues are not mixed with one another here. Choose parts that all lie open, or all lie in a joint.',
  notMix: 'This material is not a mix.',
} as const

const bases: Record<MixBasis, string> = { weight: 'by weight', volume: 'by volume' }
export const basisText = (basis: MixBasis) => bases[basis]

export const mixWords = {
  title: 'New mix',
  change: (name: string) => `Parts of ${name}`,
  intro: 'Its times start as the mean of its parts, with more doubt. Your own tests then teach it. It carries every caution of every part.',
  name: 'Name',
  basis: 'Measured by',
  part: (at: number) => `Part ${at}`,
  material: 'Material',
  parts: 'Parts',
  private: 'Private: helpers see neither its name nor its share',
  privateHint: 'An own material that is only ever a private part is left out of helpers’ lists as well. Its hazards are told to everybody, without its name.',
  unnamed: 'a part of this mix',
  unnamedFirst: 'A part of this mix',
  add: 'Add a part',
  remove: 'Take it out',
  removePart: (at: number) => `Take out part ${at}`,
  keep: 'Keep the mix',
  keepParts: 'Keep these parts',
  failed: 'What can be mixed could not be fetched.',
  waiting: 'Fetching what can be mixed',
} as const
