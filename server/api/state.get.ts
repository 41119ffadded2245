import { studioState } from '~~/server/services/studio-state'
import { wallState } from '~~/server/services/wall-state'
import { defineStudioHandler } from '~~/server/utils/handler'
import { toWire } from '#shared/schemas/wire'

/** GET /api/state: the studio as it stands, for every screen; by session, what a wall may know of it by `?wall=`, and by `?bench=1` as much as a bench tablet may show now. */
export default defineStudioHandler({
  may: 'wall',
  run: ({ db, studio, person, bench, now }) => {
    const state = studioState(db, studio, now)
    return toWire(person || (bench && !bench.locked) ? state : wallState(state))
  },
})
