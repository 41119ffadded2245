import { recordAct } from '~~/server/services/acts'
import type { Recorded, Teller } from '~~/server/services/acts'
import { keepOpen } from '~~/server/services/bench-access'
import { correctAct } from '~~/server/services/corrections'
import type { Bench, StudioRow } from '~~/server/services/sessions'
import type { Database } from '~~/server/utils/database'
import { isRefusal, notAllowed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { needsPerson } from '#shared/bench/kinds'
import type { BenchAct } from '#shared/schemas/bench'
import type { CorrectionRequest } from '#shared/schemas/act'
import { benchRefusals } from '#shared/words/bench-refusals'

/** Who tells at a tablet: whoever gave the PIN, if the act was pressed under their name; the bench if it was pressed under none. */
function tellerAt(bench: Bench, memberId: number | null): Teller | Refusal {
  if (bench.locked) return notAllowed(benchRefusals.locked)
  if (memberId === null) return { bench: true }
  return bench.as?.id === memberId ? { member: bench.as } : notAllowed(benchRefusals.otherPerson)
}

/** Records an act of a bench tablet. It counts as a touch: the tablet stays open, and whoever acts at it goes on doing so. */
export function tellAtBench(db: Database, studio: StudioRow, bench: Bench, { memberId, ...request }: BenchAct, now: number): Recorded | Refusal {
  const teller = tellerAt(bench, memberId)
  if (isRefusal(teller)) return teller
  if ('bench' in teller && needsPerson(request.kind)) return notAllowed(benchRefusals.wantsPerson)
  const done = recordAct(db, studio.id, teller, request, now)
  if (done.ok) keepOpen(db, studio.id, bench, memberId !== null, now)
  return done
}

/** Takes back or moves in time what was told at the bench, or by whoever acts at it now. */
export function correctAtBench(db: Database, studio: StudioRow, bench: Bench, actId: number, request: CorrectionRequest, now: number): Recorded | Refusal {
  if (bench.locked) return notAllowed(benchRefusals.locked)
  const done = correctAct(db, studio.id, bench.as ? { member: bench.as } : { bench: true }, actId, request, now)
  // What the bench told stays the bench's to take back while somebody acts at it under a name.
  const byBench = !done.ok && done.reason === 'not allowed' && bench.as ? correctAct(db, studio.id, { bench: true }, actId, request, now) : done
  if (byBench.ok) keepOpen(db, studio.id, bench, bench.as !== null, now)
  return byBench
}
