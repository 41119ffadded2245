import type { MovedTurn } from '#shared/plan-moves'
import type { Objective } from '#shared/planning/types'
import type { PlaceKind, StepKind, TurnKind } from '#shared/terms'

/** A day of the strips: its hours as the studio keeps them, widened by what is planned outside them. ms UTC. */
export interface PlanDay { date: string, weekday: number, opensAt: number, closesAt: number, closed: boolean }

/**
 * Work of somebody's hands, like work in one block; `with`: who else's hands it takes, `memberId`: whose hands are asked for first. `fromAt` to `toAt` with set-up and clean-up; `workAt` is when the first
 * piece begins, `pieces` in the order of their turns. `pinId`: somebody fixed its time.
 */
export interface PlanBlock { key: string, memberId: number | null, with: string[], turnIds: number[], pieces: string[], kind: TurnKind, stepKind: StepKind, step: string, batch: string, fromAt: number, toAt: number, workAt: number, readyAt: number | null, pinId: number | null, doing: boolean, lastStartAt: number | null }

/** Pieces alike at one place for a while; `toAt` null: nothing planned takes them away. `dryAt`: when what lies on them lets the next step begin. */
export interface PlanStrip { key: string, pieces: string[], units: number, fromAt: number, toAt: number | null, dryAt: number | null, lies: boolean }

export interface PlanPlace { placeId: number, name: string, kind: PlaceKind, room: string, capacity: number, strips: PlanStrip[] }
export interface PlanPerson { memberId: number, name: string, blocks: PlanBlock[] }

/** GET /api/plan: the plan in force as strips, what moved of late, and what the plan costs, part by part. */
export interface PlanState {
  at: number
  planMadeAt: number | null
  days: PlanDay[]
  people: PlanPerson[]
  places: PlanPlace[]
  moved: MovedTurn[]
  objective: Objective | null
}
