import { asc, isNull, sql } from 'drizzle-orm'
import { place, plan, stay } from '~~/db/schema'
import { bottleneckOf } from '~~/server/planning/bottleneck'
import { changedProblem } from '~~/server/planning/changed-facts'
import { baseOf, inWorker, whatIf } from '~~/server/planning/questions'
import type { Asker, Base } from '~~/server/planning/questions'
import type { Database } from '~~/server/utils/database'
import { impossible, isRefusal } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import { grouped } from '#shared/grouped'
import type { BottleneckState, WhatIf, WhatIfAnswer } from '#shared/schemas/what-if'
import { whatIfWords } from '#shared/words/what-if'

interface Kept { planId: number, base: Promise<Base | Refusal>, bottleneck: Promise<BottleneckState | Refusal> | null }

/** What was worked out about the plan in force, by database and studio: a new plan puts it away. */
const all = new WeakMap<Database, Map<number, Kept>>()

function keptIn(db: Database): Map<number, Kept> {
  const found = all.get(db) ?? new Map<number, Kept>()
  all.set(db, found)
  return found
}

function keptFor(db: Database, studioId: number, now: number, ask: Asker): { current: typeof plan.$inferSelect, kept: Kept } | Refusal {
  const current = db.select().from(plan).where(scoped(plan, studioId, sql`${plan.current} = 1`)).get()
  if (!current) return impossible(whatIfWords.nothingPlanned)
  const known = keptIn(db).get(studioId)
  if (known?.planId === current.id) return { current, kept: known }
  const fresh: Kept = { planId: current.id, base: baseOf(db, studioId, now, ask), bottleneck: null }
  keptIn(db).set(studioId, fresh)
  return { current, kept: fresh }
}

/** What holds the plan in force back. Worked out once for each plan, on demand. `now` in ms UTC. */
export async function bottleneck(db: Database, studioId: number, now: number, ask: Asker = inWorker): Promise<BottleneckState | Refusal> {
  const found = keptFor(db, studioId, now, ask)
  if (isRefusal(found)) return { planMadeAt: null, days: [], waited: [], more: [], seen: [] }
  found.kept.bottleneck ??= found.kept.base.then(async base => isRefusal(base) ? base : { ...await bottleneckOf(studioId, base, now, ask), planMadeAt: found.current.madeAt, seen: seenPlaces(db, studioId) })
  const answer = await found.kept.bottleneck
  // What did not come to an end is asked again.
  if (isRefusal(answer)) keptIn(db).delete(studioId)
  return answer
}

/** The difference one change makes to the plan in force, on a copy. `now` in ms UTC. */
export async function askWhatIf(db: Database, studioId: number, change: WhatIf, now: number, ask: Asker = inWorker): Promise<WhatIfAnswer | Refusal> {
  const changed = changedProblem(db, studioId, change, now)
  if (isRefusal(changed)) return changed
  const found = keptFor(db, studioId, now, ask)
  if (isRefusal(found)) return found
  const base = await found.kept.base
  if (isRefusal(base)) {
    keptIn(db).delete(studioId)
    return base
  }
  return whatIf(studioId, change, changed, base, ask)
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
