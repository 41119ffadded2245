import { ragAnswers } from '#shared/terms'
import { listText } from '#shared/words/group'
import { ragAnswerTexts } from '#shared/words/rags'
import { stepKindWords } from '#shared/words/step-kinds'
import type { ActKind, GoneWay, Hold, MilestoneName, StepKind } from '#shared/terms'

/** A name in the middle of a line: "Second varnish" as "second varnish", but "PVA on the spine" as it is. */
export function lowerFirst(name: string): string {
  const second = name.charAt(1)
  const shouted = second !== second.toLowerCase()
  return shouted ? name : name.charAt(0).toLowerCase() + name.slice(1)
}

/** What hands do in a step: "sand lightly"; for coats, glue-ups and bench work the step's own name: "second varnish". */
export function stepAct(kind: StepKind, name: string): string {
  const { speaks, title } = stepKindWords[kind]
  return lowerFirst(speaks ? title : name)
}

/** A step at the head of a line or behind a colon: "light sanding", "second varnish". */
export function stepLabel(kind: StepKind, name: string): string {
  const { speaks, many } = stepKindWords[kind]
  return speaks ? many : lowerFirst(name)
}

/** What stands where nobody has named a step. */
export const nameless = 'the step without a name'

/** A title inside a sentence: “Oil the neck”. Names are the studio's own and many are commands, which without quotes would run into the sentence. */
export const titled = (name: string) => (name === '' || name === nameless ? nameless : `“${name}”`)

/** A step inside a sentence, as a thing to start: "light sanding", “Second varnish”. */
export function stepNoun(kind: StepKind, name: string): string {
  const { speaks, many } = stepKindWords[kind]
  return speaks ? many : titled(name)
}

const milestones: Record<MilestoneName, string> = {
  'set-to-touch': 'set to touch', 'dust-free': 'dust-free', 'tack-free': 'tack-free', 'at-tack': 'at tack', 'dry-to-handle': 'dry to handle',
  'dry-to-sand-lightly': 'dry to sand lightly', 'dry-to-sand-flat': 'dry to sand flat', 'ready-to-recoat': 'ready to recoat',
  'out-of-clamps': 'out of clamps', 'full-strength': 'full strength', 'cured': 'cured',
}

/** A milestone as the trade says it. */
export function milestoneText(name: MilestoneName): string {
  return milestones[name]
}

/** Keys of the other acts. */
export const actKeys = {
  tacky: 'Still tacky',
  tested: 'I tested it: dry enough',
  out: 'It is out',
  leaveIn: 'Leave it in',
  notYet: 'Not on yet',
  began: 'I am starting',
  moved: 'I moved it',
  notThere: 'Not there',
  seen: 'It is here',
  stripped: 'Stripped',
  checkDone: 'Check done',
  enough: 'That is enough',
  setAside: 'Set aside',
  resume: 'Take up again',
  leaveOut: 'Leave out',
  dropOut: 'A run: goes its own way',
  rejoin: 'Back with the others',
  putOn: 'I put something on',
  warmAir: 'Warm air',
  sun: 'In the sun',
  shade: 'In the shade',
  gone: 'Gone out',
  correct: 'Correct this',
  takeBack: 'Take back',
} as const

/** Keys that say when. Minutes before now; null asks for a time. */
export const timeKeys: readonly { label: string, minutesAgo: number | null }[] = [
  { label: 'now', minutesAgo: 0 }, { label: '10 min ago', minutesAgo: 10 }, { label: '20 min ago', minutesAgo: 20 },
  { label: '30 min ago', minutesAgo: 30 }, { label: '60 min ago', minutesAgo: 60 }, { label: 'other', minutesAgo: null },
]

/** What an act was about, as far as its kind has it. All are shown as given. */
export interface ActDetail {
  step?: string | null
  material?: string | null
  milestone?: MilestoneName | null
  reached?: boolean | null
  hold?: Hold | null
  place?: string | null
  reason?: string | null
  air?: 'sun' | 'shade' | 'warm air' | 'moving' | 'covered' | null
  answer?: string | null
  gone?: GoneWay | null
  batch?: string | null
  /** Parts and faces, where it was not about all of the piece. */
  on?: string[]
}

/** What became of a piece, as a fact. */
export const goneTexts: Record<GoneWay, string> = { 'sold': 'sold', 'given away': 'given away', 'lost': 'lost', 'discarded': 'discarded' }

const outOf: Record<Hold, string> = { clamps: 'out of the clamps', press: 'out of the press', weight: 'out from under the weight' }
const airs = { 'sun': 'in the sun', 'shade': 'in the shade', 'warm air': 'warm air on it', 'moving': 'air moving over it', 'covered': 'covered' }

const named = (fact: string, name: string | null | undefined) => name ? `${fact}: ${lowerFirst(name)}` : fact

function testText({ milestone, reached }: ActDetail): string {
  const rung = milestone ? milestoneText(milestone) : 'dry enough'
  return reached ? `tested: ${rung}` : `tested: not yet ${rung}`
}

function ragsText(answer: string | null | undefined): string {
  const given = ragAnswers.find(each => each === answer)
  return given ? `rags: ${lowerFirst(ragAnswerTexts[given])}` : 'rags answered'
}

const history: Record<ActKind, (detail: ActDetail) => string> = {
  'batch started': () => 'batch started',
  'began': ({ step }) => named('began', step),
  'coat on': ({ step, material }) => named('coat on', step ?? material),
  'glue-up on': ({ step, material }) => named('glue-up on', step ?? material),
  'not on yet': ({ step }) => named('not on yet', step),
  'it is out': ({ hold }) => hold ? outOf[hold] : 'it is out',
  'work done': ({ step }) => named('done', step),
  'turned over': () => 'turned over',
  'check done': ({ step }) => named('check done', step),
  'touch test': testText,
  'stripped': ({ material }) => named('stripped', material),
  'moved': ({ place }) => place ? `moved to ${place}` : 'moved',
  'not there': ({ place }) => place ? `not there: ${place}` : 'not there',
  'seen': ({ place }) => place ? `seen at ${place}` : 'seen',
  'set aside': ({ reason }) => reason ? `set aside: ${reason}` : 'set aside',
  'resumed': ({ step }) => named('taken up again', step),
  'left out': ({ step }) => named('left out', step),
  'dropped out': ({ reason }) => reason ? `goes its own way: ${reason}` : 'goes its own way',
  'rejoined': () => 'back with the others',
  'enough': ({ step }) => named('enough', step),
  'window missed': ({ step }) => named('window missed', step),
  'air': ({ air }) => air ? airs[air] : 'air noted',
  'intake answered': ({ answer }) => answer ? `intake answered: ${answer}` : 'intake answered',
  'room opened': ({ place }) => place ? `opened ${place}` : 'room opened',
  'rags answered': ({ answer }) => ragsText(answer),
  'gone': ({ gone }) => gone ? goneTexts[gone] : 'gone out',
  'back': ({ place }) => place ? `back in the studio: ${place}` : 'back in the studio',
  'regrouped': ({ batch }) => batch ? `put with the batch ${batch}` : 'put with another batch',
  'cancelled': ({ reason }) => reason ? `batch cancelled: ${reason}` : 'batch cancelled',
}

/** Beside an act that was taken back again. */
export const takenBack = 'taken back'

/** What somebody did, for the history of a piece: "coat on: second varnish", "tested: not yet dry to handle". */
export function actText(kind: ActKind, detail: ActDetail = {}): string {
  return history[kind](detail) + (detail.on?.length ? ` (${listText(detail.on.map(lowerFirst))})` : '')
}
