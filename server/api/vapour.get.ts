import { vapourState } from '~~/server/services/vapour'
import { defineStudioHandler } from '~~/server/utils/handler'
import { toWire } from '#shared/schemas/wire'

/** GET /api/vapour: what is evaporating where, and what it asks for. */
export default defineStudioHandler({
  may: 'read the studio',
  run: ({ db, studio, member, now }) => toWire(vapourState(db, studio.id, member, now)),
})
