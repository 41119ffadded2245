import { listStudiosOf } from '~~/server/services/sessions'
import { defineStudioHandler } from '~~/server/utils/handler'
import type { SessionWire } from '#shared/schemas/session'

/** GET /api/auth/session: who is signed in, where, and what they may; all null when nobody is. */
export default defineStudioHandler({
  may: 'anyone',
  run: ({ db, person, studio, member }): SessionWire => ({
    person: person && { id: person.id, name: person.name, email: person.email },
    studio: studio && { id: studio.id, name: studio.name, zone: studio.zone, units: studio.units, demo: studio.demo },
    member,
    studios: person ? listStudiosOf(db, person.id) : [],
  }),
})
