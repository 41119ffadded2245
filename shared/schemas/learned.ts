import * as z from 'zod/mini'
import type { MilestoneName } from '#shared/terms'
import { learnedFields } from '#shared/words/learned'

/** POST /api/materials/[id]/reset: `true` forgets the tests so far, `false` counts them again. */
export const resetBody = z.object({ forget: z.boolean(learnedFields.forget) })

/** Quickest, usual and slowest (10, 50, 90 %), in minutes at the sheet's climate. */
export interface BandWire { low: number, typical: number, high: number }

/** A touch test as a bound: the film's age then in minutes of its sheet, and the answer. `weight` 1 counts in full. */
export interface BoundWire { minutes: number, reached: boolean, weight: number }

export interface LearnedRungWire { name: MilestoneName, sheet: BandWire, bench: BandWire | null, tests: BoundWire[] }

/** GET /api/materials/[id]/learned: what this studio's touch tests teach about a material. Instants in ISO 8601 UTC. */
export interface LearnedWire {
  /** Tests that count, and how much longer than the sheet this bench takes by them (1.3 is slower); null while nothing counts. */
  tests: number
  speed: { median: number, p10: number, p90: number } | null
  rungs: LearnedRungWire[]
  /** Of `of` tests made at or after give-it-till, so many were still "not yet". */
  coverage: { early: number, of: number }
  resetAt: string | null
  newestTinAt: string | null
  /** What is mixed, in each room as it is now; empty without a pot life on the sheet. */
  potLife: { room: string, tempC: number, minutes: number, sheetMinutes: number }[]
}
