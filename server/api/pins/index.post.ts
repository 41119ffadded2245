import { pinTurns } from '~~/server/services/pins'
import { useAsker } from '~~/server/utils/asker'
import { defineStudioHandler } from '~~/server/utils/handler'
import { pinBody } from '#shared/schemas/pin'

/** POST /api/pins: gives turns a time of their own, which re-planning keeps. */
export default defineStudioHandler({
  may: 'pin the plan',
  body: pinBody,
  run: ({ db, studio, member, body, now }) => pinTurns(db, studio.id, member.id, body, now, () => useAsker().ask(db, 'pin', { studioId: studio.id, body }, now)),
})
