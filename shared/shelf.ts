import type { VerdictKind } from '#shared/verdict/types'

/** A piece as it stands or hangs in a drawing of the studio: what is drawn and the words beside it, nothing to compute. */
export interface StandingPiece {
  key: string | number
  name: string
  /** The name without the parts that stand here, and those parts. */
  pieceName: string
  suffix: string
  /** The batch it belongs to. */
  series: number
  /** Share of the way to dry, 0..1; null when nobody knows. */
  dry: number | null
  kind: VerdictKind
  /** The verdict in words, such as "hold by the back". */
  verdict: string
  /** The next moment in words, such as "start varnish by 14:35"; null when nothing is due. */
  moment: string | null
  /** How the next moment is said: plain, a step that may begin, or one whose last moment is near. */
  tone: 'plain' | 'open' | 'shutting'
  /** Where its next turn was planned before the plan moved it noticeably: "was 15:40"; left out when it did not move of late. */
  was?: string | null
  /** So many pieces alike beside one another, drawn once; a press shows them one by one. */
  count?: number
}

/** A joint held by one clamp or several side by side. */
export interface ClampedPiece extends StandingPiece { clamps: number }

/** A block of work pegged to the hours: `at` in ms UTC. */
export interface DayPeg { key: string | number, at: number, title: string, says: string, urgent: boolean }
