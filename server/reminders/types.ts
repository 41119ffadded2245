import type { CallKind, Channel, Role } from '#shared/terms'

/** Who hears of a call by default; members may choose otherwise, except for a fire call. */
export type Audience = 'makers' | 'makers and the one who did it' | 'everybody'

/** A call the studio's state asks for now. Two with the same cause, stage and repeat are one. Times in ms UTC. */
export interface WantedReminder {
  kind: CallKind
  subjectType: 'batch' | 'studio' | 'rag duty' | 'vapour start' | 'keep-out' | 'order'
  subjectId: number
  /** What keeps twelve covers of one row to one call. */
  groupKey: string
  stage: string
  repeat: number
  dueAt: number
  title: string
  body: string
  /** Page to open, from the root of the studio. */
  path: string
}

/** What became of one attempt. `unresolved`: it may have arrived; `unreachable`: it certainly did not. */
export type SendOutcome
  = | { kind: 'accepted' }
    | { kind: 'gone', problem: string }
    | { kind: 'failed', problem: string }
    | { kind: 'unresolved', problem: string }
    | { kind: 'unreachable', problem: string, retryAfterMs: number | null }

/** One sending, with all a channel needs. */
export interface OutgoingCall {
  stableId: string
  kind: CallKind
  title: string
  body: string
  path: string
  studioName: string
  to: { channel: 'push', endpoint: string, p256dh: string, auth: string } | { channel: 'mail', address: string, name: string }
}

export type Channels = Record<Channel, (call: OutgoingCall) => Promise<SendOutcome>>

/** A member who may be called. */
export interface Listener { memberId: number, role: Role }
