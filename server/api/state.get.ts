import { studioState } from '~~/server/services/studio-state'
import { defineStudioHandler } from '~~/server/utils/handler'
import { toWire } from '#shared/schemas/wire'

/** GET /api/state: the studio as it stands, for every screen; by session or by `?wall=`. */
export default defineStudioHandler({
  may: 'wall',
  run: ({ db, studio, now }) => toWire(studioState(db, studio, now)),
})
