import { handTests } from '#shared/library/hand-tests'
import type { MilestoneName } from '#shared/terms'

/** Where a material's own test of a rung differs from the trade's. */
export interface OwnHandTest { versionId: number, milestone: MilestoneName, text: string | null }

/** How a rung of a material is tested by hand; null where no hand can tell. */
export function handTestOf(own: readonly OwnHandTest[], versionId: number | null, milestone: MilestoneName): string | null {
  const found = own.find(each => each.versionId === versionId && each.milestone === milestone)
  return found ? found.text : handTests[milestone]
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
