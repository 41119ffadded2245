import * as z from 'zod/mini'
import { localDate, rowId } from '#shared/schemas/common'
import { fields } from '#shared/words/fields'

const minuteOfDay = z.int(fields.hours).check(z.gte(0, fields.hours), z.lte(1440, fields.hours))

/** A stretch of working time in local wall time. `weekday` 1 (Monday) to 7; minutes since midnight. */
const stretch = z.strictObject({ weekday: z.int(fields.weekday).check(z.gte(1, fields.weekday), z.lte(7, fields.weekday)), fromMin: minuteOfDay, toMin: minuteOfDay })
  .check(z.refine(({ fromMin, toMin }) => fromMin < toMin, { error: fields.hoursOrder, path: ['toMin'] }))
export type Stretch = z.output<typeof stretch>

const overlaps = (a: Stretch, b: Stretch) => a.weekday === b.weekday && a.fromMin < b.toMin && b.fromMin < a.toMin
const apart = (list: Stretch[]) => list.every((one, i) => list.slice(i + 1).every(other => !overlaps(one, other)))

/** PUT /api/hours: all working hours of the studio (`memberId` null) or of one person. */
export const hoursBody = z.strictObject({ memberId: z.nullable(rowId), hours: z.array(stretch).check(z.maxLength(42, fields.hours), z.refine(apart, fields.hoursApart)) })
export type HoursBody = z.output<typeof hoursBody>

/** GET /api/hours: the studio's hours, and those of people who keep their own. */
export interface HoursWire { studio: Stretch[], members: { memberId: number, hours: Stretch[] }[] }

/** POST /api/closures: days without work, both ends included; `memberId` null for the whole studio. */
export const closureBody = z.strictObject({
  memberId: z.nullable(rowId),
  name: z.string(fields.closureName).check(z.trim(), z.maxLength(80, fields.closureName)),
  fromDate: localDate,
  toDate: localDate,
}).check(z.refine(({ fromDate, toDate }) => fromDate <= toDate, { error: fields.dateOrder, path: ['toDate'] }))
export type NewClosure = z.output<typeof closureBody>

export interface ClosureWire extends NewClosure { id: number }
