import { defineStudioHandler } from '~~/server/utils/handler'
import { findWallToken } from '~~/server/utils/session'
import { openLive } from '~~/server/live/streams'
import { stillAdmitted } from '~~/server/services/sessions'

/** GET /api/live: server-sent events, one per committed change; by session or by `?wall=`. */
export default defineStudioHandler({
  may: 'wall',
  run: ({ studio, event, sessionHash, db }) => openLive(event, studio, () => stillAdmitted(db, sessionHash, findWallToken(event), studio.id)),
})
