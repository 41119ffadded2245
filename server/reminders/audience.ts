import { and, eq, inArray, isNull } from 'drizzle-orm'
import type { cause } from '~~/db/schema'
import { act, callChoice, member, person, ragDuty, subscription } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { fireCallKinds } from '#shared/terms'
import type { CallKind, Channel, Role } from '#shared/terms'
import { callTraits } from './kinds'

/** Where one sending goes: a browser's subscription (its row) or a member's mail (the member's row). */
export interface Endpoint { channel: Channel, endpointId: number, memberId: number, address: string }

/** Whether a kind can be switched off by a member: fire calls cannot. */
export const isSwitchable = (kind: CallKind) => !fireCallKinds.some(fire => fire === kind)

/** Whether a member of this role gets a kind while they have not chosen: a helper only fire calls. */
export const isOnByDefault = (kind: CallKind, role: Role) => role !== 'helper' || !isSwitchable(kind)

/** The endpoints a call goes to now: each member's browsers that still listen, and their mail. */
export function endpointsFor(tx: Database | Transaction, studioId: number, call: { kind: CallKind, repeat: number, subjectId: number }): Endpoint[] {
  const people = listeners(tx, studioId, call)
  if (people.length === 0) return []
  const ids = people.map(one => one.memberId)
  const browsers = tx.select({ endpointId: subscription.id, memberId: subscription.memberId, address: subscription.endpoint }).from(subscription)
    .where(and(eq(subscription.studioId, studioId), inArray(subscription.memberId, ids), isNull(subscription.goneAt))).all()
  return [
    ...browsers.map(browser => ({ channel: 'push' as const, ...browser })),
    ...people.map(one => ({ channel: 'mail' as const, endpointId: one.memberId, memberId: one.memberId, address: one.email })),
  ]
}

function listeners(tx: Database | Transaction, studioId: number, call: { kind: CallKind, repeat: number, subjectId: number }) {
  const audience = callTraits[call.kind].audience(call.repeat)
  const members = tx.select({ memberId: member.id, role: member.role, email: person.email }).from(member).innerJoin(person, eq(member.personId, person.id))
    .where(and(eq(member.studioId, studioId), isNull(member.leftAt))).all()
  if (audience === 'everybody') return members
  const doer = audience === 'makers' ? null : doerOf(tx, studioId, call.subjectId)
  // Whoever did it may be unknown: a bench tablet records for the studio. Then everybody is asked at once.
  if (audience !== 'makers' && doer === null) return members
  const choices = isSwitchable(call.kind) ? choicesFor(tx, studioId, call.kind) : new Map<number, boolean>()
  return members.filter(one => choices.get(one.memberId) ?? (one.memberId === doer || isMaker(one.role)))
}

const isMaker = (role: Role) => role !== 'helper'

function choicesFor(tx: Database | Transaction, studioId: number, kind: CallKind) {
  const rows = tx.select().from(callChoice).where(and(eq(callChoice.studioId, studioId), eq(callChoice.kind, kind))).all()
  return new Map(rows.map(row => [row.memberId, row.wanted]))
}

function doerOf(tx: Database | Transaction, studioId: number, ragDutyId: number) {
  return tx.select({ memberId: act.memberId }).from(ragDuty).innerJoin(act, eq(ragDuty.lastOilActId, act.id))
    .where(and(eq(ragDuty.studioId, studioId), eq(ragDuty.id, ragDutyId))).get()?.memberId ?? null
}

/** Words that name an endpoint for good, for its deliveries' stable ids. */
export function stableWords(why: typeof cause.$inferSelect, stage: string, repeat: number, endpoint: Endpoint) {
  return [why.studioId, why.kind, why.subjectType, why.subjectId, why.groupKey, stage, repeat, endpoint.channel, endpoint.channel === 'mail' ? endpoint.memberId : endpoint.address]
}
