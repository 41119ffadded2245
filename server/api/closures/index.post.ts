import { addClosure } from '~~/server/services/hours'
import { defineStudioHandler } from '~~/server/utils/handler'
import { notAllowed } from '~~/server/utils/errors'
import { closureBody } from '#shared/schemas/hours'
import { may } from '#shared/permissions'
import { settings } from '#shared/words/settings'

/** POST /api/closures: days off, one's own or, for an owner, anybody's. */
export default defineStudioHandler({
  may: 'set own absences',
  body: closureBody,
  run: ({ db, studio, member, body }) =>
    body.memberId === member.id || may(member.role, 'change settings') ? addClosure(db, studio.id, body) : notAllowed(settings.ownAbsenceOnly),
})
