import { sql } from 'drizzle-orm'
import { integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core'
import { act } from './acts'
import { id, instant, oneOf, studioKey, within } from './columns'
import { room } from './places'
import { member, studioColumn } from './studio'

/** A room nobody enters until a named person opens it. One open line per room. */
export const keepOut = sqliteTable('keep_out', {
  id: id(),
  studioId: studioColumn(),
  roomId: integer('room_id').notNull(),
  fromActId: integer('from_act_id').notNull(),
  fromAt: instant('from_at').notNull(),
  opensByMemberId: integer('opens_by_member_id'),
  openedActId: integer('opened_act_id'),
  openedAt: instant('opened_at'),
}, t => [
  studioKey(t), within(t, t.roomId, room), within(t, t.fromActId, act), within(t, t.openedActId, act), within(t, t.opensByMemberId, member),
  uniqueIndex('keep_out_now').on(t.roomId).where(sql`${t.openedAt} is null`),
])

/** Oily rags somewhere: asked about until somebody says where they are. */
export const ragDuty = sqliteTable('rag_duty', {
  id: id(),
  studioId: studioColumn(),
  roomId: integer('room_id').notNull(),
  lastOilAt: instant('last_oil_at').notNull(),
  lastOilActId: integer('last_oil_act_id').notNull(),
  answer: text('answer').$type<'flat outdoors' | 'in water can' | 'not dealt with'>(),
  answeredAt: instant('answered_at'),
  answeredByMemberId: integer('answered_by_member_id'),
}, t => [
  studioKey(t), within(t, t.roomId, room), within(t, t.lastOilActId, act), within(t, t.answeredByMemberId, member),
  oneOf('rag_duty_answer', t.answer, ['flat outdoors', 'in water can', 'not dealt with']),
  uniqueIndex('rag_duty_now').on(t.roomId).where(sql`${t.answeredAt} is null`),
])
