import { pinLength, wrongPins } from '#shared/bench/pin'

/** Why something was not done at a bench tablet, or about one. */
export const benchRefusals = {
  notPaired: 'This tablet is not signed in to a studio. Make a code under Settings, Bench tablets.',
  locked: 'The tablet is locked. Open it with a PIN, then say it again.',
  codeWrong: 'This code opens nothing. It may have run out: make a new one under Settings, Bench tablets.',
  code: 'Type the code of eight letters and figures, such as CDF3-GH47.',
  pinWrong: 'This PIN does not fit.',
  pinDigits: 'A PIN has figures only.',
  pinLength: `A PIN has ${pinLength.least} to ${pinLength.most} figures.`,
  pinGuessed: 'All the same, or a run such as 1234, is what everybody tries first. Choose another.',
  pinLocked: (time: string) => `${wrongPins} wrong PINs. This PIN works again at ${time}; at once if a new one is set under Settings, Bench tablets.`,
  wantsPerson: 'This is recorded under a name. Say who you are with your PIN.',
  otherPerson: 'This was pressed under a name that no longer acts here. Give the PIN, then say it again.',
  solventWantsPerson: 'Solvent work is begun by a named person, who opens the room again. Say who you are with your PIN.',
  ownBench: 'Only what was told at the bench without a name can be taken back here without one.',
  absent: 'There is no such bench tablet in this studio.',
  noCode: 'A new code is for a tablet that waits to be signed in; there is no such tablet here. Set up another one.',
  name: 'Give the tablet a name, such as the bench it stands on.',
  lockMin: 'The time until it locks is a whole number of minutes from 1 to 60.',
  member: 'Choose who you are.',
} as const
