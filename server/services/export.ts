import Sqlite from 'better-sqlite3'
import { asc, eq, getTableName, is } from 'drizzle-orm'
import { drizzle } from 'drizzle-orm/better-sqlite3'
import { SQLiteTable } from 'drizzle-orm/sqlite-core'
import type { AnySQLiteColumn } from 'drizzle-orm/sqlite-core'
import { strToU8, Zip, ZipDeflate, ZipPassThrough } from 'fflate'
import * as schema from '~~/db/schema'
import { actSheet, pieceSheet, readingSheet } from '~~/server/services/export-sheets'
import type { StudioRow } from '~~/server/services/sessions'
import { readKept } from '~~/server/services/storage'
import type { Config } from '~~/server/utils/config'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { fileEndings, sniffType } from '#shared/file-types'
import { exportWords } from '#shared/words/export'

interface Entry { name: string, data: Uint8Array, packed?: boolean }
type StudioTable = SQLiteTable & { studioId: AnySQLiteColumn }

/** Doors into the studio and what went out through them: they open nothing elsewhere and must not be read by others. */
const doors: ReadonlySet<string> = new Set(['session', 'invitation', 'wall_link', 'calendar_link', 'sensor_address', 'bench_tablet', 'subscription', 'delivery'])
const secrets: ReadonlySet<string> = new Set(['pinHash', 'pinWrong', 'pinLockedTill'])

const isStudioTable = (value: unknown): value is StudioTable => is(value, SQLiteTable) && 'studioId' in value && !doors.has(getTableName(value))
const studioTables: readonly StudioTable[] = Object.values<unknown>(schema).filter(isStudioTable)

/** Rows as text: instants in ISO 8601 UTC, nothing that opens a door. */
function asJson(rows: readonly Record<string, unknown>[]): string {
  return JSON.stringify(rows, (key, value: unknown) => {
    if (secrets.has(key)) return undefined
    return key.endsWith('At') && typeof value === 'number' ? new Date(value).toISOString() : value
  }, 1)
}

const asText = (name: string, text: string): Entry => ({ name, data: strToU8(text) })

/** Photographs and data sheets as they are kept; a file that is lost is left out, its row says that it was there. */
async function* files(db: Database, folder: string, studioId: number): AsyncGenerator<Entry> {
  const rows = db.select().from(schema.attachment).where(scoped(schema.attachment, studioId)).orderBy(asc(schema.attachment.id)).all()
  for (const row of rows) {
    const data = await readKept(folder, studioId, row.sha256)
    const type = data && sniffType(data)
    if (data) yield { name: `files/${row.id}-${row.kind.replace(' ', '-')}${type ? `.${fileEndings[type]}` : ''}`, data, packed: true }
  }
}

function* tables(db: Database, studio: StudioRow, now: number): Generator<Entry> {
  const people = db.select({ memberId: schema.member.id, name: schema.person.name, email: schema.person.email, role: schema.member.role, leftAt: schema.member.leftAt })
    .from(schema.member).innerJoin(schema.person, eq(schema.person.id, schema.member.personId)).where(scoped(schema.member, studio.id)).orderBy(asc(schema.member.id)).all()
  yield asText(exportWords.readMeName, exportWords.readMe(studio.name, new Date(now).toISOString()))
  yield asText('pieces.csv', pieceSheet(db, studio))
  yield asText('acts.csv', actSheet(db, studio))
  yield asText('readings.csv', readingSheet(db, studio))
  yield asText('studio.json', asJson([studio]))
  yield asText('people.json', asJson(people))
  for (const table of studioTables) yield asText(`tables/${getTableName(table)}.json`, asJson(db.select().from(table).where(scoped(table, studio.id)).all()))
}

async function* everything(db: Database, folder: string, studio: StudioRow, now: number): AsyncGenerator<Entry> {
  yield* tables(db, studio, now)
  yield* files(db, folder, studio.id)
}

/**
 * Everything that a studio has told, as the chunks of one ZIP file: its rows as they stood at one moment, while others
 * go on writing. Read by a connection of its own that lasts as long as the answer, table by table.
 * @param now ms UTC, dates the files
 */
export async function* studioArchive({ databaseFile, storageFolder }: Pick<Config, 'databaseFile' | 'storageFolder'>, studio: StudioRow, now: number): AsyncGenerator<Uint8Array> {
  const client = new Sqlite(databaseFile, { readonly: true, fileMustExist: true })
  const chunks: Uint8Array[] = []
  const zip = new Zip((error, chunk) => {
    if (error) throw error
    chunks.push(chunk)
  })
  try {
    client.exec('begin')
    const db = drizzle(client, { schema })
    for await (const { name, data, packed } of everything(db, storageFolder, studio, now)) {
      // Pictures are as small as they get.
      const file = packed ? new ZipPassThrough(name) : new ZipDeflate(name)
      file.mtime = now
      zip.add(file)
      file.push(data, true)
      yield* chunks.splice(0)
    }
    zip.end()
    yield* chunks.splice(0)
  }
  finally {
    client.close()
  }
}
