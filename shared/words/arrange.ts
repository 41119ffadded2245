import { listText } from '#shared/words/group'

/** Why rooms and places stay as they are. */
export const arrangeRefusals = {
  meanwhile: 'Somebody else changed the rooms or places meanwhile. This is how they stand now; do yours again.',
  others: 'These are not the rooms and places of the studio. Load the page again.',
  shape: 'Give all rooms with all their places, each with its number and what it holds.',
  otherRoom: (place: string, pieces: readonly string[]) => `${place} stays in its room while pieces stand there: ${listText(pieces)}. Empty it first.`,
  tooSmall: (place: string, needed: number, pieces: readonly string[]) => `${place} holds ${needed} now: ${listText(pieces)}. Move something first.`,
} as const

/** Rooms and places arranged on the drawing. */
export const arrangeWords = {
  title: 'Arrange rooms and places',
  says: 'Drag a place by its handle to where it stands, also into another room, or use its keys. What is done here is kept at once and can be undone.',
  notYours: 'Makers and owners arrange rooms and places.',
  failed: 'The studio could not be drawn.',
  waiting: 'Drawing the studio',
  keysOf: (place: string) => `Keys of ${place}`,
  hold: (place: string) => `Drag ${place}; arrow keys move it`,
  earlier: (name: string) => `${name}: earlier`,
  later: (name: string) => `${name}: later`,
  capacity: (place: string) => `Places on ${place}`,
  addShelf: 'Add a shelf',
  addShelfTo: (room: string) => `Add a shelf to ${room}`,
  addOther: 'Another kind of place',
  addOtherTo: (room: string) => `Another kind of place in ${room}`,
  shelf: 'Shelf',
  drop: 'It comes here',
  noPlaces: 'No places yet. Add a shelf.',
  undo: 'Undo',
  undoOf: (what: string) => `Undo: ${what}`,
  saving: 'Keeping it',
  again: 'Try again',
  back: 'Leave it as it was',
  board: 'To the board',
  moved: (place: string, room: string, no: number, of: number) => `${place}: ${no} of ${of} in ${room}.`,
  roomMoved: (room: string, no: number, of: number) => `${room}: room ${no} of ${of}.`,
  holds: (place: string, capacity: number) => `${place} has ${capacity} ${capacity === 1 ? 'place' : 'places'}.`,
  added: (place: string, room: string) => `${place} is added to ${room}.`,
  undone: (what: string) => `Undone: ${what}`,
} as const
