import { setResponseHeaders } from 'h3'
import { calendarOf } from '~~/server/services/calendar'
import { defineStudioHandler } from '~~/server/utils/handler'
import { calendarToken } from '#shared/schemas/calendar'

/** GET /api/calendar/[token].ics: the calendar of whoever made the address, as text/calendar. The secret is the key. */
export default defineStudioHandler({
  may: 'anyone',
  params: calendarToken,
  run: ({ db, params, event, now }) => {
    const found = calendarOf(db, params.token.replace(/\.ics$/, ''), now)
    if (!found.ok) return found
    setResponseHeaders(event, { 'content-type': 'text/calendar; charset=utf-8', 'content-disposition': 'inline; filename="stillwet.ics"' })
    return found.text
  },
})
