import { createStudio } from '~~/server/services/studios'
import { defineStudioHandler } from '~~/server/utils/handler'
import { limitTries } from '~~/server/utils/rate-limit'
import { rememberSession } from '~~/server/utils/session'
import { newStudioBody } from '#shared/schemas/studio'

/** POST /api/studios: makes the first studio and its owner, or another for somebody signed in. */
export default defineStudioHandler({
  may: 'anyone',
  body: newStudioBody,
  run: async ({ db, person, body, event, now }) => {
    const blocked = limitTries(event, 'studio', body.person?.email ?? '', now)
    if (blocked) return blocked
    const result = await createStudio(db, person, body, now)
    if (!result.ok) return result
    await rememberSession(event, result.token)
    return { ok: true, studioId: result.studioId }
  },
})
