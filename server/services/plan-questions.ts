import { asc, isNull, sql } from 'drizzle-orm'
import { place, plan, stay } from '~~/db/schema'
import { bottleneckOf } from '~~/server/planning/bottleneck'
import { changedProblem } from '~~/server/planning/changed-facts'
import { baseOf, whatIf } from '~~/server/planning/questions'
import type { Ask, Base } from '~~/server/planning/questions'
import type { Database } from '~~/server/utils/database'
import { impossible, isRefusal } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import { grouped } from '#shared/grouped'
import type { BottleneckState, WhatIf, WhatIfAnswer } from '#shared/schemas/what-if'
import { whatIfWords } from '#shared/words/what-if'

/** `askedAt` (ms UTC): the moment all of it is reckoned from, so that what is compared begins at the same time. */
interface Kept { planId: number, askedAt: number, base: Promise<Base | Refusal>, bottleneck: Promise<BottleneckState | Refusal> | null }

/** How long that is told of: later the day has moved on beneath it. Our own figure. */
const keptForMs = 15 * 60_000

/** What was worked out about the plan in force, by studio: a new plan puts it away, and so does a quarter of an hour. */
export type KeptBases = Map<number, Kept>

function keptFor(db: Database, studioId: number, now: number, ask: Ask, bases: KeptBases): Kept | Refusal {
  const current = db.select({ id: plan.id }).from(plan).where(scoped(plan, studioId, sql`${plan.current} = 1`)).get()
  if (!current) return impossible(whatIfWords.nothingPlanned)
  const known = bases.get(studioId)
  if (known?.planId === current.id && now - known.askedAt < keptForMs) return known
  const fresh: Kept = { planId: current.id, askedAt: now, base: baseOf(db, studioId, now, ask), bottleneck: null }
  bases.set(studioId, fresh)
  return fresh
}

/** What holds the plan in force back. Worked out on demand, once a quarter of an hour for each plan. `now` in ms UTC. */
export async function bottleneck(db: Database, studioId: number, now: number, ask: Ask, bases: KeptBases = new Map()): Promise<BottleneckState | Refusal> {
  const found = keptFor(db, studioId, now, ask, bases)
  if (isRefusal(found)) return { reckonedAt: null, anew: null, days: [], waited: [], more: [], seen: [] }
  found.bottleneck ??= found.base.then(async base => isRefusal(base) ? base : { ...await bottleneckOf(base, found.askedAt, ask), reckonedAt: found.askedAt, seen: seenPlaces(db, studioId) })
  const answer = await found.bottleneck
  // What did not come to an end is asked again.
  if (isRefusal(answer)) bases.delete(studioId)
  return answer
}

/** The difference one change makes to the plan in force, on a copy. `now` in ms UTC. */
export async function askWhatIf(db: Database, studioId: number, change: WhatIf, now: number, ask: Ask, bases: KeptBases = new Map()): Promise<WhatIfAnswer | Refusal> {
  // What forbids it may have come since the plan without it was reckoned.
  const asNow = changedProblem(db, studioId, change, now)
  if (isRefusal(asNow)) return asNow
  const found = keptFor(db, studioId, now, ask, bases)
  if (isRefusal(found)) return found
  const changed = found.askedAt === now ? asNow : changedProblem(db, studioId, change, found.askedAt)
  if (isRefusal(changed)) return changed
  const base = await found.base
  if (isRefusal(base)) {
    bases.delete(studioId)
    return base
  }
  return whatIf(changed, base, ask)
}

/** By kind of place: how many there are, and when the one not looked at for longest was seen; null where nothing stands on any. */
function seenPlaces(db: Database, studioId: number): BottleneckState['seen'] {
  const rows = db.select({ kind: place.kind, id: place.id, seenAt: sql<number | null>`min(${stay.seenAt})` }).from(place).leftJoin(stay, sql`${stay.placeId} = ${place.id} and ${isNull(stay.toAt)}`)
    .where(scoped(place, studioId)).groupBy(place.id).orderBy(asc(place.sort)).all()
  return [...grouped(rows, row => row.kind)].map(([kind, own]) => {
    const seen = own.flatMap(row => row.seenAt ?? [])
    return { kind, places: own.length, oldestAt: seen.length > 0 ? Math.min(...seen) : null }
  })
}
