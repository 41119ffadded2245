/** What the handling sheet says by itself; it is read from the far side of a room. */
export const sheetWords = {
  title: 'What may be handled',
  ofRoom: (room: string) => `${room}: what may be handled`,
  allRooms: 'All rooms',
  rooms: 'Which room',
  choose: 'Rooms',
  loading: 'Asking the studio',
  failed: 'The studio did not answer. Handle nothing on the word of this page.',
  revoked: 'This link opens nothing any more.',
  revokedSays: 'Ask the owner for a new one. Until then, ask before you handle anything.',
  empty: 'Nothing stands here.',
  emptySays: 'No piece has been put in this room.',
  nowhere: 'Without a place',
  somebody: 'somebody',
  board: 'Board',
  pages: 'Pages',
  back: 'Back',
  on: 'On',
  stop: 'Stop turning',
  turn: 'Turn by itself',
  page: (page: number, of: number) => `${page} of ${of}`,
} as const

/** "Spray room: keep out." and who opens it, in two pieces. No time: none may read as leave to enter. */
export function sheetKeepOut(room: string, opensBy: string | null): { head: string, says: string } {
  return { head: `${room}: keep out.`, says: `${opensBy ?? 'A maker'} opens it.` }
}
