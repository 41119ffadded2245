import { liftingTime } from '#shared/verdict/verdict'
import type { Hold, StepKind } from '#shared/terms'
import type { Verdict, VerdictKind } from '#shared/verdict/types'

/** The last moment to start a step, ms UTC, counted back from a window's early end at `shutsAt`. `pieces`: how many of how many can then still be done. */
export interface LastStart { stepId: number, stepKind: StepKind, at: number, what: string, shutsAt: number | null, pieces: { some: number, all: number } | null }

/** When a waiting step may begin (`MayBegin.from`) and when the plan begins it, null without one, ms UTC. `what` is the step's name. */
export interface Beginning { stepId: number, stepKind: StepKind, at: number, what: string, plannedAt: number | null }

/** An attended check inside a rest, or the taking out of what holds it (`out`), ms UTC. `what` says what to do: "change the blotters". */
export interface DueCheck { stepId: number, at: number, what: string, out: Hold | null }

/** Everything the next moment of a piece is chosen from. */
export interface NextFacts {
  verdict: Pick<Verdict, 'betterAt' | 'betterKind' | 'betterGrip'>
  lastStarts: readonly LastStart[]
  mayBegins: readonly Beginning[]
  checks: readonly DueCheck[]
}

/** `stepId`: what it is done for. `what` is the name of the step or check, or what the verdict gets better to. `open` and `due`: already so. */
export type NextMoment =
  | { kind: 'start by', stepId: number, at: number, what: string, stepKind: StepKind, shutsAt: number | null, pieces: { some: number, all: number } | null }
  | { kind: 'may begin', stepId: number, at: number, what: string, stepKind: StepKind, open: boolean, plannedAt: number | null }
  | { kind: 'better', at: number, what: VerdictKind, grip: string | null }
  | { kind: 'check', stepId: number, at: number, what: string, out: Hold | null, due: boolean }

/** The last moment to start something, as a next moment. */
export type StartBy = Extract<NextMoment, { kind: 'start by' }>

/** Of one step's last moments the first that can still be kept; when all are past, the last of them. */
function standing(starts: readonly LastStart[], now: number): LastStart[] {
  const byStep = new Map<number, LastStart>()
  for (const start of starts) {
    const known = byStep.get(start.stepId)
    const better = !known || (start.at >= now && (known.at < now || start.at < known.at)) || (known.at < now && start.at > known.at)
    if (better) byStep.set(start.stepId, start)
  }
  return [...byStep.values()]
}

/**
 * The next moment of a piece, one for all screens: the first of last moment to start, may begin, verdict gets better,
 * due check; what is past counts as now, and of equals the earlier named speaks. A step that may already begin and has
 * a last moment to start speaks by that alone, so that a window's end never stands where hands must start earlier.
 * @param now ms UTC
 * @param heardAt as for `pieceVerdict`: a page cut off opens nothing by its own clock
 */
export function nextMoment(facts: NextFacts, now: number, heardAt: number | null): NextMoment | null {
  const lifting = liftingTime(now, heardAt)
  const starts = standing(facts.lastStarts, now)
  const pressed = new Set(starts.map(start => start.stepId))
  const { betterAt, betterKind, betterGrip } = facts.verdict
  const moments: NextMoment[] = [
    ...starts.map(({ stepId, at, what, stepKind, shutsAt, pieces }) => ({ kind: 'start by' as const, stepId, at, what, stepKind, shutsAt, pieces })),
    ...facts.mayBegins.filter(({ stepId, at }) => at > now || !pressed.has(stepId))
      .map(({ stepId, at, what, stepKind, plannedAt }) => ({ kind: 'may begin' as const, stepId, at, what, stepKind, open: at <= lifting, plannedAt })),
    ...betterAt !== null && betterKind ? [{ kind: 'better' as const, at: betterAt, what: betterKind, grip: betterGrip }] : [],
    ...facts.checks.map(({ stepId, at, what, out }) => ({ kind: 'check' as const, stepId, at, what, out, due: at <= (out === null ? now : lifting) })),
  ]
  const first = (a: NextMoment, b: NextMoment) => Math.max(b.at, now) < Math.max(a.at, now) ? b : a
  return moments.length === 0 ? null : moments.reduce(first)
}

/**
 * One moment for a line about several pieces: of last moments to start the earliest, of equals the one whose window shuts first, of checks the earliest; of what time has to
 * bring about, the latest, for the slowest piece speaks for all. Null for none.
 */
export function groupMoment(moments: readonly NextMoment[]): NextMoment | null {
  const press = (moment: NextMoment) => (moment.kind === 'start by' ? 0 : moment.kind === 'check' && moment.out === null ? 1 : 2)
  const shut = (moment: NextMoment) => (moment.kind === 'start by' ? moment.shutsAt ?? Number.MAX_VALUE : 0)
  const before = (a: NextMoment, b: NextMoment) => press(a) - press(b) || (press(a) === 2 ? b.at - a.at : a.at - b.at || shut(a) - shut(b))
  return [...moments].sort(before)[0] ?? null
}
