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

/** The statements one look at the board asks, as SQL text. */
function statementsOf(db: Database, look: () => void): string[] {
  const asked: string[] = []
  const { prepare } = db.$client
  db.$client.prepare = ((text: string) => {
    asked.push(text)
    return prepare.call(db.$client, text)
  }) as typeof prepare
  look()
  db.$client.prepare = prepare
  return asked
}

/** Draws the board's state from 300 pieces on 40 places, ten coats each, and gives the lines to print. */
export function benchBoard(): string[] {
  const folder = mkdtempSync(join(tmpdir(), 'stillwet-bench-'))
  const db = openDatabase(join(folder, 'bench.db'))
  migrate(db, { migrationsFolder: fileURLToPath(new URL('../../db/migrations', import.meta.url)) })
  const made = fillBoard(db, { pieces: 300, places: 40, coats: 10, now, seed })
  const look = () => studioState(db, made.studio, now)
  const statements = statementsOf(db, look).length
  const state = look()
  const times = Array.from({ length: runs }, () => {
    const from = performance.now()
    look()
    return performance.now() - from
  }).sort((a, b) => a - b)
  const median = (times[runs / 2 - 1]! + times[runs / 2]!) / 2
  db.$client.close()
  rmSync(folder, { recursive: true, force: true })
  return [
    `board: ${state.pieces.length} pieces on ${state.places.length} places, ${made.coats} coats of which ${made.live} live, seed ${seed}`,
    `  ${statements} statements; median of ${runs} warm: ${median.toFixed(1)} ms (fastest ${times[0]!.toFixed(1)}, slowest ${times.at(-1)!.toFixed(1)})`,
    `  bar 15 ms: ${(median / 15).toFixed(2)} of it`,
  ]
}
