import { migrate } from 'drizzle-orm/better-sqlite3/migrator'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { performance } from 'node:perf_hooks'
import { fileURLToPath } from 'node:url'
import { fillBoard } from './board-rows'
import { studioState } from '~~/server/services/studio-state'
import { openDatabase } from '~~/server/utils/database'
import type { Database } from '~~/server/utils/database'

const seed = 20_260_401
const now = Date.UTC(2026, 3, 1, 12)
const runs = 20

/** Counts the statements of looks at the board and sums the time in the database: preparing, running and reading them. */
function watch(db: Database) {
  const seen = { statements: 0, inDatabaseMs: 0 }
  const { prepare } = db.$client
  const timed = <Given extends unknown[], Result>(work: (...given: Given) => Result) => (...given: Given): Result => {
    const from = performance.now()
    try {
      return work(...given)
    }
    finally {
      seen.inDatabaseMs += performance.now() - from
    }
  }
  db.$client.prepare = ((text: string) => {
    seen.statements += 1
    const statement = timed(() => prepare.call(db.$client, text))()
    statement.all = timed(statement.all.bind(statement))
    statement.get = timed(statement.get.bind(statement))
    return statement
  }) as typeof prepare
  return seen
}

const medianOf = (values: readonly number[]) => {
  const sorted = [...values].sort((a, b) => a - b)
  return (sorted[sorted.length / 2 - 1]! + sorted[sorted.length / 2]!) / 2
}

/** Draws the board's state from 300 pieces on 40 places, ten coats each, and gives the lines to print. */
export function benchBoard(): string[] {
  const folder = mkdtempSync(join(tmpdir(), 'stillwet-bench-'))
  const db = openDatabase(join(folder, 'bench.db'))
  migrate(db, { migrationsFolder: fileURLToPath(new URL('../../db/migrations', import.meta.url)) })
  const made = fillBoard(db, { pieces: 300, places: 40, coats: 10, now, seed })
  const look = () => studioState(db, made.studio, now)
  const state = look()
  const seen = watch(db)
  const looks = Array.from({ length: runs }, () => {
    Object.assign(seen, { statements: 0, inDatabaseMs: 0 })
    const from = performance.now()
    look()
    return { ...seen, wholeMs: performance.now() - from }
  })
  const queries = medianOf(looks.map(each => each.inDatabaseMs))
  const whole = medianOf(looks.map(each => each.wholeMs))
  db.$client.close()
  rmSync(folder, { recursive: true, force: true })
  return [
    `board: ${state.pieces.length} pieces on ${state.places.length} places, ${made.coats} coats of which ${made.live} live, seed ${seed}`,
    `  ${looks[0]!.statements} statements; queries in all, median of ${runs} warm: ${queries.toFixed(1)} ms`,
    `  bar 15 ms: ${(queries / 15).toFixed(2)} of it; with the state made of them: ${whole.toFixed(1)} ms`,
  ]
}
