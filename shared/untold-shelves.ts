/** Where a device keeps acts that are not told yet, and those that were refused late, by the names of its storage. A person's taps and a bench tablet's lie apart on a device that is both. */
export const untoldShelves = {
  own: { acts: 'stillwet untold', refused: 'stillwet refused' },
  bench: { acts: 'stillwet untold at the bench', refused: 'stillwet refused at the bench' },
} as const
