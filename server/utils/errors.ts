import { createError } from 'h3'
import type { H3Error } from 'h3'
import { refusals } from '#shared/words/refusals'

/** Why something was not done. The one place that knows which HTTP status each reason has. */
const statusOf = {
  'malformed': 400,
  'not signed in': 401,
  'not allowed': 403,
  'absent': 404,
  'conflict': 409,
  'impossible': 422,
  'too many': 429,
} as const

export type Reason = keyof typeof statusOf

/** What a service answers when it did not do what was asked. `message` is a sentence for the person. */
export interface Refusal {
  ok: false
  reason: Reason
  message: string
  /** Sentences by field name, so that a form can show each where it belongs. */
  fields?: Record<string, string>
  /** What stands in the database now, for a conflict. */
  current?: unknown
}

/** Absent, or not yours: the two must not be told apart. */
export const absent = (message: string = refusals.absent): Refusal => ({ ok: false, reason: 'absent', message })
/** Somebody else was first; `current` is what they left. */
export const conflict = (message: string, current?: unknown): Refusal => ({ ok: false, reason: 'conflict', message, current })
/** Well formed, but it cannot be. */
export const impossible = (message: string, fields?: Record<string, string>): Refusal => ({ ok: false, reason: 'impossible', message, fields })
export const malformed = (fields: Record<string, string>, message: string = refusals.malformed): Refusal => ({ ok: false, reason: 'malformed', message, fields })
export const notAllowed = (message: string = refusals.notAllowed): Refusal => ({ ok: false, reason: 'not allowed', message })
export const notSignedIn = (message: string = refusals.notSignedIn): Refusal => ({ ok: false, reason: 'not signed in', message })
export const tooMany = (message: string = refusals.tooMany): Refusal => ({ ok: false, reason: 'too many', message })

export function isRefusal(value: unknown): value is Refusal {
  return typeof value === 'object' && value !== null && 'ok' in value && value.ok === false && 'reason' in value && typeof value.reason === 'string' && value.reason in statusOf
}

/** A refusal as HTTP. The body's `data` is `{ reason, message, fields?, current? }`. */
export function toHttp(refusal: Refusal): H3Error {
  const { reason, message, fields, current } = refusal
  return createError({ statusCode: statusOf[reason], statusMessage: reason, message, data: { reason, message, fields, current } })
}
