import * as z from 'zod/mini'
import { email } from '#shared/schemas/session'
import { newPerson } from '#shared/schemas/studio'
import { roles, stepKinds } from '#shared/terms'
import type { Role, StepKind } from '#shared/terms'
import { fields } from '#shared/words/fields'

/** PATCH /api/members/[id] */
export const memberPatch = z.strictObject({
  role: z.optional(z.enum(roles, fields.role)),
  stepKinds: z.optional(z.array(z.enum(stepKinds, fields.stepKinds), fields.stepKinds)),
})
export type MemberPatch = z.output<typeof memberPatch>

/** A member as others see them; the address only for those who manage people. */
export interface MemberWire { id: number, name: string, role: Role, stepKinds: StepKind[], email: string | null }

/** POST /api/invitations */
export const invitationBody = z.strictObject({ role: z.enum(roles, fields.role), email: z.optional(z.nullable(email)) })
export type NewInvitation = z.output<typeof invitationBody>

/** An invitation that is still open. The link's secret is told once, when it is made. */
export interface InvitationWire { id: number, role: Role, email: string | null, expiresAt: string }

/** GET /api/join/[token]: where an invitation leads; `member`, whether whoever asks belongs there already. */
export interface OfferWire { studio: string, role: Role, email: string | null, member: boolean }

/** POST /api/join/[token]; empty for somebody who is signed in. */
export const joinBody = z.strictObject({ person: z.optional(newPerson) })
export type Join = z.output<typeof joinBody>
