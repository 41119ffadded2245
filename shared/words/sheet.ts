import { briefCautions } from '#shared/library/brief-cautions'
import { listText } from '#shared/words/group'

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

/** "Spray room and Bench: wet solvent film." with what it asks for, in two pieces. */
export function sheetVapour(rooms: readonly string[], brief: readonly string[]): { head: string, says: string } {
  return { head: `${listText(rooms)}: wet solvent film.`, says: brief.map(each => `${each}.`).join(' ') }
}

/** "Oily rags in Bench since 13:40." and what is still to be said, in two pieces. */
export function sheetRags(room: string, since: string): { head: string, says: string } {
  return { head: `Oily rags in ${room} since ${since}: nobody has said where they are.`, says: `${briefCautions(['oily rags'])[0]}.` }
}

/** "Spray room: keep out." and who opens it, in two pieces. No time: none may read as leave to enter. */
export function sheetKeepOut(rooms: readonly string[], opensBy: string | null): { head: string, says: string } {
  return { head: `${listText(rooms)}: keep out.`, says: `${opensBy ?? 'A maker'} opens ${rooms.length === 1 ? 'it' : 'them'}.` }
}
