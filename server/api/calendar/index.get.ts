import { readCalendarLink } from '~~/server/services/calendar'
import { defineStudioHandler } from '~~/server/utils/handler'

/** GET /api/calendar: whether one has a calendar address, never the address itself. */
export default defineStudioHandler({ may: 'choose own calls', run: ({ db, studio, member }) => ({ link: readCalendarLink(db, studio.id, member.id) }) })
