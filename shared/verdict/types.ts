import type { DoubtCause, Hold, IntakeQuestion } from '#shared/terms'
import type { ReasonCode } from '#shared/drying/types'

/** A rung as the verdict sees it. Times in ms UTC; `reachedAt` only from a maker or an owner. */
export interface Moment { likelyAt: number | null, p90At: number | null, p98At: number | null, reachedAt: number | null, reason: ReasonCode | null }

/** One film or glue line that still matters, reduced to what hands need to know. */
export interface Film {
  coatId: number
  /** Null when nobody said what was put on. */
  material: string | null
  kind: 'coat' | 'glue-up' | 'size'
  /** Set to touch. Null when the ladder has no such rung: the rung of `handle` then speaks for it. */
  touch: Moment | null
  /** Dry to handle; for a glue out of clamps; for a size cured. Null when unknown. */
  handle: Moment | null
  /** Null when the ladder has no such rung: the rung of `handle` then speaks for it. */
  tackFree: Moment | null
  /** Dry to sand flat: hard enough to bear another piece. Null when the ladder has no such rung: `cured` then speaks for it. */
  hard: Moment | null
  cured: Moment | null
  /** For a joint: full strength, before which it may not be strained. */
  strength: Moment | null
  mustLieLevel: boolean
  gloves: boolean
  /** Held in clamps, in the press or under weight, and nobody has said it is out. */
  hold: Hold | null
  doubt: { cause: DoubtCause, fromAt: number } | null
}

/** What a part is to be held by: a place on it ("back", "spine") or the carrier it stands on. `films` are coat ids of the films on the grip. */
export interface Grip { name: string, films: number[] }

/** Everything the verdict reads about one part. Parts that move together are judged together. */
export interface PartFacts {
  partId: number
  name: string
  films: Film[]
  /** A grip without films carries `[]`; films that no longer matter need not be named. */
  grip: Grip | null
  /** A turn somebody is at. */
  doing: { by: string, what: string, since: number } | null
  /** Planned start of the next coat or glue-up that nobody has spoken of yet; `what` is the step's name. */
  due: { at: number, what: string } | null
  place: { room: string, place: string } | null
  missing: { where: string, seenAt: number } | null
  /** Set while the question is open, or answered "not tested". */
  intake: IntakeQuestion | null
  /** Set while the room the part stands in has an open keep-out. */
  keepOut: { room: string } | null
}

/** Worst first. */
export const verdictKinds = ['hands off', 'ask first', 'hold by', 'may be handled'] as const
export type VerdictKind = typeof verdictKinds[number]

export const limitKinds = ['gloves', 'stack', 'wrap', 'glaze', 'strain'] as const
export type LimitKind = typeof limitKinds[number]

/** A thing not to do before a time; `until` null means for ever, as far as we know. */
export interface Limit { kind: LimitKind, until: number | null }

/** Why a verdict says what it says: a code for the message catalogue and what goes into the sentence. */
export type VerdictReason =
  | { code: 'keep out', room: string }
  | { code: 'in hand', by: string, what: string }
  | { code: 'held', hold: Hold, giveTillAt: number | null }
  | { code: 'unknown film' }
  | { code: 'doubt wet', cause: DoubtCause, fromAt: number }
  | { code: 'doubt', cause: DoubtCause, fromAt: number }
  /** `until` is the 98 % time of the slowest wet film; null with the reason why there is none. */
  | { code: 'wet', material: string | null, until: number | null, reason: ReasonCode | null }
  | { code: 'no promise', reason: ReasonCode }
  | { code: 'coat due', at: number, what: string }
  | { code: 'not there', where: string | null, seenAt: number | null }
  | { code: 'intake', question: IntakeQuestion }
  | { code: 'grip wet', grip: string }
  | { code: 'dry' }
  | { code: 'cut off', since: number }

export interface Verdict {
  kind: VerdictKind
  /** The line of the truth table that speaks, 1..13; 0 for a cut-off. */
  line: number
  /** Set only for hold by; null there when the pieces of a group have different grips. */
  grip: string | null
  reason: VerdictReason
  /** When the verdict gets better by itself, and to what; null when only a person can lift it. */
  betterAt: number | null
  betterKind: VerdictKind | null
  /** The grip when `betterKind` is hold by. */
  betterGrip: string | null
  limits: Limit[]
}
