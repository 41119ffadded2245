import * as z from 'zod/mini'
import type { OpenHours } from '#shared/open-hours'
import type { MovedTurn } from '#shared/plan-moves'
import { instant } from '#shared/schemas/act'
import type { PromiseCause } from '#shared/terms'
import { fields as batchFields } from '#shared/words/batch'
import { fields } from '#shared/words/promise'

/** A batch that has not been started, as far as a date or a start is asked of it. */
export const batchToCome = z.object({
  scheduleId: z.int(fields.schedule).check(z.positive(fields.schedule)),
  pieces: z.int(batchFields.pieces).check(z.gte(1, batchFields.pieces), z.lte(60, batchFields.pieces)),
  sizeUnits: z._default(z.int(batchFields.size).check(z.gte(1, batchFields.size), z.lte(20, batchFields.size)), 1),
  placeId: z.int(fields.place).check(z.positive(fields.place)),
  startsAt: instant,
  dueAt: z._default(z.nullable(instant), null),
})
export type BatchToComeRequest = z.infer<typeof batchToCome>

/** A date given to somebody. The order's name is wanted where the batch belongs to none yet. `tell`: who is to hear of a slip, and how; empty takes it back, left out leaves it. */
export const promiseRequest = z.object({
  dateAt: instant,
  orderName: z.optional(z.string().check(z.trim(), z.minLength(1, batchFields.orderName), z.maxLength(60, batchFields.orderName))),
  tell: z.optional(z.string(fields.tell).check(z.trim(), z.maxLength(120, fields.tell))),
})
export type PromiseRequest = z.infer<typeof promiseRequest>

/** What a studio says of its own luck: of ten coats, how many are done again; of the open hours, what share reaches the bench. Null takes it back. */
export const promiseBasisRequest = z.object({
  reworkOfTen: z.optional(z.nullable(z.number(fields.rework).check(z.gte(0, fields.rework), z.lte(9, fields.rework)))),
  benchShare: z.optional(z.nullable(z.number(fields.share).check(z.gte(0.1, fields.share), z.lte(1, fields.share)))),
})
export type PromiseBasisRequest = z.infer<typeof promiseBasisRequest>

/** `reworkOfTen` and `benchShare` as they were said, null while nobody has; `coats` and `redone` of a year's record; `rework` (chance) and `share` as they are used. */
export interface PromiseBasis { reworkOfTen: number | null, benchShare: number | null, coats: number, redone: number, rework: number, share: number }

/**
 * When a batch or an order will be ready. `plannedAt` by the plan, `likelyAt` half of the ways it may go, `cautiousAt` nine of ten;
 * `promiseAt`: the end of the working day that can be promised. `days`: local dates with how many of the `scenarios` end on each;
 * `ends`: when each of them ends, earliest first; `hours`: of the studio, for the closing of another day.
 * `causes`: days by which each moves the cautious date.
 */
export interface DateEstimate {
  plannedAt: number
  likelyAt: number
  cautiousAt: number
  promiseAt: number
  scenarios: number
  ends: { at: number }[]
  hours: OpenHours
  days: { date: string, count: number }[]
  causes: Record<PromiseCause, number>
  basis: PromiseBasis
}

/** How a promised date stands by the newest plan. `rescue`: the batch that would save it, moved back. `tell`: who is to hear of a slip; null where nobody is named or the reader may not promise. */
export interface PromiseStanding { promisedAt: number, madeAt: number | null, slipping: boolean, cause: PromiseCause | null, moved: MovedTurn | null, cautiousAt: number | null, rescue: string | null, tell: string | null }

/** GET /api/batches/7/promise: the order of a batch, when it will be ready, and what was promised. `estimate` null with `why`: nobody can say. */
export interface PromiseState {
  batchId: number
  order: string | null
  tell: string | null
  batches: string[]
  dueAt: number | null
  estimate: DateEstimate | null
  why: string | null
  standing: PromiseStanding | null
}

/** A batch that would be ready later because of another, by so many minutes; `past`: then past what was promised, or its date, or later still where it was past one of them anyway. */
export interface PushedBatch { id: number, name: string, minutes: number, past: 'promise' | 'date' | 'late already' | null }

/** What starting then would mean. `missed`: windows that would shut unused, by step. `hands`: the most at once, and minutes in all. */
export interface StartPlan {
  start: 'now' | 'afternoon' | 'opening' | 'best'
  startsAt: number
  endsAt: number | null
  missed: { step: string, opensAt: number, shutsAt: number }[]
  hands: { most: number, minutes: number }
  pushes: PushedBatch[]
  /** Steps that find no time at all. */
  without: number
  /** Nobody works at that hour. */
  closed: boolean
}
