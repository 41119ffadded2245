import { listText } from '#shared/words/group'
import { lowerFirst } from '#shared/words/steps'

/** Faces that one tap gives a part. */
export const faceNames = ['Front', 'Back', 'Outside', 'Inside', 'Top', 'Edges'] as const
export type FaceName = typeof faceNames[number]

const row = (name: string, count = 1, faces: readonly FaceName[] = []) => ({ name, count, faces })

/** What a thing with many parts may begin as; `thing` names the batch where nobody has. */
export const partShapes = {
  one: { label: 'One piece', thing: '', rows: [] },
  box: { label: 'Box and lid', thing: 'Box', rows: [row('Box', 1, ['Outside', 'Inside']), row('Lid', 1, ['Outside', 'Inside'])] },
  book: { label: 'Book in sections', thing: 'Book', rows: [row('Section', 6), row('Cover', 1, ['Outside', 'Inside']), row('Spine')] },
  dresser: { label: 'Dresser', thing: 'Dresser', rows: [row('Carcase', 1, ['Outside', 'Inside']), row('Drawer', 3), row('Door', 2, ['Front', 'Back']), row('Top')] },
  own: { label: 'Parts of your own', thing: '', rows: [row('')] },
} as const

/** The form for a thing with many parts. */
export const partWords = {
  title: 'What each is made of',
  hint: 'A coat can go on one part, several or all of them.',
  start: 'Begin with',
  nameOf: (no: number) => `Name of part ${no}`,
  count: (name: string) => `How many${name === '' ? '' : ` of ${lowerFirst(name)}`}`,
  faces: (name: string) => `Faces of ${name === '' ? 'this part' : lowerFirst(name)}`,
  facesHint: 'None ticked: coated all over at once.',
  another: 'Another part',
  remove: (name: string) => `Take away ${name === '' ? 'this part' : lowerFirst(name)}`,
  take: 'Take away',
  back: 'Put it back',
  taken: (name: string) => `${name === '' ? 'The part' : name} is taken away.`,
  so: (parts: number, names: string) => parts === 1 ? `One part: ${names}.` : `${parts} parts: ${names}.`,
} as const

/** What a line of the form wants. */
export const partMistakes = {
  name: 'Give this part a name, such as lid.',
  count: 'Give a whole number, from 0 to 20.',
  same: (other: number, name: string) => `Part ${other} is already ${lowerFirst(name)}. Give this part another name, or count it with part ${other}.`,
  none: 'Count at least one part.',
  many: 'A piece has at most 24 parts. Count some of them together.',
} as const

/** Which parts and faces something went on. */
export const partChoice = {
  parts: 'On which parts',
  all: 'All parts',
  faces: 'On which faces',
  allFaces: 'All over',
  now: (parts: readonly string[], faces: readonly string[]) => `On ${[...parts.length === 0 ? [] : [listText(parts.map(lowerFirst))], ...faces.length === 0 ? [] : [listText(faces.map(lowerFirst))]].join(', ') || 'all of it'}: change`,
  failed: 'The faces could not be fetched. What you tell now counts for all of them.',
  waiting: 'Fetching the faces',
  begin: 'Something that is not here yet',
} as const
