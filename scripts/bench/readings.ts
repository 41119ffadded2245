import { migrate } from 'drizzle-orm/better-sqlite3/migrator'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { performance } from 'node:perf_hooks'
import { fileURLToPath } from 'node:url'
import { fillBoard } from './board-rows'
import { chanceFrom } from './chance'
import { inPieces, splitRows } from '~~/composables/loggerRows'
import { member, room } from '~~/db/schema'
import { airCourses } from '~~/server/services/air-course'
import { bringInFile, removeImport } from '~~/server/services/reading-imports'
import { openDatabase } from '~~/server/utils/database'
import type { Database } from '~~/server/utils/database'
import { predictPieces } from '~~/server/work/predict'
import { zoneClock } from '#shared/air/zone'
import { decodeText } from '#shared/logger-file/decode'
import { guessDelimiter } from '#shared/logger-file/delimiter'
import { guessPlan } from '#shared/logger-file/guess'
import { fileReader, oldestReach } from '#shared/logger-file/read'
import type { FileReader } from '#shared/logger-file/read'
import { readingImportRequest } from '#shared/schemas/reading-import'

const seed = 20_260_401
const now = Date.UTC(2026, 3, 1, 12)
const lines = 50_000
const everyMs = 5 * 60_000
const zoneName = 'Europe/Lisbon'

/** A logger's file as the worst ones are: Western letters, semicolons, decimal commas, days first. */
function fileText(): string {
  const chance = chanceFrom(seed)
  const two = (value: number) => String(value).padStart(2, '0')
  const rows = Array.from({ length: lines }, (_, i) => {
    const at = new Date(now - (lines - i) * everyMs)
    const tempC = 16 + 4 * Math.sin((at.getUTCHours() - 9) / 24 * 2 * Math.PI) + chance()
    const rh = 45 + 30 * chance()
    return `${i + 1};${two(at.getUTCDate())}.${two(at.getUTCMonth() + 1)}.${at.getUTCFullYear()} ${two(at.getUTCHours())}:${two(at.getUTCMinutes())}:00;${tempC.toFixed(1).replace('.', ',')};${rh.toFixed(1).replace('.', ',')}`
  })
  return ['Logger;shed', '', 'No;Date and time (UTC);Temperature (°C);Humidity (%)', ...rows].join('\r\n')
}

const times: { what: string, ms: number }[] = []
async function timed<T>(what: string, work: () => T | Promise<T>): Promise<T> {
  const from = performance.now()
  const result = await work()
  times.push({ what, ms: performance.now() - from })
  return result
}

/** What the page does: letters, columns, readings, with a breath between the pieces. */
async function readFile(bytes: Uint8Array): Promise<FileReader> {
  const text = await timed('letters and what parts the cells', () => decodeText(bytes) ?? '')
  const rows = await timed('split into cells', () => splitRows(text, guessDelimiter(text.slice(0, 100_000)), () => {}))
  const { plan } = await timed('guess columns, units and order', () => guessPlan(rows, 'metric'))
  return timed('read every line', async () => {
    const reader = fileReader(plan, zoneClock(zoneName, now - oldestReach, now), now)
    await inPieces(rows, (piece) => {
      reader.take(piece)
      return true
    }, () => {})
    return reader
  })
}

async function bring(db: Database, studioId: number, reader: FileReader) {
  const roomId = db.select({ id: room.id }).from(room).get()?.id ?? 0
  const who = db.select().from(member).get()
  if (!who) throw new Error('The bench studio has nobody.')
  const { readings } = reader
  const body = JSON.stringify({ clientKey: 'bench-import-1', fileName: 'shed.csv', times: readings.map(each => each.at), temps: readings.map(each => each.tempC), humidities: readings.map(each => each.rh) })
  const request = await timed('check the request', () => readingImportRequest.parse(JSON.parse(body)))
  const done = await timed('write, and foretell every film', () => bringInFile(db, studioId, who.id, roomId, request, now))
  const spent = times.reduce((sum, each) => sum + each.ms, 0)
  if (!done.ok || done.importId === null || done.added !== lines) throw new Error(`The bench file did not come in whole: ${JSON.stringify(done)}`)
  const importId = done.importId
  const after = [
    { what: 'foretell every film again', work: () => db.transaction(tx => predictPieces(tx, studioId, null, now)) },
    { what: 'draw a month of the air', work: () => airCourses(db, studioId, 'month', now) },
    { what: 'take the file back', work: () => removeImport(db, studioId, { id: who.id, role: 'owner', stepKinds: [] }, importId, now) },
  ]
  const first = times.length
  for (const { what, work } of after) await timed<unknown>(what, work)
  return { megabytes: body.length / 1e6, spent, first }
}

/** Takes a logger's file of 50,000 lines from its bytes to readings, with a board of wet films to foretell, and gives the lines to print. */
export async function benchReadings(): Promise<string[]> {
  times.length = 0
  const folder = mkdtempSync(join(tmpdir(), 'stillwet-bench-'))
  const db = openDatabase(join(folder, 'bench.db'))
  try {
    migrate(db, { migrationsFolder: fileURLToPath(new URL('../../db/migrations', import.meta.url)) })
    const { studio, live } = fillBoard(db, { pieces: 300, places: 40, coats: 10, now, seed })
    db.transaction(tx => predictPieces(tx, studio.id, null, now))
    const bytes = Uint8Array.from(fileText(), letter => letter.charCodeAt(0))
    const reader = await readFile(bytes)
    const { megabytes, spent, first } = await bring(db, studio.id, reader)
    const shown = ({ what, ms }: typeof times[number]) => `  ${`${what}:`.padEnd(36)}${ms.toFixed(0).padStart(6)} ms`
    return [
      `readings: a logger's file of ${lines.toLocaleString('en-GB')} lines, ${(bytes.length / 1e6).toFixed(1)} MB, every 5 min; ${live} wet films; seed ${seed}`,
      ...times.slice(0, first).map(shown),
      `  sent as one body of ${megabytes.toFixed(1)} MB; ${reader.bad.length} bad lines`,
      `  in all ${(spent / 1000).toFixed(2)} s, bar 5 s: ${(spent / 5000).toFixed(2)} of it`,
      ...times.slice(first).map(shown),
    ]
  }
  finally {
    db.$client.close()
    rmSync(folder, { recursive: true, force: true })
  }
}
