import { FilmCurves, lyingRung, lyingWindow } from '~~/server/planning/film-curves'
import type { PlanFacts } from '~~/server/planning/facts'
import { activityId } from '~~/server/planning/ids'
import type { LagFilm, StepWork } from '~~/server/planning/lags'
import type { StudioProblem } from '~~/server/planning/problem'
import type { WaitsToCome } from '~~/server/planning/waits'
import { metAt, minutesFrom, rungFor } from '#shared/drying/waits'
import type { Again, LagDraw, Luck, Recipe, Tail } from '#shared/promise/types'
import { leavesFilm } from '#shared/step-kinds'
import { milestoneNames } from '#shared/terms'

const minute = 60_000
/** A piece whose last film is not yet so far is not ready to be handed over. */
const handed = 'dry-to-handle'

/** Numbers films and their materials as they are asked for. */
class Films {
  readonly materials: number[] = []
  readonly #numbers = new Map<string, number>()
  readonly #versions = new Map<number | null, number>()

  of(key: string, versionId: number | null): number {
    const known = this.#numbers.get(key)
    if (known !== undefined) return known
    const material = this.#versions.get(versionId) ?? this.#versions.size
    this.#versions.set(versionId, material)
    this.#numbers.set(key, this.materials.length)
    return this.materials.push(material) - 1
  }

  get count() {
    return Math.max(1, this.#versions.size)
  }
}

/** Everything that scenarios of a studio's plan are drawn from: its films from the drying model, its coats, and its luck. */
export function promiseRecipe(facts: PlanFacts, given: StudioProblem, toCome: WaitsToCome, luck: Luck): Recipe {
  const films = new Films()
  const curves = new FilmCurves()
  const lags = given.films.map((film, i) => {
    const lag = given.problem.lags[i]
    return film && lag ? (film.step ? dryingToCome(film, film.step, lag.from ?? '', films, curves, toCome) : lyingAlready(film, films, facts, given)) : null
  })
  const numbers = new Map(given.problem.activities.map((activity, i) => [activity.id, i]))
  const again = given.works.flatMap(work => coatsAgain(work, numbers, films, curves, toCome))
  const tails = tailsOf(facts, given, numbers, films, curves, toCome)
  return { films: films.materials, materials: films.count, lags, tails, again, luck }
}

function dryingToCome(film: LagFilm, step: StepWork['step'], from: string, films: Films, curves: FilmCurves, toCome: WaitsToCome): LagDraw | null {
  const coming = toCome.film(step, film.roomId)
  if (!coming) return null
  const wait = film.milestone === null ? null : curves.rung(coming, film.milestone)
  return { film: films.of(from, step.materialVersionId), wait, windows: film.windowed ? curves.windows(coming) : [], least: film.least }
}

function lyingAlready(film: LagFilm, films: Films, facts: PlanFacts, { zeroAt }: StudioProblem): LagDraw | null {
  const coat = facts.films.find(each => each.coatId === film.coatId)
  if (!coat) return null
  const rungs = facts.rungs.filter(each => each.coatId === coat.coatId).map(each => ({ ...each, name: each.milestone }))
  const rung = film.milestone === null ? null : rungFor(rungs, film.milestone)
  const windows = film.windowed ? facts.windows.filter(each => each.coatId === coat.coatId && each.opensAt !== null) : []
  return {
    film: films.of(`coat ${coat.coatId}`, coat.versionId), wait: rung ? lyingRung(rung, coat.endedAt, zeroAt) : null, least: film.least,
    windows: windows.map(({ opensAt, shutsAt }) => ({ opens: lyingWindow(opensAt, 'opens', coat.endedAt, zeroAt), shuts: lyingWindow(shutsAt, 'shuts', coat.endedAt, zeroAt) })),
  }
}

/** Every coat that is still to come may have to be done again, with its own set-up, once it has dried. */
function coatsAgain({ step, turns, roomId }: StepWork, numbers: ReadonlyMap<string, number>, films: Films, curves: FilmCurves, toCome: WaitsToCome): Again[] {
  if (step.kind !== 'coat') return []
  const coming = toCome.film(step, roomId)
  const wait = coming && curves.rung(coming, 'ready-to-recoat')
  const planned = toCome.wait(step, roomId, 'ready-to-recoat', 'p90', false).minutes ?? 0
  return turns.filter(turn => turn.kind === 'work' && turn.status === 'waiting').flatMap((turn) => {
    const activity = numbers.get(activityId(turn.id))
    return activity === undefined ? [] : [{ activity, minutes: Math.max(1, turn.minutes) + step.setupMin + step.cleanMin, film: films.of(activityId(turn.id), step.materialVersionId), wait, planned }]
  })
}

/** What is still wet when the last hand has been laid on it. */
function tailsOf(facts: PlanFacts, given: StudioProblem, numbers: ReadonlyMap<string, number>, films: Films, curves: FilmCurves, toCome: WaitsToCome): Tail[] {
  const jobs = new Map(given.problem.jobs.flatMap((job, i) => job.activities.map(id => [id, i] as const)))
  const followed = new Set(given.problem.lags.map(lag => lag.from))
  const coming = given.works.flatMap(({ step, turns, roomId }): Tail[] => {
    const last = [...turns].reverse().find(turn => turn.kind === 'work')
    if (!last || !leavesFilm(step.kind) || followed.has(activityId(last.id))) return []
    const film = toCome.film(step, roomId)
    const wait = film && curves.rung(film, handed)
    const planned = toCome.wait(step, roomId, handed, 'p90', false).minutes
    const id = activityId(last.id)
    return wait && planned !== null ? [{ job: jobs.get(id) ?? 0, from: numbers.get(id) ?? 0, film: films.of(id, step.materialVersionId), wait, planned }] : []
  })
  return [...coming, ...lyingTails(facts, given, jobs, films)]
}

function lyingTails(facts: PlanFacts, given: StudioProblem, jobs: ReadonlyMap<string, number>, films: Films): Tail[] {
  const jobOf = new Map(given.works.map(({ step, turns }) => [step.id, jobs.get(activityId(turns[0]?.id ?? 0))]))
  return facts.films.flatMap((film): Tail[] => {
    const job = jobOf.get(film.stepId)
    const rungs = facts.rungs.filter(each => each.coatId === film.coatId).map(each => ({ ...each, name: each.milestone }))
    const rung = rungs.some(each => milestoneNames.includes(each.name)) ? rungFor(rungs, handed) : null
    const wait = rung && lyingRung(rung, film.endedAt, given.zeroAt)
    const { at } = rung ? metAt([rung], handed, 'p90', film.endedAt) : { at: null }
    return job !== undefined && wait && at !== null && at > given.zeroAt - minute ? [{ job, from: null, film: films.of(`coat ${film.coatId}`, film.versionId), wait, planned: minutesFrom(given.zeroAt, at, Math.ceil) }] : []
  })
}
