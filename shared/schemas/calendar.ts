import * as z from 'zod/mini'

/** PUT /api/calendar: a new address, which puts an end to the one before. `everybody`: the whole studio's work instead of one's own. */
export const calendarBody = z.strictObject({ everybody: z.boolean() })

/** GET /api/calendar */
export interface CalendarWire { everybody: boolean, madeAt: string }

/** GET /api/calendar/[token]: the secret, which calendars like to see end in .ics. */
export const calendarToken = z.object({ token: z.string().check(z.regex(/^[\w-]{43}(\.ics)?$/)) })
