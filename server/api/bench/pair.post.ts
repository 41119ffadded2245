import { pairBench } from '~~/server/services/bench-tablets'
import { defineStudioHandler } from '~~/server/utils/handler'
import { forgiveTries, limitTries } from '~~/server/utils/rate-limit'
import { rememberBench } from '~~/server/utils/session'
import { pairBody } from '#shared/schemas/bench'

/** POST /api/bench/pair: signs this device in as the tablet that a code was made for. */
export default defineStudioHandler({
  may: 'anyone',
  body: pairBody,
  run: ({ db, body, event, now }) => {
    const blocked = limitTries(event, 'pair', '', now)
    if (blocked) return blocked
    const paired = pairBench(db, body.code, now)
    if (!paired.ok) return paired
    forgiveTries(event, 'pair', '')
    rememberBench(event, paired.token)
    return { ok: true }
  },
})
