import type { MilestoneName } from '#shared/terms'

/** The trade's usual test by hand for each milestone; null where none tells. */
export const handTests: Record<MilestoneName, string | null> = {
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
