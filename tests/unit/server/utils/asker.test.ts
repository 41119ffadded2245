import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { pathToFileURL } from 'node:url'
import { drizzle } from 'drizzle-orm/better-sqlite3'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { workerBundle } from '../../../../config/own-bundle'
import * as schema from '~~/db/schema'
import { atOnce, replan } from '~~/server/planning/replan'
import { Asker } from '~~/server/utils/asker'
import { copyOf, openDatabase } from '~~/server/utils/database'
import type { Database } from '~~/server/utils/database'
import { isRefusal } from '~~/server/utils/errors'
import { plannedStudio } from '../../../helpers/planned-studio'
import { hour } from '../../../helpers/studio'

// A Tuesday.
const now = Date.parse('2026-04-07T10:00:00Z')
const root = join(import.meta.dirname, '../../../..')

let folder = ''
let built: URL
let db: Database
let room = 0

beforeAll(async () => {
  // Below the project, so that the worker finds the database's binary as the built server's does.
  folder = mkdtempSync(join(root, 'node_modules/.asking-'))
  await workerBundle(root, 'asking-worker', folder)
  built = pathToFileURL(join(folder, 'asking-worker.mjs'))
  const studio = plannedStudio(now, 'painted-waxed-box', 2)
  studio.db.insert(schema.reading).values({ studioId: studio.studioId, roomId: studio.rooms.bench, at: now - hour, toldAt: now, tempC: 18, rh: 0.6, source: 'note' }).run()
  await replan(studio.db, studio.studioId, now, atOnce)
  room = studio.rooms.bench
  writeFileSync(join(folder, 'studio.db'), studio.db.$client.serialize())
  db = openDatabase(join(folder, 'studio.db'))
}, 120_000)

afterAll(() => {
  db.$client.close()
  rmSync(folder, { recursive: true })
})

describe('a question', () => {
  it('is answered in a worker without a lock: while another holds the database, and without a trace in it', async () => {
    const asker = new Asker({ worker: built })
    const before = db.$client.serialize()
    // As a request does that is in the middle of a change.
    db.$client.exec('begin immediate')
    const found = await asker.ask(db, 'what if', { studioId: 1, change: { kind: 'humidity', roomId: room, rh: 0.4 } }, now)
    db.$client.exec('rollback')
    expect(found).toMatchObject({ ok: true })
    expect(isRefusal(found) ? [] : found.difference.batches).toHaveLength(1)
    expect(db.$client.serialize().equals(before)).toBe(true)
    await asker.close()
  }, 30_000)

  it('gets the same answer in this thread and in a worker, where time does not matter', async () => {
    const [here, there] = [new Asker({ worker: null }), new Asker({ worker: built })]
    const question = { studioId: 1, batchId: 1 }
    expect(await there.ask(db, 'date', question, now)).toEqual(await here.ask(db, 'date', question, now))
    await there.close()
  }, 30_000)

  it('gives way to a newer one of its key, and leaves those of other keys alone', async () => {
    const asker = new Asker({ worker: built })
    const ask = (key: string | null) => asker.ask(db, 'date', { studioId: 1, batchId: 1 }, now, key)
    const answers = await Promise.all([ask('x'), ask('x'), ask(null), ask('y')])
    expect(answers.map(each => isRefusal(each))).toEqual([true, false, false, false])
    await asker.close()
    expect(await ask('x')).toMatchObject({ ok: false, reason: 'conflict' })
  }, 30_000)
})

describe('a worker that fails', () => {
  it('fails the question it had, and the next one gets a new worker', async () => {
    const file = join(folder, 'dies.mjs')
    writeFileSync(file, 'import { parentPort } from "node:worker_threads"; parentPort.on("message", ({ id, now }) => { if (now === 0) process.exit(3); parentPort.postMessage({ id, ok: true, answer: "told" }) })')
    const asker = new Asker({ worker: pathToFileURL(file) })
    await expect(asker.ask(db, 'promises', { studioId: 1 }, 0)).rejects.toThrow('ended with code 3')
    expect(await asker.ask(db, 'promises', { studioId: 1 }, 1)).toBe('told')
    await asker.close()
  })
  it('is ended when it falls silent, and let go when nobody asks', async () => {
    const file = join(folder, 'silent.mjs')
    writeFileSync(file, 'import { parentPort } from "node:worker_threads"; let n = 0; parentPort.on("message", ({ id, now }) => { if (now > 0) parentPort.postMessage({ id, ok: true, answer: ++n }) })')
    const asker = new Asker({ worker: pathToFileURL(file), patience: 2000, idle: 50 })
    await expect(asker.ask(db, 'promises', { studioId: 1 }, 0)).rejects.toThrow('said nothing')
    expect(await asker.ask(db, 'promises', { studioId: 1 }, 1)).toBe(1)
    await new Promise(resolve => setTimeout(resolve, 300))
    // A new worker counts from the beginning.
    expect(await asker.ask(db, 'promises', { studioId: 1 }, 1)).toBe(1)
    await asker.close()
  })
})

describe('a copy of a database', () => {
  it('holds what was committed last and keeps what is done to it to itself', () => {
    db.$client.exec('update studio set name = \'Renamed\'')
    const copy = copyOf(join(folder, 'studio.db'))
    expect(copy.select().from(schema.studio).get()?.name).toBe('Renamed')
    copy.update(schema.studio).set({ name: 'Other' }).run()
    expect(drizzle(db.$client, { schema }).select().from(schema.studio).get()?.name).toBe('Renamed')
    copy.$client.close()
  })
})
