import { makeCalendarLink } from '~~/server/services/calendar'
import { defineStudioHandler } from '~~/server/utils/handler'
import { calendarBody } from '#shared/schemas/calendar'

/** PUT /api/calendar: a new address for one's own calendar; `path` is told once. */
export default defineStudioHandler({
  may: 'choose own calls',
  body: calendarBody,
  run: ({ db, studio, member, body, now }) => ({ ok: true, path: `/api/calendar/${makeCalendarLink(db, studio.id, member.id, body.everybody, now).token}.ics` }),
})
