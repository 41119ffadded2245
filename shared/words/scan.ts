/** Reading a tag by the camera, or its letters by hand. */
export const scanWords = {
  title: 'Scan a tag with the camera',
  picture: 'What the camera sees',
  starting: 'The camera is starting.',
  looking: 'Hold the tag of a shelf, a carrier or a piece before the camera.',
  nothing: 'Nothing found yet. Come nearer, hold still, and let light fall on the tag.',
  asking: 'Looking up the tag.',
  none: 'This device has no camera that a browser may use. Type the letters on the tag.',
  refused: 'The browser was told not to use the camera. Allow it for this page in the browser, or type the letters on the tag.',
  failed: 'The camera does not start; another program may be using it. Type the letters on the tag.',
  insecure: 'Over plain http a browser gives no camera. Type the letters on the tag, or ask for https.',
  again: 'Try the camera again',
  typed: 'Letters on the tag',
  typedHint: 'Five letters and figures, such as K7MP4. Small letters do.',
  read: 'Go to it',
  pick: 'Choose what stands there',
  foreign: (text: string) => `This is not a tag of this studio. It says: ${text}`,
  otherHost: (host: string) => `This piece’s tag leads to ${host}, which is another installation.`,
  noPiece: 'This piece is not in the studio any more.',
  several: 'Several tags are in sight. Which one?',
  elsewhere: (studio: string) => `This tag belongs to ${studio}, another of your studios.`,
  go: 'Go there',
  unreached: 'The tag could not be looked up. Try again.',
  bare: (name: string) => `Nothing stands on ${name}, as far as anybody has told.`,
  picked: (name: string, count: number) => `${name}: ${count === 1 ? 'one piece' : `${count} pieces`} chosen.`,
} as const

/** A code's text as far as a line holds it. */
export const shortly = (text: string) => (text.length > 60 ? `${text.slice(0, 57)}…` : text)
