const list = (names: readonly string[]) => names.length > 3 ? `${names.slice(0, 3).join(', ')} and ${names.length - 3} more` : names.join(', ')

/** Why a setting stays as it is. */
export const settings = {
  wrongPair: 'This address and password do not fit together.',
  emailTaken: 'Somebody has this address already. Sign in, then open the link again.',
  installed: 'There is a studio here already. Ask its owner for an invitation.',
  personMissing: 'Give your name, address and a password.',
  notYourStudio: 'You do not belong to that studio.',
  memberAbsent: 'There is no such person in this studio.',
  lastOwner: 'A studio needs an owner. Make somebody else owner first.',
  invitationAbsent: 'This invitation has been used, withdrawn or has run out. Ask for a new one.',
  invitationForOther: 'This invitation is for another address.',
  alreadyMember: 'You belong to this studio already.',
  roomAbsent: 'There is no such room in this studio.',
  placeAbsent: 'There is no such place in this studio.',
  roomTaken: (name: string) => `There is a room called ${name} already.`,
  placeTaken: (name: string) => `This room has a place called ${name} already.`,
  roomHasPlaces: (names: readonly string[]) => `Take its places away first: ${list(names)}.`,
  roomHasHistory: 'Work has been done in this room, and its history names it. Rename it instead.',
  placeInUse: (pieces: readonly string[]) => `These stand here now: ${list(pieces)}. Move them first.`,
  placeHasHistory: 'Pieces have stood here, and their history names this place. Rename it instead.',
  placeTooSmall: (needed: number, pieces: readonly string[]) => `What stands here now takes up ${needed}: ${list(pieces)}. Move something first.`,
  fireStays: 'Calls about fire cannot be switched off.',
  ownAbsenceOnly: 'You may set your own days off. Ask an owner for those of the studio.',
} as const
