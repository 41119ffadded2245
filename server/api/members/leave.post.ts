import { removeMember } from '~~/server/services/people'
import { defineStudioHandler } from '~~/server/utils/handler'
import { notAllowed } from '~~/server/utils/errors'
import { refusals } from '#shared/words/refusals'

/** POST /api/members/leave: one's own membership ends. The last owner stays. */
export default defineStudioHandler({
  may: 'signed in',
  run: ({ db, studio, member, now }) => studio && member ? removeMember(db, studio.id, member.id, now) : notAllowed(refusals.noStudio),
})
