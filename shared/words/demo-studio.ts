/** The invented studio on the page: to look at, and to take away whole. */
export const demoStudioWords = {
  title: 'Look at it filled',
  says: 'An invented studio in the middle of a working week: rooms, shelves, pieces drying, a plan, four people who do not exist. It stands beside your own, which stays empty until you fill it.',
  add: 'Look at it filled with an invented studio',
  takes: 'Its weeks are being played through: half a minute or so.',
  thereTitle: (name: string) => `The invented studio ${name}`,
  thereSays: 'It stands beside your own. Whatever is done in it stays in it.',
  turnTo: (name: string) => `Look at ${name}`,
  remove: (name: string) => `Take ${name} away`,
  removeTitle: (name: string) => `Take ${name} away whole?`,
  goes: ({ rooms, batches, pieces, people }: { rooms: number, batches: number, pieces: number, people: number }) => `These go for good: ${rooms} rooms with their places and readings, ${batches} batches, ${pieces} pieces with everything told about them, the plan, the photographs, and its ${people} invented people.`,
  stays: 'Your own studio stays as it is: nothing of it is touched.',
  gone: 'The invented studio is taken away.',
  failed: 'Whether there is an invented studio could not be fetched.',
} as const

/** Why the invented studio was not added or taken away. */
export const demoRefusals = {
  production: 'This installation is set to real work: it takes no invented studio.',
  ofTheDemo: 'You are signed in as one of the invented people. Sign in as yourself.',
  taken: 'Somebody else of this installation looks at the invented studio. It is theirs to take away.',
  again: 'Somebody was at the invented studio a moment ago. Try once more.',
  absent: 'There is no invented studio here.',
} as const
