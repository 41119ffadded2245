import { migrate } from 'drizzle-orm/better-sqlite3/migrator'
import { mkdtempSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { monitorEventLoopDelay, performance } from 'node:perf_hooks'
import { fileURLToPath, pathToFileURL } from 'node:url'
import { workerBundle } from '../../config/own-bundle'
import { batch, finishingSchedule, member, place, room } from '~~/db/schema'
import { seedDemo } from '~~/db/seed/demo'
import { changedProblem } from '~~/server/planning/changed-facts'
import { atOnce, replan } from '~~/server/planning/replan'
import { readPlanFacts } from '~~/server/planning/facts'
import { startBatch } from '~~/server/services/batches'
import { Asker } from '~~/server/utils/asker'
import { openDatabase } from '~~/server/utils/database'
import type { Database } from '~~/server/utils/database'
import { isRefusal } from '~~/server/utils/errors'

const root = fileURLToPath(new URL('../..', import.meta.url))
const now = Date.UTC(2026, 3, 7, 9)
const pieces = 60
const barMs = 2000

/** The demo studio, filled up to sixty pieces with batches of the library's schedules. */
export async function fill(db: Database): Promise<void> {
  migrate(db, { migrationsFolder: join(root, 'db/migrations') })
  await seedDemo(db, now)
  const maker = db.select({ id: member.id, role: member.role }).from(member).all().find(each => each.role === 'owner')!
  const shelf = db.insert(place).values({ studioId: 1, roomId: db.select().from(room).get()!.id, name: 'Long shelf', kind: 'shelf', capacity: 200 }).returning().get()
  const schedules = db.select().from(finishingSchedule).all()
  for (let left = pieces - (readPlanFacts(db, 1)?.pieces.length ?? 0), i = 0; left > 0; i++) {
    const size = Math.min(11, left)
    const made = startBatch(db, 1, { member: { ...maker, stepKinds: [] } }, {
      clientKey: `bench-asking-${i}`, name: `More ${i}`, scheduleId: schedules[(i * 5) % schedules.length]!.id, pieces: Array.from({ length: size }, (_, k) => `More ${i}.${k}`), sizeUnits: 1,
      placeId: shelf.id, order: { name: `Order ${i}`, dueAt: new Date(now + (20 + i) * 86_400_000).toISOString() }, startsAt: new Date(now).toISOString(), oldObject: false,
    }, now)
    if (!made.ok) throw new Error(made.message)
    left -= size
  }
  const planned = await replan(db, 1, now, atOnce)
  if (!planned.ok) throw new Error(planned.message)
}

interface Timed { ms: number, processor: number, lag: number, most: number }

/** Milliseconds from asking to the answer, by the clock and of processor, and how long a timer of this thread was kept waiting meanwhile, p99 and most. */
async function timed(ask: () => Promise<unknown>): Promise<Timed> {
  const delays = monitorEventLoopDelay({ resolution: 2 })
  delays.enable()
  const used = process.cpuUsage()
  const from = performance.now()
  const answer = await ask()
  const ms = performance.now() - from
  const { user, system } = process.cpuUsage(used)
  delays.disable()
  if (isRefusal(answer)) throw new Error(answer.message)
  return { ms, processor: (user + system) / 1000, lag: delays.percentile(99) / 1e6, most: delays.max / 1e6 }
}

const line = (name: string, { ms, processor, lag, most }: Timed, idle: number) => `  ${name}: ${ms.toFixed(0)} ms, ${processor.toFixed(0)} ms of processor (bar ${barMs}: ${ms <= barMs ? 'kept' : 'NOT kept'}); this thread late by ${Math.max(0, lag - idle).toFixed(1)} ms more than idle (p99; most ${most.toFixed(1)} ms)`

/** What-ifs, the bottleneck, a start check and promises at a studio of 60 pieces, asked of the worker as the server does. */
export async function benchAsking(): Promise<string[]> {
  const folder = mkdtempSync(join(root, 'node_modules/.bench-asking-'))
  const db = openDatabase(join(folder, 'bench.db'))
  const asker = new Asker({ worker: pathToFileURL(join(folder, 'asking-worker.mjs')) })
  try {
    await workerBundle(root, 'asking-worker', folder)
    await fill(db)
    const facts = readPlanFacts(db, 1)!
    const shelf = db.select().from(place).all().find(each => each.name === 'Long shelf')!
    const warm = db.select().from(room).all().find(each => !isRefusal(changedProblem(db, 1, { kind: 'humidity', roomId: each.id, rh: 0.45 }, now)))!
    const longest = db.select().from(finishingSchedule).all().find(each => each.libraryKey === 'painted-waxed-box')!
    const request = { scheduleId: longest.id, pieces, sizeUnits: 1, placeId: shelf.id, startsAt: new Date(now).toISOString(), dueAt: null }
    const batchId = db.select({ id: batch.id }).from(batch).all().at(-1)!.id
    const idle = (await timed(() => new Promise(resolve => setTimeout(resolve, 1500)))).lag
    const questions: [string, () => Promise<unknown>][] = [
      ['what if, first of a plan (one more on a shelf; the worker starts)', () => asker.ask(db, 'what if', { studioId: 1, change: { kind: 'places', placeKind: 'shelf', more: 1 } }, now)],
      ['what if, drier air', () => asker.ask(db, 'what if', { studioId: 1, change: { kind: 'humidity', roomId: warm.id, rh: 0.45 } }, now)],
      ['what if, Saturday', () => asker.ask(db, 'what if', { studioId: 1, change: { kind: 'open day', weekday: 6, fromMin: 540, toMin: 900 } }, now)],
      ['bottleneck', () => asker.ask(db, 'bottleneck', { studioId: 1 }, now)],
      [`start check of ${pieces} more pieces`, () => asker.ask(db, 'start', { studioId: 1, request }, now)],
      ['date of a batch under way', () => asker.ask(db, 'date', { studioId: 1, batchId }, now)],
      [`date of a new batch of ${pieces} more pieces, its plan with it`, () => asker.ask(db, 'date of new', { studioId: 1, request }, now)],
    ]
    const lines = [`asking: the demo studio with ${facts.pieces.length} pieces and ${facts.turns.length} turns of work, the answers from the worker; idle lag p99 ${idle.toFixed(1)} ms`]
    for (const [name, ask] of questions) lines.push(line(name, await timed(ask), idle))
    return lines
  }
  finally {
    await asker.close()
    db.$client.close()
    rmSync(folder, { recursive: true, force: true })
  }
}
