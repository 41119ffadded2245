import type { PhotoMoment } from '#shared/terms'
import { clockTime } from '#shared/time'
import type { Clock } from '#shared/time'
import { titled } from '#shared/words/steps'

/** Why a photograph is not taken in. */
export const photoRefusals = {
  broken: 'The picture cannot be read: it is broken, or only half of it came. Take it again.',
  tooManyDots: 'The picture has more than 80 million dots. Make it smaller first.',
  noStep: 'Choose one of the piece’s steps, or none.',
  moment: 'A photograph is from before or after a step.',
  caption: 'A caption has at most 200 characters.',
  othersOnly: 'Only a maker can change what somebody else photographed.',
  gone: 'It was taken away more than a day ago and cannot come back.',
  full: 'A piece has room for 100 photographs. Take one away first.',
} as const

/** Photographs of a piece. */
export const photoWords = {
  heading: 'Photographs',
  none: 'None yet. Before and after a step, they show what words do not.',
  take: 'Take a photograph',
  choose: 'Choose pictures',
  which: 'Of which step',
  asItIs: 'The piece as it is',
  moment: 'When',
  before: 'before',
  after: 'after',
  caption: 'Caption',
  hint: 'JPEG, PNG or WebP. Turned upright, made smaller, and the place it was taken is left out.',
  sending: (percent: number) => `Sending, ${percent} %`,
  reading: 'Sent; it is being made smaller',
  waiting: 'Not sent yet: the studio was not reached. It is kept on this page and sent as soon as it can be.',
  again: 'Try again',
  drop: 'Leave it',
  open: (alt: string) => `Open: ${alt}`,
  save: 'Save',
  remove: 'Take away',
  removed: 'Taken away. For a day it can be had back.',
  undo: 'Undo',
  queue: 'On their way',
} as const

const moments: Record<PhotoMoment, string> = { before: photoWords.before, after: photoWords.after }
export const momentWord = (moment: PhotoMoment) => moments[moment]

/** What a picture shows, for those who do not see it: "Box 3 after “First varnish”: the run at the corner". */
export function photoAlt({ step, moment, caption }: { step: string | null, moment: PhotoMoment, caption: string }, piece: string): string {
  const what = step === null ? piece : `${piece} ${moments[moment]} ${titled(step)}`
  return caption === '' ? what : `${what}: ${caption}`
}

/** "Tue 9:00, Moss". */
export const takenText = ({ addedAt, by }: { addedAt: number, by: string | null }, clock: Clock) => [clockTime(addedAt, clock), by ?? ''].filter(Boolean).join(', ')
