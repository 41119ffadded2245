import type { Leg } from '#shared/schedules/way'
import type { MemberWire } from '#shared/schemas/member'
import type { DraftTarget, ScheduleDraft } from '#shared/schemas/schedule-draft'
import { mayDoStep } from '#shared/permissions'
import type { DustClass, Ground, Hold, Risk, StepKind } from '#shared/terms'
import { span } from '#shared/time'
import { waitSpan } from '#shared/words/schedules'
import { lowerFirst, milestoneText, nameless, titled } from '#shared/words/steps'

const sentenceOf = (words: string) => words.charAt(0).toUpperCase() + words.slice(1)
const undoable = (what: string) => lowerFirst(what).replace(/\.$/, '')

/** What the editor of a finishing schedule says. */
export const editorWords = {
  titleNew: 'A new finishing schedule',
  titleOf: (name: string) => `Change ${name}`,
  nameless,
  waiting: 'Fetching the schedule and the materials',
  failed: 'The schedule and the materials could not be fetched.',
  notYours: 'Makers and owners change finishing schedules. You can read this one.',
  reckoning: 'Reckoning the times',
  why: 'Why',
  name: 'Name',
  summary: 'What it is for',
  summaryHint: 'One or two sentences for whoever chooses a schedule. May stay empty.',
  partsTitle: 'Parts and faces',
  steps: 'Steps',
  stepsHint: 'In the order they are done. Each waits for the step before it on its own faces.',
  stepsKeys: 'With the keyboard, Alt and an arrow move a step up or down.',
  none: 'No step yet',
  noneSays: 'Add the first: what is done, with what, and on which faces.',
  addStep: 'Add a step',
  addAfter: 'Add a step after this',
  up: 'Up',
  down: 'Down',
  upOf: (name: string) => `Move up: ${name}`,
  downOf: (name: string) => `Move down: ${name}`,
  copy: 'Copy',
  copyOf: (name: string) => `Copy: ${name}`,
  remove: 'Take out',
  removeOf: (name: string) => `Take out: ${name}`,
  shut: 'Fold up',
  undo: 'Undo',
  undoOf: (what: string) => `Undo: ${undoable(what)}`,
  save: 'Save',
  saveAgain: (no: number) => `Save as edition ${no}`,
  nothing: 'Nothing is different yet.',
  resumed: 'This is your draft from last time. It was not saved yet.',
  leaveDraft: 'Leave the draft',
  leaveTitle: 'Leave this draft',
  leaveSays: 'What you typed goes, and the schedule as it stands comes back.',
  kept: 'Your draft is kept on this device until you save it.',
  older: (of: number, no: number) => `This is edition ${of}. Saving makes it the newest, edition ${no + 1}.`,
  cannot: (count: number) => count === 1 ? '1 thing cannot be' : `${count} things cannot be`,
  figures: (count: number) => count === 1 ? 'One figure cannot be as it is typed. It is said beside it.' : `${count} figures cannot be as they are typed. It is said beside each.`,
  know: (count: number) => count === 1 ? '1 thing to know' : `${count} things to know`,
  toBegin: (count: number) => count === 1 ? '1 thing is still to do' : `${count} things are still to do`,
  toBeginTitle: 'Still to do',
  cannotTitle: 'What cannot be',
  knowTitle: 'What to know',
  show: 'Show the step',
  showOf: (sentence: string) => `Show the step: ${sentence}`,
  conflictTitle: 'Somebody else saved it first',
  conflictKeep: (no: number) => `Save mine on top of edition ${no}`,
  conflictTake: 'Leave mine and take theirs',
  conflictTheirs: 'What they changed',
  conflictSame: 'Nothing that the list would show.',
  changed: (step: string) => sentenceOf(`${titled(step)} changed.`),
  added: (step: string) => sentenceOf(`${titled(step)} added.`),
  moved: (step: string, by: -1 | 1) => sentenceOf(`${titled(step)} moved ${by < 0 ? 'up' : 'down'}.`),
  copied: (step: string) => sentenceOf(`${titled(step)} copied.`),
  removed: (step: string) => sentenceOf(`${titled(step)} taken out.`),
  waitChanged: (step: string) => `What ${titled(step)} waits for is changed.`,
  waitGone: (step: string) => sentenceOf(`${titled(step)} waits for one step less.`),
  undone: (what: string) => `Undone: ${undoable(what)}.`,
  aboutChanged: 'Name and use changed.',
  partChanged: (part: string) => `${part === '' ? 'A part' : part} changed.`,
  partAdded: (part: string) => `Part ${part} added.`,
  partRemoved: (part: string) => `Part ${part} taken out.`,
} as const

/** What the sheet that adds a step says, and the fields of one. */
export const stepFields = {
  kind: 'What is done',
  material: 'With what',
  find: 'Find a material',
  findHint: 'A few letters of its name or kind.',
  noMaterial: 'No material of the studio has these letters.',
  wantsMaterial: 'Choose what is laid.',
  wantsFaces: 'Choose what it is done on.',
  wantsTwo: 'Choose the two or more parts that are glued together.',
  on: 'On',
  glued: 'What is glued together',
  whole: (part: string) => `${part}, all of it`,
  size: 'How thick',
  put: 'Put it in',
  more: 'Ground, place, hands and dust',
  name: 'Name of the step',
  ground: 'What it goes on',
  hold: 'What holds it',
  place: 'Rests in or on',
  noPlace: 'anywhere',
  often: 'How often',
  perDay: 'Times a day',
  days: 'Days',
  untilEnough: 'Until it is enough',
  untilEnoughHint: 'The maker sees when the round is full and ends it with one tap.',
  minutes: 'Minutes of hands',
  setup: 'Set up, once',
  piece: 'Each piece',
  clean: 'Clean up, once',
  release: 'Take out, each piece',
  hands: 'Pairs of hands',
  dust: 'Dust it makes',
  whoChange: 'Change what helpers may do',
  runOver: 'May run over closing time',
  runOverHint: 'Work that can be left lying and taken up again.',
  checks: 'Checks while it rests',
  checksHint: 'Looks in the middle of a rest: change the blotters, look along the light.',
  checkName: 'What is looked at or done',
  checkAfter: 'Minutes after the work',
  checkMinutes: 'Minutes it takes',
  nextMorning: 'Next morning',
  after30: '30 min',
  after120: '2 h',
  addCheck: 'Add a check',
  wantsCheck: 'Say what is looked at or done.',
  checkThere: (name: string) => `At that time there is a check already: ${lowerFirst(name)}. Give another time, or take that one out.`,
  removeCheck: (name: string) => `Take out the check ${name}`,
  take: 'Take out',
  checkNames: ['Look along the light', 'Change the blotters'],
} as const

/** What the waits of a step say. */
export const waitFields = {
  title: 'What it waits for',
  nothing: 'It waits for nothing: it may begin at once.',
  until: 'Until',
  work: 'its work is done',
  by: 'Goes by',
  window: 'Inside the recoat window',
  windowNone: 'Its sheet has no recoat window.',
  missed: (recovery: string, minutes: number) => `Missed: ${lowerFirst(recovery)}, ${minutes} min, is put in by itself.`,
  missedNone: 'Missed: its sheet asks for nothing.',
  agree: 'What to do when it is missed',
  recovery: 'What is done',
  recoveryMin: 'Minutes a piece',
  plan: 'Do it always, as a step',
  another: 'Wait for another step',
  which: 'Which step',
  add: 'Add the wait',
  removeOf: (name: string) => `No more waiting for ${name}`,
  remove: 'No wait',
  after: (name: string) => `After ${titled(name)}`,
  none: 'There is no other step it could wait for.',
} as const

/** What the parts of the thing say. */
export const partFields = {
  hint: 'A part has a branch of steps of its own until a step joins it to another.',
  part: 'Name of the part',
  grip: 'Where it is held while wet',
  gripHint: 'Back, edges, neck: what a helper reads.',
  faces: 'Faces',
  faceName: (no: number) => `Face ${no}`,
  addFace: 'Add a face',
  addFaceTo: (part: string) => `Add a face to ${part}`,
  newFace: 'New face',
  removeFace: (name: string) => `Take out the face ${name}`,
  addPart: 'Split off a part',
  addTitle: 'A part with a branch of its own',
  meets: 'Where it meets the rest',
  meetsHint: 'That step works on both from then on. Steps put on the part before it are its branch.',
  meetsLater: 'Say it later',
  add: 'Add the part',
  addOn: (name: string) => `Add a step on ${name}`,
  removePart: (name: string) => `Take out the part ${name}`,
  wantsName: 'Give the part a name.',
  wantsFace: 'Give the face a name.',
  take: 'Take out',
  firstName: 'Piece',
  firstFaces: ['Front', 'Back', 'Edges'],
} as const

export const groundWords: Record<Ground, string> = { 'porous': 'Porous', 'primed': 'Primed', 'sealed': 'Sealed', 'non-absorbent': 'Non-absorbent' }
export const holdNames: Record<Hold | 'free', string> = { clamps: 'Clamps', press: 'Press', weight: 'Weight', free: 'Nothing' }
export const dustWords: Record<DustClass, string> = { none: 'None', some: 'Some', much: 'Much' }
export const riskWords: Record<Risk, string> = { likely: 'Likely', p90: 'Give it till', p98: 'The slowest' }
export const riskSays: Record<Risk, string> = { likely: 'half are ready', p90: '9 in 10 are ready', p98: '98 in 100 are ready' }

/** Who may do a step: "Makers and owners. Of the helpers: Hazel." */
export function whoText(kind: StepKind, members: readonly MemberWire[]): string {
  const helpers = members.filter(member => member.role === 'helper')
  const may = helpers.filter(member => mayDoStep('helper', member.stepKinds, kind)).map(member => member.name)
  if (helpers.length === 0) return 'Makers and owners may do it.'
  return may.length === 0 ? 'Makers and owners may do it, no helper.' : `Makers and owners may do it, and of the helpers ${may.join(', ')}.`
}

/** What the drawing and the list call a set of faces: "front, edges of the cover". */
export function facesText(targets: readonly DraftTarget[], { parts }: Pick<ScheduleDraft, 'parts'>): string {
  const said = parts.flatMap((part) => {
    const own = targets.filter(target => target.part === part.key)
    if (own.length === 0) return []
    const faces = own.flatMap(target => part.faces.find(face => face.key === target.face)?.name ?? []).map(lowerFirst)
    return [faces.length === 0 ? part.name : `${part.name} (${faces.join(', ')})`]
  })
  return said.join(', ')
}

export const reasonWords = {
  title: 'Why it takes so long',
  intro: 'The longest way through, step by step. All else fits in beside it.',
  air: (temp: string, humidity: string) => `Reckoned for one piece around the clock, in the studio’s usual air: ${temp}, ${humidity} humidity. Nights and closing hours come on top.`,
  endless: 'A wait has no end in this air, so there is no end to add up to.',
  hands: 'Hands-on',
  handsIntro: 'Attended minutes, every coat of a round set up anew.',
  lastFilm: 'Last film dry to handle',
  step: 'Step', wait: 'Waits', work: 'Work', whole: 'Batch', each: 'Piece',
} as const

/** Why a leg of the longest way waits: "until “Ground” is dry to sand lightly". */
export function legText({ because }: Leg, nameOf: (key: string) => string): string {
  if (because === null) return 'begins at once'
  const from = titled(nameOf(because.from))
  switch (because.code) {
    case 'milestone': return `until ${from} is ${milestoneText(because.milestone)}`
    case 'window': return `for the window after ${from}`
    case 'held': return `until ${from} is free`
    case 'work': return `after ${from}`
  }
}

/** "3 h 20 min" of waiting, "at once" for none. */
export const legWait = (minutes: number) => (minutes <= 0 ? '–' : waitSpan(minutes))
export const legWork = (minutes: number) => (minutes <= 0 ? '–' : span(minutes))

/** What the list of editions says. */
export const editionWords = {
  title: (name: string) => `Editions of ${name}`,
  link: 'Editions and what changed',
  change: 'Change it',
  copy: 'Copy it',
  failed: 'The editions of this schedule could not be fetched.',
  waiting: 'Fetching the editions',
  edition: (no: number) => `Edition ${no}`,
  newest: 'the newest',
  library: 'From the starter library',
  madeBy: (by: string, when: string) => `${by}, ${when}`,
  first: 'The first.',
  kept: (pieces: number) => pieces === 0 ? 'No piece was started with it.' : pieces === 1 ? '1 piece was started with it and keeps to it.' : `${pieces} pieces were started with it and keep to it.`,
  again: (no: number) => `Go on from edition ${no}`,
  back: (name: string) => `Back to ${name}`,
  new: 'New schedule',
  putAway: 'Put it away',
  putAwayTitle: 'Put this schedule away',
  putAwaySays: 'Pieces on it go on with it. Nothing new starts with it until it is taken out again.',
  shelf: (count: number) => `Put away: ${count}`,
  takeOut: 'Take it out again',
  takeOutOf: (name: string) => `Take it out again: ${name}`,
} as const

/** The offer to keep what was done as a schedule. */
export const keepWords = {
  title: 'Keep this as a finishing schedule?',
  says: (piece: string, times: number) => `What is on ${piece} was put on alike ${times === 1 ? 'once' : `${times} times`}, without a schedule.`,
  key: 'Look at it and keep it',
  dismiss: 'Not this',
  ofPiece: 'Keep this as a finishing schedule',
} as const
