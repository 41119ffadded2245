import { leavesFilm } from '#shared/step-kinds'
import type { PlanFacts } from '~~/server/planning/facts'
import type { PlaceKind } from '#shared/terms'

/** A part of a piece on a kind of place for a while, ms UTC; `toAt` Infinity when nothing planned takes it away. `liesAt`: the place where it lies already. */
export interface Use { kind: PlaceKind, pieceId: number, partId: number, units: number, fromAt: number, toAt: number, liesAt: number | null }

interface Move { at: number, kind: PlaceKind | null, units: number }
type Planned = Pick<PlanFacts['last'][number], 'turnId' | 'startsAt' | 'endsAt'>

const holding: ReadonlySet<PlaceKind> = new Set(['clamps', 'press'])

/**
 * Which kinds of place every piece takes from `now` (ms UTC) on: where it stands, then where each planned coat or glue-up
 * puts it. Out of clamps and press it goes back to where it came from; packed, it is gone. A piece takes its room on a kind
 * once, however many of its parts lie there.
 * @param planned starts and ends of the turns, of the plan in force or of one to come
 */
export function placeUses(facts: PlanFacts, planned: readonly Planned[], now: number): Use[] {
  const kindOf = new Map(facts.places.map(place => [place.id, place.kind]))
  const units = new Map(facts.pieces.map(piece => [piece.id, piece.sizeUnits]))
  const moves = movesOf(facts, planned, new Set(kindOf.values()), units)
  return facts.stays.filter(stay => units.has(stay.pieceId)).flatMap((stay): Use[] => {
    const start: Move = { at: now, kind: kindOf.get(stay.placeId) ?? null, units: units.get(stay.pieceId) ?? 1 }
    return stretch(start, (moves.get(stay.partId) ?? []).sort((a, b) => a.at - b.at), stay)
  })
}

function stretch(start: Move, moves: readonly Move[], { pieceId, partId, placeId }: PlanFacts['stays'][number]): Use[] {
  const uses: Use[] = []
  let home = start
  let here = start
  for (const [index, move] of [...moves, null].entries()) {
    const back: Move | null = move && move.kind === null && index < moves.length && here.kind !== null && holding.has(here.kind) ? { ...home, at: move.at } : move
    const toAt = back?.at ?? Infinity
    if (here.kind !== null && toAt > here.at) uses.push({ kind: here.kind, pieceId, partId, units: here.units, fromAt: here.at, toAt, liesAt: here === start ? placeId : null })
    if (!back) break
    if (here.kind !== null && !holding.has(here.kind)) home = here
    here = back
  }
  return uses
}

/** Where the plan takes each part, by part: onto a place when its coat begins, out of what holds it when that is released, away when packed. */
function movesOf(facts: PlanFacts, planned: readonly Planned[], kinds: ReadonlySet<PlaceKind>, units: ReadonlyMap<number, number>): Map<number, Move[]> {
  const entries = new Map(planned.map(entry => [entry.turnId, entry]))
  const moves = new Map<number, Move[]>()
  for (const step of facts.steps) {
    const own = facts.turns.filter(turn => turn.stepId === step.id)
    const inPlan = (kind: string) => own.filter(turn => turn.kind === kind).flatMap(turn => entries.get(turn.id) ?? [])
    const found: Move[] = []
    const first = inPlan('work')[0]
    const lays = leavesFilm(step.kind)
    if (first && lays && step.placeKind !== null && kinds.has(step.placeKind)) found.push({ at: first.startsAt, kind: step.placeKind, units: step.hold === null ? units.get(step.pieceId) ?? 1 : 1 })
    for (const release of inPlan('release')) found.push({ at: release.endsAt, kind: null, units: 0 })
    if (step.kind === 'packing') for (const done of inPlan('work')) found.push({ at: done.endsAt, kind: null, units: 0 })
    if (found.length === 0) continue
    for (const { partId } of facts.targets.filter(target => target.stepId === step.id)) moves.set(partId, [...moves.get(partId) ?? [], ...found])
  }
  return moves
}

/** Most size units of one kind at one moment between two instants (ms UTC). */
export function peak(uses: readonly Use[], kind: PlaceKind, fromAt: number, toAt: number): number {
  const here = uses.filter(use => use.kind === kind && use.fromAt < toAt && use.toAt > fromAt)
  const moments = [...new Set([fromAt, ...here.map(use => use.fromAt).filter(at => at > fromAt)])]
  return Math.max(0, ...moments.map((at) => {
    const pieces = new Map<number, number>()
    for (const use of here) if (use.fromAt <= at && at < use.toAt) pieces.set(use.pieceId, Math.max(pieces.get(use.pieceId) ?? 0, use.units))
    return [...pieces.values()].reduce((sum, each) => sum + each, 0)
  }))
}
