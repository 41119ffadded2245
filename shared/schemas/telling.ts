import * as z from 'zod/mini'
import type { CallKind, Channel, deliveryStatuses, RagAnswer } from '#shared/terms'
import { ragAnswers } from '#shared/terms'
import { fields } from '#shared/words/fields'

const key = (bytes: number, sentence: string) => {
  const characters = Math.ceil(bytes * 4 / 3)
  return z.string(sentence).check(z.regex(new RegExp(`^[\\w-]{${characters}}=*$`), sentence))
}

/** POST /api/push/subscriptions: what a browser's `PushSubscription` gives, and how the person calls the device. */
export const subscriptionBody = z.object({
  endpoint: z.string(fields.pushEndpoint).check(z.maxLength(2000, fields.pushEndpoint)),
  keys: z.object({ p256dh: key(65, fields.pushKeys), auth: key(16, fields.pushKeys) }, fields.pushKeys),
  device: z.optional(z.string(fields.device).check(z.trim(), z.maxLength(80, fields.device))),
})

/** POST /api/auth/sign-out-elsewhere: at which push address the browser that asks is called; none where it is not. */
export const signOutElsewhereBody = z.object({ endpoint: z.optional(z.string(fields.pushEndpoint).check(z.maxLength(2000, fields.pushEndpoint))) })

/** POST /api/rags/[id]/answer */
export const ragAnswerBody = z.strictObject({ answer: z.enum(ragAnswers, fields.ragAnswer) })

/** GET /api/push/subscriptions: one's own browsers that are called. */
export interface SubscriptionWire { id: number, endpoint: string, device: string, madeAt: string }

/** GET /api/reminders: a call that stands open. `ragDutyId` when it asks for rags. */
export interface ReminderWire { id: number, kind: CallKind, title: string, body: string, path: string, dueAt: string, ragDutyId: number | null }

/** GET /api/rags: rags nobody has answered for. */
export interface RagWire { id: number, room: string, lastOilAt: string, answer: RagAnswer | null }

/** GET /api/deliveries: what became of the newest sendings. */
export interface DeliveryWire { id: number, title: string, member: string, channel: Channel, status: typeof deliveryStatuses[number], tries: number, changedAt: string, nextTryAt: string | null, problem: string | null }

/** GET /api/outbox: mails of this studio that were written to the disk because no mail server is set. */
export interface OutboxWire { hasMailServer: boolean, mails: { name: string, to: string, subject: string, at: string | null, text: string }[] }
