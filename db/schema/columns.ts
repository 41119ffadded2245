import { sql } from 'drizzle-orm'
import { check, foreignKey, integer, unique } from 'drizzle-orm/sqlite-core'
import type { AnySQLiteColumn } from 'drizzle-orm/sqlite-core'

// Imported relatively throughout db/schema: drizzle-kit does not resolve the application's aliases.

/** Row number of a table. */
export const id = () => integer('id').primaryKey({ autoIncrement: true })

/** An instant: milliseconds since 1970-01-01 UTC. On the wire it is an ISO 8601 string. */
export const instant = (name: string) => integer(name)

/** A yes or no, kept as 0 or 1. */
export const flag = (name: string) => integer(name, { mode: 'boolean' })

interface StudioRow { studioId: AnySQLiteColumn, id: AnySQLiteColumn }

/** Makes (studio, id) a key that `within` can point at. */
export const studioKey = (table: StudioRow) => unique().on(table.studioId, table.id)

/**
 * A reference that cannot leave the studio: (studio_id, x_id) -> x(studio_id, id).
 * With x_id null SQLite asks nothing, so optional references use the same helper.
 */
export function within(row: { studioId: AnySQLiteColumn }, column: AnySQLiteColumn, target: StudioRow) {
  return foreignKey({ columns: [row.studioId, column], foreignColumns: [target.studioId, target.id] })
}

/** The same for a row that is a piece of another and goes with it. */
export function belongsTo(row: { studioId: AnySQLiteColumn }, column: AnySQLiteColumn, target: StudioRow) {
  return within(row, column, target).onDelete('cascade')
}

/** Allows a text column only the listed words. The words are ours, never a user's. */
export function oneOf(name: string, column: AnySQLiteColumn, words: readonly string[]) {
  return check(name, sql`${column} in (${sql.raw(words.map(word => `'${word}'`).join(', '))})`)
}
