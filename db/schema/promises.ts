import { sql } from 'drizzle-orm'
import { check, integer, real, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import { promiseCauses } from '#shared/terms'
import type { MovedTurn } from '#shared/plan-moves'
import type { PromiseCause } from '#shared/terms'
import { flag, instant, within } from './columns'
import { batch, order, promise } from './pieces'
import { studioColumn } from './studio'

/** What a studio says of its own luck, asked once and changed at will; null while nobody has said. */
export const promiseBasis = sqliteTable('promise_basis', {
  studioId: studioColumn().primaryKey(),
  /** Of ten coats, so many are done again. */
  reworkOfTen: real('rework_of_ten'),
  /** Share of the open hours that reaches the bench. */
  benchShare: real('bench_share'),
  changedAt: instant('changed_at').notNull(),
}, t => [
  check('promise_basis_rework', sql`${t.reworkOfTen} is null or ${t.reworkOfTen} between 0 and 9`),
  check('promise_basis_share', sql`${t.benchShare} is null or ${t.benchShare} between 0.1 and 1`),
])

/**
 * How a promised date stands by the newest plan. `slips` counts how often it has begun to slip since it was promised, so that
 * each time is one call. `moved`: the last start of it that the plan put later when it began to; null when none moved by enough to be told. `cause`: of
 * all that may still hold it up, the most. `rescueBatchId`: the batch that would save it, moved back; null when none would, or none was looked for.
 */
export const promiseWatch = sqliteTable('promise_watch', {
  orderId: integer('order_id').primaryKey(),
  studioId: studioColumn(),
  promiseId: integer('promise_id').notNull(),
  reckonedAt: instant('reckoned_at').notNull(),
  likelyAt: instant('likely_at').notNull(),
  dateAt: instant('date_at').notNull(),
  slipping: flag('slipping').notNull().default(false),
  slips: integer('slips').notNull().default(0),
  sinceAt: instant('since_at'),
  cause: text('cause').$type<PromiseCause>(),
  moved: text('moved', { mode: 'json' }).$type<MovedTurn>(),
  rescueBatchId: integer('rescue_batch_id'),
}, t => [
  within(t, t.orderId, order), within(t, t.promiseId, promise), within(t, t.rescueBatchId, batch),
  check('promise_watch_cause', sql`${t.cause} is null or ${t.cause} in (${sql.raw(promiseCauses.map(word => `'${word}'`).join(', '))})`),
  check('promise_watch_since', sql`(${t.slipping} = 1) = (${t.sinceAt} is not null)`),
])
