import * as z from 'zod/mini'
import { placeKinds } from '#shared/terms'
import type { PlaceKind } from '#shared/terms'
import { fields } from '#shared/words/fields'

const minuteOfDay = z.int(fields.hours).check(z.gte(0, fields.hours), z.lte(1440, fields.hours))
const weekday = z.int(fields.weekday).check(z.gte(1, fields.weekday), z.lte(7, fields.weekday))
/** A row that is chosen by name: nothing chosen is said in those words. */
const chosen = (sentence: string) => z.int(sentence).check(z.positive(sentence))
const hours = { weekday, fromMin: minuteOfDay, toMin: minuteOfDay }

/** POST /api/plan/what-if: one change, tried on a copy. */
export const whatIfBody = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('places'), placeKind: z.enum(placeKinds, fields.whatIf), more: z.int(fields.whatIfMore).check(z.gte(1, fields.whatIfMore), z.lte(40, fields.whatIfMore)) }),
  z.strictObject({ kind: z.literal('humidity'), roomId: chosen(fields.whatIfRoom), rh: z.number(fields.whatIfRh).check(z.gte(0.2, fields.whatIfRh), z.lte(0.9, fields.whatIfRh)) }),
  z.strictObject({ kind: z.literal('heat'), roomId: chosen(fields.whatIfRoom), tempC: z.number(fields.whatIfTemp).check(z.gte(5, fields.whatIfTemp), z.lte(35, fields.whatIfTemp)) }),
  z.strictObject({ kind: z.literal('open day'), ...hours }).check(z.refine(each => each.fromMin < each.toMin, { error: fields.hoursOrder, path: ['toMin'] })),
  z.strictObject({ kind: z.literal('hours of'), memberId: chosen(fields.whatIfWho), ...hours }).check(z.refine(each => each.fromMin < each.toMin, { error: fields.hoursOrder, path: ['toMin'] })),
  z.strictObject({ kind: z.literal('due'), batchId: chosen(fields.whatIfBatch), dueAt: z.iso.datetime(fields.whatIfDue) }),
], fields.whatIf)
export type WhatIf = z.output<typeof whatIfBody>
export type WhatIfKind = WhatIf['kind']

/** How one batch fares without and with a change. ms UTC; null while something of it has no time. */
export interface BatchFare { batchId: number, name: string, dueAt: number | null, beforeAt: number | null, afterAt: number | null }

/** What a change makes of the plan. `lateness` in weighted minutes, as the objective counts it. */
export interface Difference { batches: BatchFare[], windowsBefore: number, windowsAfter: number, latenessBefore: number, latenessAfter: number }

/** POST /api/plan/what-if answers: the difference, and what must be done before the change may last. */
export interface WhatIfAnswer { ok: true, difference: Difference, caution: string | null }

/** One more of a resource, and what it would buy. `kind` null: one more pair of hands in the studio's hours. */
export interface OneMore { kind: PlaceKind | null, waitedMin: number[], difference: Difference }

/** What a plan made anew would buy, and how many steps would get another time for it. */
export interface Anew { moves: number, difference: Difference }

/**
 * GET /api/plan/bottleneck: what pieces wait for, day by day, what one more of each would buy, the best first, and what a plan
 * made anew would; `anew` null where that is not worth the moves. `reckonedAt` (ms UTC): as the studio stood when; null without a plan.
 */
export interface BottleneckState { reckonedAt: number | null, anew: Anew | null, days: string[], waited: { for: 'hands' | 'hours' | 'other' | PlaceKind, minutes: number[] }[], more: OneMore[], seen: { kind: PlaceKind, places: number, oldestAt: number | null }[] }
