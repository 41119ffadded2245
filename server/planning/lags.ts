import type { WaitsToCome } from '~~/server/planning/waits'
import type { FactIndex } from '~~/server/planning/fact-index'
import type { PlanFacts } from '~~/server/planning/facts'
import { activityId } from '~~/server/planning/ids'
import { metAt, minutesFrom } from '#shared/drying/waits'
import type { PlanInput } from '#shared/planning/problem'
import type { LagWindow, Recovery } from '#shared/planning/types'
import type { MilestoneName, Risk } from '#shared/terms'

type Step = PlanFacts['steps'][number]
type TurnRow = PlanFacts['turns'][number]

/** The film whose drying a lag waits for: one to come, by its step and room, or one that lies already (`coatId`). `least`: minutes it waits whatever the film does. */
export interface LagFilm { step: Step | null, roomId: number | null, coatId: number | null, milestone: MilestoneName | null, windowed: boolean, least: number }
export type LagInput = NonNullable<PlanInput['lags']>[number] & { film?: LagFilm }

/** What a missed window costs before the recovery's own minutes, in the objective (planning value). */
const missed = 1
/** Coats of a later day of a round wait at least a night (planning value). */
const aNight = 12 * 60

export interface StepWork { step: Step, turns: TurnRow[], roomId: number | null }

/** What a piece's open turns wait for, and which of them only a touch test can let begin. */
export interface LagsOfPiece { lags: LagInput[], untested: Set<number>, unreachable: Set<number> }

/** Turns the links of one piece into lags between its turns, with films that lie already as fixed moments. */
export function lagsOf(works: readonly StepWork[], facts: Pick<PlanFacts, 'aside'>, index: FactIndex, toCome: WaitsToCome, zeroAt: number): LagsOfPiece {
  const found: LagsOfPiece = { lags: [], untested: new Set(), unreachable: new Set() }
  const byStep = new Map(works.map(work => [work.step.id, work]))
  for (const work of works) {
    inside(found, work, index, toCome, zeroAt)
    for (const link of index.links.get(work.step.id) ?? []) {
      const first = firstWork(work)
      if (!first) continue
      const before = byStep.get(link.fromStepId)
      if (facts.aside.has(link.fromStepId)) found.unreachable.add(first.id)
      else if (before?.turns.some(turn => turn.kind === 'work')) between(found, before, first, link, index, toCome)
      else {
        // A film may lie already while looks at it are still to come.
        follow(found, before?.turns ?? [], first)
        lying(found, link.fromStepId, first, link, index, zeroAt)
      }
    }
  }
  return found
}

const firstWork = (work: StepWork) => work.turns.find(turn => turn.kind === 'work') ?? null

interface Asked { milestone: MilestoneName | null, risk: Risk, windowed: boolean }

/** After the end of every turn of a step. */
function follow(found: LagsOfPiece, before: readonly TurnRow[], first: TurnRow) {
  for (const turn of before) found.lags.push({ from: activityId(turn.id), to: activityId(first.id), min: 0 })
}

/** From a step with coats still to come. */
function between(found: LagsOfPiece, before: StepWork, first: TurnRow, link: Asked, index: FactIndex, toCome: WaitsToCome) {
  const film = link.milestone !== null || link.windowed
  follow(found, before.turns.filter(turn => turn.kind !== 'work' || !film), first)
  const coat = [...before.turns].reverse().find(turn => turn.kind === 'work')
  if (!film || !coat) return
  const { minutes, promised, windows } = toCome.wait(before.step, before.roomId, link.milestone, link.risk, link.windowed)
  add(found, first, activityId(coat.id), minutes, promised, windows, recoveryOf(before.step.materialVersionId, index), { step: before.step, roomId: before.roomId, coatId: null, milestone: link.milestone, windowed: link.windowed, least: 0 })
}

/** From a film that lies already: its times are instants. */
function lying(found: LagsOfPiece, fromStepId: number, first: TurnRow, link: Asked, index: FactIndex, zeroAt: number) {
  const film = index.film.get(fromStepId)
  if (!film || (link.milestone === null && !link.windowed)) return
  const { at, promised } = metAt(index.rungs(film.coatId), link.milestone, link.risk, film.endedAt)
  const windows = link.windowed ? index.windows(film.coatId).flatMap(({ opensAt, shutsAt }): [number, number | null][] => (opensAt === null ? [] : [[minutesFrom(zeroAt, opensAt, Math.ceil), shutsAt === null ? null : minutesFrom(zeroAt, shutsAt, Math.floor)]])) : []
  add(found, first, null, at === null ? null : minutesFrom(zeroAt, at, Math.ceil), promised, windows, recoveryOf(film.versionId, index), { step: null, roomId: null, coatId: film.coatId, milestone: link.milestone, windowed: link.windowed, least: 0 })
}

/** Inside one step: the coats of a round, the looks inside a rest, the release from clamps. */
function inside(found: LagsOfPiece, work: StepWork, index: FactIndex, toCome: WaitsToCome, zeroAt: number) {
  const coats = work.turns.filter(turn => turn.kind === 'work')
  const again: Asked = { milestone: 'ready-to-recoat', risk: 'p90', windowed: true }
  const first = coats[0]
  if (first && work.step.status === 'resting') lying(found, work.step.id, first, again, index, zeroAt)
  for (const [place, coat] of coats.entries()) {
    const before = coats[place - 1]
    if (!before) continue
    const { minutes, promised, windows } = toCome.wait(work.step, work.roomId, 'ready-to-recoat', 'p90', true)
    const overnight = coat.day > before.day ? aNight : 0
    add(found, coat, activityId(before.id), minutes === null ? null : Math.max(minutes, overnight), promised, windows, recoveryOf(work.step.materialVersionId, index), { step: work.step, roomId: work.roomId, coatId: null, milestone: 'ready-to-recoat', windowed: true, least: overnight })
  }
  const last = coats[coats.length - 1]
  for (const turn of work.turns) {
    if (turn.kind === 'check') rest(found, turn, last ?? null, turn.checkAfterMin ?? 0, work, index, zeroAt)
    else if (turn.kind === 'release' && last) {
      const { minutes, promised } = toCome.wait(work.step, work.roomId, 'out-of-clamps', 'p90', false)
      add(found, turn, activityId(last.id), minutes, promised, [], null, { step: work.step, roomId: work.roomId, coatId: null, milestone: 'out-of-clamps', windowed: false, least: 0 })
    }
    else if (turn.kind === 'release') lying(found, work.step.id, turn, { milestone: 'out-of-clamps', risk: 'p90', windowed: false }, index, zeroAt)
  }
}

function rest(found: LagsOfPiece, turn: TurnRow, after: TurnRow | null, minutes: number, work: StepWork, index: FactIndex, zeroAt: number) {
  if (after) found.lags.push({ from: activityId(after.id), to: activityId(turn.id), min: minutes })
  const film = index.film.get(work.step.id)
  if (!after && film) found.lags.push({ from: null, to: activityId(turn.id), min: Math.max(0, minutesFrom(zeroAt, film.endedAt, Math.ceil) + minutes) })
}

function add(found: LagsOfPiece, to: TurnRow, from: string | null, minutes: number | null, promised: boolean, windows: readonly LagWindow[], recovery: Recovery | null, film?: LagFilm) {
  if (!promised) found.untested.add(to.id)
  if (minutes === null) {
    found.unreachable.add(to.id)
    return
  }
  found.lags.push({ from, to: activityId(to.id), ...lagTimes(from === null, minutes, windows, recovery), film })
}

/**
 * When the next may begin after a film: its milestone and its windows together, as the planner asks for them. Minutes from the end of the
 * coat, or from minute 0 for one that lies already.
 */
export function lagTimes(lies: boolean, minutes: number, windows: readonly LagWindow[], recovery: Recovery | null): Pick<LagInput, 'min' | 'windows' | 'recovery'> {
  const least = lies ? Math.max(0, minutes) : minutes
  const chances = windows.flatMap(([opens, shuts]): LagWindow[] => {
    // A window open from the start may be used before the rung that others wait for.
    const begins = Math.max(opens <= 0 ? Math.max(0, opens) : Math.max(opens, least), 0)
    return shuts === null || shuts >= begins ? [[begins, shuts]] : []
  })
  return chances.length > 0 ? { windows: apart(chances), recovery: recovery ?? { penalty: missed, minutes: 0 } } : { min: least }
}

/** Sorted and joined where they overlap, as the planner asks for them. */
function apart(windows: LagWindow[]): LagWindow[] {
  const joined: [number, number | null][] = []
  for (const [from, to] of [...windows].sort((a, b) => a[0] - b[0])) {
    const last = joined[joined.length - 1]
    if (last && (last[1] === null || from <= last[1])) last[1] = last[1] === null || to === null ? null : Math.max(last[1], to)
    else joined.push([from, to])
  }
  return joined
}

function recoveryOf(versionId: number | null, index: FactIndex): Recovery | null {
  const recovery = versionId === null ? undefined : index.recoveries.get(versionId)
  return recovery ? { penalty: missed, minutes: recovery.minutes } : null
}
