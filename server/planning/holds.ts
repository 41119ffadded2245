import type { PlanFacts } from '~~/server/planning/facts'
import { placeUses } from '~~/server/services/week-places'
import type { Use } from '~~/server/services/week-places'
import { grouped } from '#shared/grouped'
import { assignHolds } from '#shared/planning/holds'
import type { HoldWish } from '#shared/planning/holds'

export interface PlannedHold { partId: number, placeId: number, fromAt: number, toAt: number | null }
type Planned = Pick<PlanFacts['last'][number], 'turnId' | 'startsAt' | 'endsAt'>

/**
 * A single place for every rest of a plan about to be stored, by part; a rest that finds none is left out. What lies
 * stays where it lies; what the last plan gave a place keeps it where there is room.
 * @param entries of the new plan
 * @param now ms UTC
 */
export function holdsOf(facts: PlanFacts, entries: readonly Planned[], now: number): PlannedHold[] {
  const runs = runsOf(placeUses(facts, entries, now))
  const kindOf = new Map<number, string>(facts.places.map(place => [place.id, place.kind]))
  const known = [...facts.stays, ...facts.lastHolds]
  const liked = (partId: number | undefined, kind: string) => known.find(each => each.partId === partId && kindOf.get(each.placeId) === kind)?.placeId ?? null
  const wishes = runs.map(({ key, uses }): HoldWish => {
    const [first] = uses
    return {
      key, kind: first?.kind ?? '', units: Math.max(...uses.map(use => use.units)), fromAt: Math.min(...uses.map(use => use.fromAt)), toAt: Math.max(...uses.map(use => use.toAt)),
      liesAt: uses.find(use => use.liesAt !== null)?.liesAt ?? null, likes: liked(first?.partId, first?.kind ?? ''),
    }
  })
  const found = assignHolds(facts.places, wishes)
  return runs.flatMap(({ key, uses }) => {
    const placeId = found.get(key) ?? null
    return placeId === null ? [] : uses.map(use => ({ partId: use.partId, placeId, fromAt: use.fromAt, toAt: use.toAt === Infinity ? null : use.toAt }))
  })
}

/** Parts of one piece on one kind of place at the same time lie together and take its room once; those that lie apart already stay apart. */
function runsOf(uses: readonly Use[]): { key: string, uses: Use[] }[] {
  return [...grouped(uses, use => `${use.pieceId} ${use.kind}`)].flatMap(([key, own]) => {
    const runs: { uses: Use[], toAt: number }[] = []
    for (const use of own.sort((a, b) => a.fromAt - b.fromAt || a.partId - b.partId)) {
      const run = runs.find(each => use.fromAt < each.toAt && sameLying(each.uses, use))
      if (run) {
        run.uses.push(use)
        run.toAt = Math.max(run.toAt, use.toAt)
      }
      else runs.push({ uses: [use], toAt: use.toAt })
    }
    return runs.map((run, index) => ({ key: `${key} ${index}`, uses: run.uses }))
  })
}

const sameLying = (uses: readonly Use[], use: Use) => use.liesAt === null || uses.every(each => each.liesAt === null || each.liesAt === use.liesAt)
