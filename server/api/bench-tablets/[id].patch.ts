import { changeBenchTablet } from '~~/server/services/bench-tablets'
import { defineStudioHandler } from '~~/server/utils/handler'
import { benchTabletPatch } from '#shared/schemas/bench'
import { idParams } from '#shared/schemas/common'

/** PATCH /api/bench-tablets/[id]: its name, its room, the minutes until it locks. */
export default defineStudioHandler({
  may: 'set up tablets',
  params: idParams,
  body: benchTabletPatch,
  run: ({ db, studio, params, body }) => changeBenchTablet(db, studio.id, params.id, body),
})
