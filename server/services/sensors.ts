import { and, desc, eq } from 'drizzle-orm'
import { reading, room, sensorAddress } from '~~/db/schema'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { absent, malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { hashToken, newToken } from '~~/server/utils/token'
import { predictPieces } from '~~/server/work/predict'
import type { SensorWire } from '#shared/schemas/sensor'
import { readSensor } from '#shared/sensor'
import type { SensorReading } from '#shared/sensor'
import { fields } from '#shared/words/air'

const minute = 60_000
const clockSlack = 2 * minute
const reach = 14 * 24 * 60 * minute
/** A reading this soon after the last, and this near to it, says nothing new and is not kept. */
const stillFor = 5 * minute
const stillTempC = 0.3
const stillRh = 0.01

const ownAddress = (studioId: number, roomId: number) => scoped(sensorAddress, studioId, eq(sensorAddress.roomId, roomId))

/** Makes the address of a room's sensor, told once; the one before opens nothing any more. */
export function makeSensorAddress(db: Database, studioId: number, roomId: number, now: number): { ok: true, token: string } | Refusal {
  if (!db.select({ id: room.id }).from(room).where(owned(room, studioId, roomId)).get()) return absent()
  const { token, hash } = newToken()
  const values = { studioId, roomId, tokenHash: hash, madeAt: now, heardAt: null, refusedAt: null, refusal: null }
  db.insert(sensorAddress).values(values).onConflictDoUpdate({ target: sensorAddress.roomId, set: values }).run()
  return { ok: true, token }
}

export function endSensorAddress(db: Database, studioId: number, roomId: number): { ok: true } | Refusal {
  return db.delete(sensorAddress).where(ownAddress(studioId, roomId)).run().changes > 0 ? { ok: true } : absent()
}

/** Whether a room has an address, and what came of it. */
export function readSensorAddress(db: Database, studioId: number, roomId: number): { sensor: SensorWire | null } | Refusal {
  if (!db.select({ id: room.id }).from(room).where(owned(room, studioId, roomId)).get()) return absent()
  const row = db.select().from(sensorAddress).where(ownAddress(studioId, roomId)).get()
  const iso = (at: number | null) => at === null ? null : new Date(at).toISOString()
  return { sensor: row ? { madeAt: new Date(row.madeAt).toISOString(), heardAt: iso(row.heardAt), refusedAt: iso(row.refusedAt), refusal: row.refusal } : null }
}

/** Takes what a sensor posted. `kept` is false when it says nothing new; a refusal is noted beside the address as well. */
export function hearSensor(db: Database, secret: string, sent: unknown, now: number): { ok: true, kept: boolean } | Refusal {
  const row = db.select({ studioId: sensorAddress.studioId, roomId: sensorAddress.roomId }).from(sensorAddress).where(eq(sensorAddress.tokenHash, hashToken(secret))).get()
  if (!row) return absent()
  const said = readSent(sent, now)
  const note = 'ok' in said ? { refusedAt: now, refusal: said.fields ? Object.values(said.fields).join(' ') : said.message } : { heardAt: now }
  db.update(sensorAddress).set(note).where(ownAddress(row.studioId, row.roomId)).run()
  if ('ok' in said) return said
  if (isStill(db, row, said)) return { ok: true, kept: false }
  return change<{ ok: true, kept: boolean }>(db, row.studioId, 'air', (tx): { ok: true, kept: boolean } => {
    const values = { ...row, ...said, toldAt: now, source: 'sensor' as const, doubt: 0 }
    tx.insert(reading).values(values).onConflictDoUpdate({ target: [reading.roomId, reading.at, reading.source], set: values }).run()
    predictPieces(tx, row.studioId, null, now)
    return { ok: true, kept: true }
  })
}

type Said = Omit<SensorReading, 'at'> & { at: number }

function readSent(sent: unknown, now: number): Said | Refusal {
  if (typeof sent !== 'object' || sent === null || Array.isArray(sent)) return malformed({ form: fields.sensorBody }, fields.sensorBody)
  const said = readSensor({ ...sent })
  if ('problems' in said) return malformed(said.problems, Object.values(said.problems).join(' '))
  const at = said.at ?? now
  if (at > now + clockSlack) return malformed({ time: fields.future }, fields.future)
  if (at < now - reach) return malformed({ time: fields.sensorOld }, fields.sensorOld)
  return { ...said, at: Math.floor(Math.min(at, now) / minute) * minute }
}

function isStill(db: Database | Transaction, { studioId, roomId }: { studioId: number, roomId: number }, { at, tempC, rh }: Said): boolean {
  const last = db.select().from(reading).where(and(scoped(reading, studioId, eq(reading.roomId, roomId)), eq(reading.source, 'sensor'))).orderBy(desc(reading.at)).limit(1).get()
  if (!last || Math.abs(at - last.at) >= stillFor || (last.tempC === null) !== (tempC === null)) return false
  return Math.abs((last.tempC ?? 0) - (tempC ?? 0)) < stillTempC && Math.abs(last.rh - rh) < stillRh
}
