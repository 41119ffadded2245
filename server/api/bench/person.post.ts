import { openBench } from '~~/server/services/bench-access'
import { tryPin } from '~~/server/services/member-pins'
import { defineStudioHandler } from '~~/server/utils/handler'
import { forgiveTries, limitTries } from '~~/server/utils/rate-limit'
import { benchPersonBody } from '#shared/schemas/bench'

/** POST /api/bench/person: opens the tablet with somebody's PIN; they act at it for a short while. */
export default defineStudioHandler({
  may: 'bench',
  body: benchPersonBody,
  run: async ({ db, studio, bench, body, event, now }) => {
    const blocked = limitTries(event, 'pin', `${bench.id}`, now)
    if (blocked) return blocked
    const tried = await tryPin(db, studio, body.memberId, body.pin, now)
    if (!tried.ok) return tried
    forgiveTries(event, 'pin', `${bench.id}`)
    openBench(db, studio.id, bench, body.memberId, now)
    return { ok: true }
  },
})
