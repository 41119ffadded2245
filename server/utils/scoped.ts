import { and, eq } from 'drizzle-orm'
import type { SQL } from 'drizzle-orm'
import type { AnySQLiteColumn } from 'drizzle-orm/sqlite-core'

interface StudioTable { studioId: AnySQLiteColumn }
interface StudioRow extends StudioTable { id: AnySQLiteColumn }

/** The condition every query on a studio's table begins with: `where(scoped(room, studio.id, eq(room.name, name)))`. */
export function scoped(table: StudioTable, studioId: number, ...more: (SQL | undefined)[]): SQL | undefined {
  return and(eq(table.studioId, studioId), ...more)
}

/** One row of this studio by its number, or nothing: `where(owned(room, studio.id, roomId))`. */
export function owned(table: StudioRow, studioId: number, id: number): SQL | undefined {
  return scoped(table, studioId, eq(table.id, id))
}
