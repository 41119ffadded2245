import { findDemo, seedDemo } from '~~/db/seed/demo'
import { copyAgain } from '~~/server/utils/database'
import type { Database } from '~~/server/utils/database'

/** So many row numbers are left free for what others write while the demo is being made. */
const gap = 100_000

/** Every row of a demo studio, table by table, the studio and its people first. Null: there is one already. */
export interface DemoRows { studioId: number, tables: { name: string, rows: Record<string, unknown>[] }[] }

function leaveGap({ $client: client }: Database) {
  const names = client.prepare<[], string>(`select name from sqlite_master where type = 'table' and sql like '%autoincrement%'`).pluck().all()
  const known = new Set(client.prepare<[], string>('select name from sqlite_sequence').pluck().all())
  client.prepare('update sqlite_sequence set seq = seq + ?').run(gap)
  const add = client.prepare('insert into sqlite_sequence (name, seq) values (?, ?)')
  for (const name of names) if (!known.has(name)) add.run(name, gap)
}

/**
 * Makes the demo studio on a copy of the database and answers its rows: playing its weeks takes seconds, in which the
 * database itself stays everybody's. Their numbers lie beyond any that others take meanwhile.
 * @param now ms UTC, in whose week the demo stands
 * @param zone IANA name
 */
export async function demoRows(db: Database, now: number, zone: string): Promise<DemoRows | null> {
  if (findDemo(db) !== null) return null
  const copy = copyAgain(db)
  try {
    leaveGap(copy)
    const { studioId } = await seedDemo(copy, now, zone)
    const { $client: client } = copy
    const rowsOf = (name: string, where: string) => ({ name, rows: client.prepare<[], Record<string, unknown>>(`select * from "${name}" where ${where}`).all() })
    const others = client.prepare<[], string>(`select m.name from sqlite_master m join pragma_table_info(m.name) c on c.name = 'studio_id' where m.type = 'table'`).pluck().all()
    return { studioId, tables: [rowsOf('person', 'demo = 1'), rowsOf('studio', `id = ${studioId}`), ...others.map(name => rowsOf(name, `studio_id = ${studioId}`))] }
  }
  finally {
    copy.$client.close()
  }
}

/** Writes the rows as they are, in the caller's transaction; references are looked at at its end. */
export function writeDemoRows({ $client: client }: Database, { tables }: DemoRows): void {
  client.pragma('defer_foreign_keys = on')
  for (const { name, rows } of tables) {
    const columns = Object.keys(rows[0] ?? {})
    if (columns.length === 0) continue
    const insert = client.prepare(`insert into "${name}" (${columns.map(each => `"${each}"`).join(', ')}) values (${columns.map(() => '?').join(', ')})`)
    for (const row of rows) insert.run(columns.map(each => row[each]))
  }
}
