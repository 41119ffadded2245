import * as z from 'zod/mini'
import type { Role, StepKind } from '#shared/terms'
import { fields } from '#shared/words/fields'

/** What the browser knows about who it is. */
export interface SessionWire {
  person: { id: number, name: string, email: string } | null
  studio: { id: number, name: string, zone: string, units: 'metric' | 'us', demo: boolean } | null
  member: { id: number, role: Role, stepKinds: StepKind[] } | null
  studios: { id: number, name: string, role: Role }[]
}

/** An e-mail address, trimmed and in lower case. */
export const email = z.string().check(z.trim(), z.toLowerCase(), z.maxLength(254, fields.email), z.email(fields.email))

export const signInBody = z.object({ email, password: z.string().check(z.minLength(1, fields.passwordGiven), z.maxLength(200, fields.passwordLong)) })

/** A password being chosen. Length is what makes it hard to guess; nothing else is demanded. */
export const newPassword = z.string().check(z.minLength(10, fields.passwordShort), z.maxLength(200, fields.passwordLong))

export const switchStudioBody = z.object({ studioId: z.int().check(z.positive()) })

/** POST /api/auth/forgotten */
export const forgottenBody = z.strictObject({ email })

/** POST /api/auth/reset/[token] */
export const resetBody = z.strictObject({ password: newPassword })
