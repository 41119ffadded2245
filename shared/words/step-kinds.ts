import type { StepKind } from '#shared/terms'

interface StepKindWords {
  /** A step of the kind that nobody has named: “Sand lightly”. */
  title: string
  /** The kind under a step’s name: “coat”. */
  one: string
  /** The kind as work somebody does: “coats”. */
  many: string
  /** The key that says the common fact: what a thumb presses when it is done. */
  done: string
  /** Whether the kind says what hands do; else the step’s own name does. */
  speaks: boolean
}

/** How each kind of step is called wherever it is named. */
export const stepKindWords: Record<StepKind, StepKindWords> = {
  'coat': { title: 'Coat', one: 'coat', many: 'coats', done: 'Coat is on', speaks: false },
  'glue-up': { title: 'Glue up', one: 'glue-up', many: 'glue-ups', done: 'Glue-up is on', speaks: false },
  'light sanding': { title: 'Sand lightly', one: 'light sanding', many: 'light sanding', done: 'Sanded', speaks: true },
  'flat sanding': { title: 'Sand flat', one: 'flat sanding', many: 'flat sanding', done: 'Sanded flat', speaks: true },
  'levelling': { title: 'Level', one: 'levelling', many: 'levelling', done: 'Levelled', speaks: true },
  'turn over': { title: 'Turn over', one: 'turn over', many: 'turning over', done: 'Turned over', speaks: true },
  'bench work': { title: 'Bench work', one: 'bench work', many: 'bench work', done: 'Done', speaks: false },
  'packing': { title: 'Pack', one: 'packing', many: 'packing', done: 'Packed', speaks: false },
}
