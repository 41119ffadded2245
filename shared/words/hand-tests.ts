import type { MilestoneName } from '#shared/terms'

/** How the trade tests a rung by hand; null where no hand can tell. A material may have its own. */
export const usualHandTests: Record<MilestoneName, string | null> = {
  'set-to-touch': 'A light fingertip at an edge comes away clean.',
  'dust-free': 'A fibre dropped on it can be blown off.',
  'tack-free': 'A tissue pressed on it leaves no fibres.',
  'at-tack': 'A knuckle drawn across it squeaks and comes away clean.',
  'dry-to-handle': 'A thumb pressed and turned a quarter leaves no mark.',
  'dry-to-sand-lightly': 'Fine paper lifts dry powder and does not clog.',
  'dry-to-sand-flat': 'Paper on a block lifts dry powder all over and does not clog.',
  'ready-to-recoat': 'It is no longer cool to the back of the hand.',
  'out-of-clamps': 'The line of squeezed-out glue is firm under a fingernail.',
  'full-strength': null,
  'cured': 'It has no smell, and a fingernail leaves no dent at an edge.',
}

/** Where a material's own test of a rung differs from the trade's. */
export interface OwnHandTest { versionId: number, milestone: MilestoneName, text: string | null }

/** How a rung of a material is tested by hand; null where no hand can tell. */
export function handTestOf(own: readonly OwnHandTest[], versionId: number | null, milestone: MilestoneName): string | null {
  const found = own.find(each => each.versionId === versionId && each.milestone === milestone)
  return found ? found.text : usualHandTests[milestone]
}

export const testWords = {
  label: (rung: string) => `Test by hand: ${rung}`,
  fold: 'Test this film by hand',
  rung: 'Another rung',
  about: (rung: string, names: string) => `${rung}, ${names}`,
} as const

/** What the two keys of a test say: both as easy to press. */
export function testKeys(milestone: MilestoneName): { yes: string, no: string } {
  switch (milestone) {
    case 'at-tack': return { yes: 'At tack', no: 'Not yet' }
    case 'out-of-clamps': return { yes: 'Firm', no: 'Leave it in' }
    case 'full-strength': case 'cured': return { yes: 'Through', no: 'Not yet' }
    default: return { yes: 'Dry enough', no: 'Still tacky' }
  }
}

export const witnessWords = {
  title: 'Witness boards',
  says: 'A board coated alongside is touched in place of the piece, and speaks for every piece of its coat.',
  add: 'A witness board too',
  added: (name: string) => `${name} lies beside it: test the board, not the piece.`,
  beside: (what: string, names: string) => `beside ${what}, ${names}`,
  name: (no: number) => `Witness board ${no}`,
  putAway: 'Put it away',
  putAwayLabel: (name: string) => `Put ${name} away`,
} as const

export const witnessRefusals = {
  noCoat: 'There is no wet coat of this kind that a board could speak for.',
  tested: 'This board has been tested: its tests are part of the coat’s history.',
  notIts: 'This board does not lie beside the coat that is named.',
} as const
export const witnessFields = { act: 'Name the coat by its act.' } as const
