import { defineStudioHandler } from '~~/server/utils/handler'
import { findWallToken } from '~~/server/utils/session'
import { openLive } from '~~/server/live/streams'
import { stillAdmitted } from '~~/server/services/sessions'

/** GET /api/live: server-sent events, one per committed change; by session, by `?wall=`, or by `?bench=1` from a bench tablet. */
export default defineStudioHandler({
  may: 'wall',
  run: ({ studio, event, sessionHash, bench, db }) => openLive(event, studio, () => stillAdmitted(db, { sessionHash, bench }, findWallToken(event), studio.id)),
})
