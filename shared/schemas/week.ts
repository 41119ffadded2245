import type { LateCause } from '#shared/planning/late-cause'
import type { PromiseStanding } from '#shared/schemas/promise'
import type { PlaceKind } from '#shared/terms'

/** A day of the week to come, local. `closed` names why nobody works: a closure's name, or '' for a day without hours. */
export interface WeekDay { date: string, weekday: number, today: boolean, closed: string | null }

/** Load of one resource on one day. People: minutes left of the day; places: size units at the fullest moment. `of` 0 when nobody works. */
export interface Load { used: number, of: number, away: boolean }

export interface PersonLoad { memberId: number | null, name: string, days: Load[] }
export interface PlaceLoad { kind: PlaceKind, capacity: number, days: Load[] }

/**
 * A batch against its date. `endsAt` null while something of it has no time in the plan (`without` counts it) or nothing
 * is left to do; `latestAt` adds the doubt of what is drying now. `slipping`: the promise of its order, when it slips.
 */
export interface BatchLoad {
  id: number
  name: string
  pieces: number
  order: string | null
  beganAt: number
  dueAt: number | null
  endsAt: number | null
  latestAt: number | null
  left: number
  without: number
  slipping: PromiseStanding | null
  /** Why it is planned past its date; null where it is not. */
  late: LateCause | null
}

/** What the page rests on, and how old it is. */
export interface Evidence { standing: number, oldestSeenAt: number | null, missing: number, unread: string[], oldestReadAt: number | null }

export interface WeekState {
  at: number
  planMadeAt: number | null
  days: WeekDay[]
  people: PersonLoad[]
  places: PlaceLoad[]
  batches: BatchLoad[]
  clashes: string[]
  evidence: Evidence
}
