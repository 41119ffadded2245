import { leavesFilm } from '#shared/step-kinds'
import type { Job, JobPiece } from '#shared/hands'
import type { ActRequest, TellableKind } from '#shared/schemas/act'
import type { FilmState } from '#shared/schemas/piece-state'
import type { MilestoneName, StepKind } from '#shared/terms'
import { stepKindWords } from '#shared/words/step-kinds'
import { actKeys } from '#shared/words/steps'
import { handsWords } from '#shared/words/hands'

/** One key of a job: what it says, and the act a press of it tells. `needs` is asked for first. */
export interface ActChoice { label: string, kind: TellableKind, body: ActRequest['body'], hint?: string, needs?: 'reason', perPart?: boolean }

/** `tests` is the rung that a test by hand may speak about beside the keys; null where the keys themselves ask. */
export interface JobActs { tests: MilestoneName | null, main: ActChoice | null, second: ActChoice | null, more: ActChoice[] }

/** What the person at the page may do: steps of this kind, and what only makers do. */
export interface Hands { step: boolean, maker: boolean, solventRoom?: boolean }

const doneKinds: Partial<Record<StepKind, TellableKind>> = { 'coat': 'coat on', 'glue-up': 'glue-up on', 'turn over': 'turned over' }

/** The films on the parts a job is about, on the pieces given. */
export function filmsOf(pieces: readonly JobPiece[]): FilmState[] {
  return pieces.flatMap(({ read, turn }) => read.piece.groups.flatMap(group => group.films.filter(film => film.partIds.some(id => turn.turn.partIds.includes(id)))))
}

function doneAct(job: Job): ActChoice {
  const { step } = job.turn
  if (job.kind === 'release') return { label: actKeys.out, kind: 'it is out', body: {} }
  if (job.kind === 'check') return { label: actKeys.checkDone, kind: 'check done', body: { step: step.key } }
  return { label: stepKindWords[step.kind].done, kind: doneKinds[step.kind] ?? 'work done', body: { step: step.key } }
}

function tests(job: Job): { tested: ActChoice, tacky: ActChoice } | null {
  const milestone = job.tests ?? (job.doubtful ? 'dry-to-handle' : null)
  if (milestone === null) return null
  const act = (label: string, reached: boolean): ActChoice => ({ label, kind: 'touch test', body: { milestone, reached }, perPart: true })
  return { tested: act(actKeys.tested, true), tacky: act(job.kind === 'release' ? actKeys.leaveIn : actKeys.tacky, false) }
}

/** What only now and then happens to what is drying. */
function filmActs(films: readonly FilmState[], solventRoom: boolean): ActChoice[] {
  const drying = films.filter(film => film.hold === null)
  if (drying.length === 0) return []
  const air = (label: string, kind: 'warm air' | 'sun' | 'shade', hint?: string): ActChoice => ({ label, kind: 'air', body: { kind }, hint, perPart: true })
  // Warm air feeds the vapour of a solvent film: it is not offered there, nor beside one in the same room.
  const warm = solventRoom || drying.some(film => film.solventBorne) ? [] : [air(actKeys.warmAir, 'warm air', handsWords.warmHint)]
  const run: ActChoice[] = drying.some(film => film.kind === 'coat') ? [{ label: handsWords.run, kind: 'dropped out', body: {}, hint: handsWords.runHint }] : []
  return [...run, ...warm, air(actKeys.sun, 'sun'), air(actKeys.shade, 'shade')]
}

function stepActs(job: Job): ActChoice[] {
  const { step } = job.turn
  const body = { step: step.key }
  if (job.kind !== 'work') return []
  if (step.status === 'set aside') return [{ label: actKeys.leaveOut, kind: 'left out', body }]
  return [
    ...step.untilEnough && job.turn.no > 1 ? [{ label: actKeys.enough, kind: 'enough' as const, body, hint: handsWords.enoughHint }] : [],
    { label: actKeys.setAside, kind: 'set aside', body, needs: 'reason' },
    { label: actKeys.leaveOut, kind: 'left out', body, hint: handsWords.leaveOutHint },
  ]
}

/** The keys in the order of how likely each is; the first two stand on the sheet, the others under More. */
function ranked(job: Job): { act: ActChoice, who: 'step' | 'maker' | 'anybody' }[] {
  const done = { act: doneAct(job), who: 'step' as const }
  const found = tests(job)
  const tested = found ? [{ act: found.tested, who: 'anybody' as const }] : []
  const tacky = found ? [{ act: found.tacky, who: 'anybody' as const }] : []
  const { step } = job.turn
  const film = leavesFilm(step.kind)
  const notYet = { act: { label: film ? actKeys.notYet : handsWords.stopped, kind: 'not on yet' as const, body: { step: step.key } }, who: 'step' as const }
  const began = job.kind === 'work' && job.turn.status === 'waiting' ? [{ act: { label: actKeys.began, kind: 'began' as const, body: { step: step.key } }, who: 'step' as const }] : []
  if (step.status === 'set aside') return [{ act: { label: actKeys.resume, kind: 'resumed', body: { step: step.key } }, who: 'maker' }]
  if (job.turn.status === 'doing') return [done, notYet]
  if (job.doubtful) return [...tested, { act: { label: actKeys.stripped, kind: 'stripped', body: {}, perPart: true }, who: 'maker' }, ...tacky, done]
  if (job.kind === 'release') return [done, ...tacky, ...tested]
  if (job.kind === 'check') return [done]
  return job.due ? [done, notYet, ...began] : [done, ...began]
}

/** A test by hand stands beside the keys of work that waits for a film: yes and not yet equally near. */
const asksByHand = (job: Job) => job.kind === 'work' && !job.doubtful && job.turn.status !== 'doing' && job.turn.step.status !== 'set aside' ? job.tests : null

/**
 * The keys of one job for one person: the common fact first, and what is rare under More. Nothing is offered
 * that the person may not tell.
 */
export function actsOf(job: Job, hands: Hands): JobActs {
  const mine = ranked(job).filter(({ who }) => (who === 'step' ? hands.step : who === 'maker' ? hands.maker : true)).map(({ act }) => act)
  const rare = hands.maker ? [...stepActs(job), ...filmActs(filmsOf(job.pieces), hands.solventRoom ?? false)] : []
  // What nothing but a wish speaks for stands under More: it is told, but never pressed by mistake.
  const stuck = job.section === 'waiting' && job.tests === null && job.turn.step.status !== 'set aside'
  const tests = asksByHand(job)
  // Before it may begin a test is what a hand is there for.
  if (stuck || (tests !== null && !job.may && !job.due)) return { tests, main: null, second: null, more: [...mine, ...rare] }
  const [main = null, second = null, ...more] = mine
  return { tests, main, second, more: [...more, ...rare] }
}
