import { endBenchTablet } from '~~/server/services/bench-tablets'
import { defineStudioHandler } from '~~/server/utils/handler'
import { notAllowed } from '~~/server/utils/errors'
import { forgetBench } from '~~/server/utils/session'
import { may } from '#shared/permissions'
import { refusals } from '#shared/words/refusals'

/** POST /api/bench/leave: whoever may set up tablets and acts at this one ends it from here. */
export default defineStudioHandler({
  may: 'bench',
  run: ({ db, studio, bench, event, now }) => {
    if (!bench.as || !may(bench.as.role, 'set up tablets')) return notAllowed(refusals.notAllowed)
    forgetBench(event)
    return endBenchTablet(db, studio.id, bench.id, now)
  },
})
