import { endCalendarLink } from '~~/server/services/calendar'
import { defineStudioHandler } from '~~/server/utils/handler'

/** DELETE /api/calendar: one's calendar address opens nothing any more. */
export default defineStudioHandler({ may: 'choose own calls', run: ({ db, studio, member }) => endCalendarLink(db, studio.id, member.id) })
