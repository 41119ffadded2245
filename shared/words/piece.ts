import type { MilestonePrediction, ReasonCode } from '#shared/drying/types'
import type { FilmState } from '#shared/schemas/piece-state'
import { milestoneNames } from '#shared/terms'
import type { GoneWay } from '#shared/terms'
import type { ActLine, NameLine, StepLine } from '#shared/schemas/piece-detail'
import { clockTime, roughTime, span } from '#shared/time'
import type { Clock } from '#shared/time'
import { actRefusals } from '#shared/words/acts'
import { listText } from '#shared/words/group'
import { actText, goneTexts, lowerFirst, milestoneText, titled } from '#shared/words/steps'
import { asSentence, predictionReason } from '#shared/words/verdict'
import type { ProblemCode } from '#shared/work/types'

/** The words of the page of one piece. */
export const pieceWords = {
  loading: 'Reading the piece',
  failed: 'The piece could not be read.',
  stale: 'This could not be read again just now. What you see may be older than the studio.',
  absent: 'There is no such piece in this studio.',
  films: 'What is on it',
  nothingOn: 'Nothing on it is drying.',
  layers: 'Layers, the top one first',
  settled: 'dry through',
  now: 'What can be done now',
  ahead: 'The way ahead',
  noSteps: 'No schedule was chosen for it: whatever is put on it shows here.',
  history: 'What was done',
  cautions: 'Cautions',
  batch: 'Batch',
  schedule: 'Schedule',
  order: 'Order',
  place: 'Stands',
  mates: 'Of the same batch',
  whole: 'Move, rename, gone',
  amongGone: 'Among those that are gone',
  nowhere: 'nobody has said where',
  steps: 'Steps',
  lastFilm: 'the last film',
  due: 'due',
  promised: 'promised',
  correct: 'Correct',
  takeBack: 'Take back',
  takeBackTitle: 'Take this back',
  takeBackSays: 'It stays in the history as taken back; everything after it is reckoned again.',
  correctTitle: 'Correct this',
  correctPlace: 'Where it went',
  correctGone: 'What became of it',
  goneSomehow: 'gone out',
  correctWhen: 'When it was done',
  whose: 'Whose time',
  allOfThem: (count: number) => `all ${count}, by as much`,
  both: 'both, by as much',
  onlyThis: (name: string) => `only ${name}`,
  which: 'Which pieces it was',
  whichHint: 'Tap a piece to put the act on it or take it off.',
  noPieces: 'Leave at least one piece, or take the act back.',
  noTime: 'Give a day and a time, or one of the keys.',
  unchanged: 'Nothing is different yet: choose another time, other pieces or other words.',
  save: 'Correct it',
  corrected: (fact: string) => `Corrected: ${fact}.`,
  tookBack: (fact: string) => `Taken back: ${fact}.`,
  beneath: (count: number) => count === 1 ? '1 layer beneath' : `${count} layers beneath`,
  earlier: (count: number) => count === 1 ? '1 earlier act' : `${count} earlier acts`,
  stepsPast: (count: number) => count === 1 ? '1 step is done or left out' : `${count} steps are done or left out`,
  dryThrough: (count: number) => count === 1 ? '1 more is dry through' : `${count} more are dry through`,
  reach: 'Acts can be corrected for 14 days.',
  atTheBench: 'at the bench',
  byItself: 'by the clock',
  oldObject: 'An old object',
  oldSays: 'Until a question is answered it counts as there.',
  lead: 'Was its paint tested for lead?',
  greenCloth: 'Was its green cloth or paper tested for arsenic?',
  mould: 'Was it looked over for mould?',
  metalCoating: 'Is there an old metal coat, and was it tested?',
  intakeTested: 'Tested means by somebody trained for it or a laboratory. A home kit does not count.',
  none: 'tested, none',
  found: 'tested, found',
  notTested: 'not tested',
  answered: 'Answered',
  makersAnswer: 'A maker answers this.',
} as const

/** "Sold Tue 9:00." for a piece that has left. */
export const goneText = (at: number, how: GoneWay | null, clock: Clock) => asSentence(`${how === null ? 'gone out' : goneTexts[how]} ${clockTime(at, clock)}`)

/** "Called Box 3 until Tue 9:00, Moss." */
export const nameBefore = ({ was, at, by }: NameLine, clock: Clock) => `Called ${was} until ${[clockTime(at, clock), by ?? ''].filter(Boolean).join(', ')}.`

const whyUnsure = (reason: ReasonCode | null) => (reason === null ? 'too unsure to promise' : predictionReason(reason))

/** When a film comes to a rung, with its doubt: "likely 14:20, give it till 15:05". @param said a reason that stands beside the rungs already */
export function rungText(rung: MilestonePrediction, clock: Clock, said: ReasonCode | null = null): string {
  const { likelyAt, p90At, reachedAt, reason } = rung
  if (reachedAt !== null) return `so since ${clockTime(reachedAt, clock)}: tested by hand`
  const why = reason !== null && reason === said ? '' : whyUnsure(reason)
  if (likelyAt === null) return [why, 'only after a touch test'].filter(Boolean).join(': ')
  const doubt = p90At === null ? undefined : Math.max(p90At - likelyAt, Math.abs(likelyAt - clock.now) / 4)
  const likely = likelyAt <= clock.now ? 'likely by now' : `likely ${roughTime(likelyAt, clock, 'up', doubt)}`
  if (p90At === null) return why === '' ? `${likely}; test it` : `${likely}; ${why}: test it`
  return p90At <= clock.now ? `since ${roughTime(p90At, clock, 'up', doubt)}` : `${likely}, give it till ${roughTime(p90At, clock, 'up', doubt)}`
}

/** The one reason for which two rungs or more of a film have no promise, to be said once above them; null where each has its own, or none. */
export function sharedReason(rungs: readonly MilestonePrediction[]): ReasonCode | null {
  const open = rungs.filter(rung => rung.reachedAt === null && rung.reason !== null)
  const count = (reason: ReasonCode | null) => open.filter(rung => rung.reason === reason).length
  const [most] = [...open].sort((a, b) => count(b.reason) - count(a.reason))
  return most && count(most.reason) > 1 ? most.reason : null
}

/** "Below the material’s minimum temperature." */
export const reasonSentence = (reason: ReasonCode) => asSentence(predictionReason(reason))

/** "window open till 15:05", "window opens 13:40, shuts 15:05", "window shut at 12:10". */
export function windowText({ opensAt, shutsAt }: { opensAt: number | null, shutsAt: number | null }, clock: Clock): string {
  if (opensAt === null) return 'recoat window: its opening cannot be promised'
  if (shutsAt !== null && shutsAt <= clock.now) return `recoat window shut at ${roughTime(shutsAt, clock, 'down')}`
  const end = shutsAt === null ? 'and does not shut' : `shuts ${roughTime(shutsAt, clock, 'down')}`
  if (opensAt <= clock.now) return shutsAt === null ? 'recoat window open' : `recoat window open, ${end}`
  return shutsAt === null ? `recoat window opens ${roughTime(opensAt, clock, 'up')}` : `recoat window opens ${roughTime(opensAt, clock, 'up')}, ${end}`
}

/** "3 of 9 steps done"; of all of them what is not over yet: "16 of 16 steps done, and “Wax” still dries: cured from Fri". */
export function progressText(done: number, of: number, films: readonly Lying[], clock: Clock): string {
  const says = `${done} of ${of} ${of === 1 ? 'step' : 'steps'} done`
  const still = done < of ? null : stillText(films, clock)
  return still === null ? says : `${says}, and ${still}`
}

type Lying = Pick<FilmState, 'step' | 'material' | 'hold' | 'milestones'>

/** What the last film has before it, the one that is over latest; null where none lies. No promise is later than any. */
function stillText(films: readonly Lying[], clock: Clock): string | null {
  const ends = films.map((film) => {
    const rung = film.milestones.findLast(each => each.reachedAt === null)
    return { film, rung, at: rung?.p90At ?? Number.MAX_VALUE }
  }).filter(each => each.film.hold !== null || (each.rung !== undefined && each.at > clock.now))
  const [last] = ends.sort((a, b) => b.at - a.at)
  if (!last) return null
  const what = last.film.step ? titled(last.film.step) : lowerFirst(last.film.material ?? pieceWords.lastFilm)
  const state = last.film.hold === null ? `${what} still dries` : `${what} is still held`
  const name = milestoneNames.find(each => each === last.rung?.name)
  return name === undefined || last.at === Number.MAX_VALUE || last.at <= clock.now ? state : `${state}: ${milestoneText(name)} from ${roughTime(last.at, clock, 'up')}`
}

/** "Coat on: first paint on the lid top." */
export const factText = (line: Pick<ActLine, 'kind' | 'detail'>) => asSentence(actText(line.kind, line.detail))

/** Between the doing and the telling nobody notices less than this, ms. */
const atOnce = 5 * 60_000

/** "told 20 min later", "told 2 h before", or nothing when it was told at once. */
export function toldText(doneAt: number, toldAt: number): string {
  const minutes = Math.abs(toldAt - doneAt) / 60_000
  if (Math.abs(toldAt - doneAt) < atOnce) return ''
  return `told ${span(minutes)} ${toldAt > doneAt ? 'later' : 'before'}`
}

/** Who did it, as a line of the history says it. */
export function byText({ by, actor }: Pick<ActLine, 'by' | 'actor'>): string {
  if (by !== null) return by
  return actor === 'bench' ? pieceWords.atTheBench : pieceWords.byItself
}

/** "13:40, Moss, told 20 min later". */
export function whenText(line: Pick<ActLine, 'doneAt' | 'toldAt' | 'by' | 'actor'>, clock: Clock): string {
  return [clockTime(line.doneAt, clock), byText(line), toldText(line.doneAt, line.toldAt)].filter(Boolean).join(', ')
}

/** What became of an act that is no longer in force, or null. */
export function fateText(line: ActLine, names: readonly string[], clock: Clock): string | null {
  if (line.correctedAt === null) return null
  const by = line.correctedBy === null ? '' : `, ${line.correctedBy}`
  const when = `${clockTime(line.correctedAt, clock)}${by}`
  if (line.takenBack) return `Taken back ${when}. It does not count.`
  if (!line.inForce) return `Moved off this piece ${when}${names.length === 0 ? '' : `: it was ${names.join(', ')}`}. It does not count here.`
  return `Corrected ${when}.`
}

/** "Before that it read: 14:40, Moss." */
export function wasText(was: ActLine['was'][number], line: ActLine, clock: Clock): string {
  if (!was.here) return `Before that it stood with other pieces: ${clockTime(was.doneAt, clock)}.`
  const other = actText(line.kind, was.detail)
  const fact = other === actText(line.kind, line.detail) ? '' : `${other}, `
  return `Before that it read: ${fact}${[clockTime(was.doneAt, clock), was.by ?? ''].filter(Boolean).join(', ')}.`
}

/** What was foretold at the moment of a test: "Foretold then: likely 14:20, give it till 15:05." */
export function forecastText({ likelyAt, p90At }: NonNullable<ActLine['forecast']>, clock: Clock): string {
  if (likelyAt === null) return 'Foretold then: no time.'
  return `Foretold then: likely ${clockTime(likelyAt, clock)}${p90At === null ? '' : `, give it till ${clockTime(p90At, clock)}`}.`
}

const problems: Record<ProblemCode, string> = {
  'no such step': actRefusals.noStep, 'nothing left to do': actRefusals.nothingLeft, 'no film to test': actRefusals.noFilm,
  'nothing held': actRefusals.nothingHeld, 'before its start': actRefusals.beforeStart, 'still here': actRefusals.notGone,
}

/** Why an act cannot be true since something before it was corrected. */
export const problemText = (why: ProblemCode) => `It cannot be so any more, and does not count. ${problems[why]} Correct it or take it back.`

/** How many acts stand against what was corrected. */
export const problemsText = (count: number) => (count === 1 ? 'One act below cannot be so since a correction.' : `${count} acts below cannot be so since a correction.`)

/** "waits for “Gesso” and “Glue the frame”". */
export const waitsForText = (names: readonly string[]) => (names.length === 0 ? 'waits' : `waits for ${listText(names.map(titled))}`)

/** Why a step that no schedule asked for is there. */
export function originText({ origin, because }: Pick<StepLine, 'origin' | 'because'>, clock: Clock): string | null {
  if (origin === 'schedule') return null
  const when = because === null ? '' : ` ${clockTime(because.doneAt, clock)}${because.by === null ? '' : `, ${because.by}`}`
  if (origin === 'recovery') return `Recovery, put in${when}: the window shut with nobody at it, and its material asks for this first.`
  if (origin === 'branch') return `On its own way, put in${when}: a run on this piece is mended first.`
  return `Put on${when}: no schedule asked for it.`
}

/** "coat 2 of 3" of a round. */
export const roundText = (done: number, of: number) => `${done} of ${of} done`

/** "planned Wed 9:00". */
export const plannedText = (at: number, clock: Clock) => (at < clock.now ? `was planned ${clockTime(at, clock)}` : `planned ${clockTime(at, clock)}`)

/** "done Tue 9:00". */
export const doneText = (at: number | null, clock: Clock) => (at === null ? 'done' : `done ${clockTime(at, clock)}`)

/** That nothing more is begun on a piece, from its history; null where nobody cancelled what was left. */
export function cancelledText(history: readonly Pick<ActLine, 'kind' | 'inForce' | 'doneAt' | 'detail'>[], clock: Clock): string | null {
  const line = history.find(each => each.kind === 'cancelled' && each.inForce)
  return line === undefined ? null : `What was left to do was cancelled ${clockTime(line.doneAt, clock)}${line.detail.reason ? `: ${asSentence(line.detail.reason)}` : '.'}`
}

/** "On its own way since Tue 9:00, from “Second varnish” on." */
export function branchText({ fromStep, sinceAt, rejoined }: { fromStep: string, sinceAt: number, rejoined: boolean }, clock: Clock): string {
  const from = fromStep === '' ? '' : `, from ${titled(fromStep)} on`
  return rejoined ? `It went its own way ${clockTime(sinceAt, clock)}${from}, and is back with the others.` : `On its own way since ${clockTime(sinceAt, clock)}${from}.`
}
