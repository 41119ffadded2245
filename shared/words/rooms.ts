/** What is said about a room that nobody enters until a named person opens it. */
export const roomWords = {
  makersOnly: 'A maker or an owner opens a room that was shut.',
  isOpen: (room: string) => `${room} is not shut any more.`,
  opensBy: (room: string, name: string) => name === '' ? `${room} is opened by an owner.` : `${room} is opened by ${name} or an owner. Ask first.`,
  shut: (room: string) => `Keep out of ${room}`,
  since: (time: string, name: string | null) => name === null ? `Shut since ${time}. A maker opens it.` : `Shut since ${time}. ${name} opens it, or an owner.`,
  open: (room: string) => `Open ${room}`,
  ask: 'Look in yourself first, with the exhaust on. Follow the data sheet and your local rules. If in doubt, leave it shut.',
  nothingToShut: (room: string) => `${room} was not opened in the last day, so there is nothing to take back.`,
  shutAgain: (room: string) => `Shut ${room} again`,
  openedBy: (room: string, name: string | null, time: string) => name === null ? `${room} was opened ${time}.` : `${name} opened ${room} ${time}.`,
  opened: (room: string) => `${room} is open again.`,
} as const
