import Sqlite from 'better-sqlite3'
import { asc, eq, getTableName, is } from 'drizzle-orm'
import { drizzle } from 'drizzle-orm/better-sqlite3'
import { SQLiteTable } from 'drizzle-orm/sqlite-core'
import type { AnySQLiteColumn } from 'drizzle-orm/sqlite-core'
import { strToU8, Zip, ZipDeflate } from 'fflate'
import * as schema from '~~/db/schema'
import { actSheet, pieceSheet, readingSheet } from '~~/server/services/export-sheets'
import type { StudioRow } from '~~/server/services/sessions'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { exportWords } from '#shared/words/export'

interface Entry { name: string, text: string }
type StudioTable = SQLiteTable & { studioId: AnySQLiteColumn }

/** Doors into the studio and what went out through them: they open nothing elsewhere and must not be read by others. */
const doors: ReadonlySet<string> = new Set(['session', 'invitation', 'wall_link', 'calendar_link', 'sensor_address', 'bench_tablet', 'subscription', 'delivery'])
const secrets: ReadonlySet<string> = new Set(['pinHash'])

const isStudioTable = (value: unknown): value is StudioTable => is(value, SQLiteTable) && 'studioId' in value && !doors.has(getTableName(value))
const studioTables: readonly StudioTable[] = Object.values<unknown>(schema).filter(isStudioTable)

/** Rows as text: instants in ISO 8601 UTC, nothing that opens a door. */
function asJson(rows: readonly Record<string, unknown>[]): string {
  return JSON.stringify(rows, (key, value: unknown) => {
    if (secrets.has(key)) return undefined
    return key.endsWith('At') && typeof value === 'number' ? new Date(value).toISOString() : value
  }, 1)
}

function* entries(db: Database, studio: StudioRow, now: number): Generator<Entry> {
  const people = db.select({ memberId: schema.member.id, name: schema.person.name, email: schema.person.email, role: schema.member.role, leftAt: schema.member.leftAt })
    .from(schema.member).innerJoin(schema.person, eq(schema.person.id, schema.member.personId)).where(scoped(schema.member, studio.id)).orderBy(asc(schema.member.id)).all()
  yield { name: exportWords.readMeName, text: exportWords.readMe(studio.name, new Date(now).toISOString()) }
  yield { name: 'pieces.csv', text: pieceSheet(db, studio) }
  yield { name: 'acts.csv', text: actSheet(db, studio) }
  yield { name: 'readings.csv', text: readingSheet(db, studio) }
  yield { name: 'studio.json', text: asJson([studio]) }
  yield { name: 'people.json', text: asJson(people) }
  for (const table of studioTables) yield { name: `tables/${getTableName(table)}.json`, text: asJson(db.select().from(table).where(scoped(table, studio.id)).all()) }
}

/**
 * Everything that a studio has told, as the chunks of one ZIP file: its rows as they stood at one moment, while others
 * go on writing. Read by a connection of its own that lasts as long as the answer, table by table.
 * @param now ms UTC, dates the files
 */
export async function* studioArchive(databaseFile: string, studio: StudioRow, now: number): AsyncGenerator<Uint8Array> {
  const client = new Sqlite(databaseFile, { readonly: true, fileMustExist: true })
  const chunks: Uint8Array[] = []
  const zip = new Zip((error, chunk) => {
    if (error) throw error
    chunks.push(chunk)
  })
  try {
    client.exec('begin')
    for (const { name, text } of entries(drizzle(client, { schema }), studio, now)) {
      const file = new ZipDeflate(name)
      file.mtime = now
      zip.add(file)
      file.push(strToU8(text), true)
      yield* chunks.splice(0)
    }
    zip.end()
    yield* chunks.splice(0)
  }
  finally {
    client.close()
  }
}
