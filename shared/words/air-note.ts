/** A note of the air in a word, from the board. */
export const airNoteWords = {
  title: (room: string) => `Air in ${room}`,
  noted: (room: string, word: string) => `Noted in ${room}: ${word}.`,
  undo: 'Undo',
  figures: 'With a meter: note the figures',
} as const
