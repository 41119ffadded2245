import { weekLoad } from '~~/server/services/week-load'
import { defineStudioHandler } from '~~/server/utils/handler'
import { absent } from '~~/server/utils/errors'
import { may } from '#shared/permissions'
import { toWire } from '#shared/schemas/wire'

/** GET /api/week: load against capacity and batches against their dates. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio, member, now }) => {
    const week = weekLoad(db, studio.id, now, may(member.role, 'promise dates'))
    return week ? toWire(week) : absent()
  },
})
