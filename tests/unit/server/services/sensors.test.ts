import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { reading, sensorAddress } from '~~/db/schema'
import { endSensorAddress, hearSensor, makeSensorAddress, readSensorAddress } from '~~/server/services/sensors'
import { minute, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-06-10T12:00:00Z')

function withSensor() {
  const of = testStudio(now)
  const made = makeSensorAddress(of.db, of.studioId, of.rooms.bench, now)
  if (!made.ok) throw new Error(made.message)
  const send = (sent: unknown, at = now) => hearSensor(of.db, made.token, sent, at)
  const kept = () => of.db.select({ at: reading.at, tempC: reading.tempC, rh: reading.rh, source: reading.source }).from(reading).where(eq(reading.studioId, of.studioId)).all()
  return { ...of, token: made.token, send, kept }
}

describe('a sensor’s address', () => {
  it('takes a reading, dated to the minute', () => {
    const { send, kept } = withSensor()
    expect(send({ temperature: 12, humidity: 80 }, now + 20_000)).toEqual({ ok: true, kept: true })
    expect(kept()).toEqual([{ at: now, tempC: 12, rh: 0.8, source: 'sensor' }])
  })
  it('keeps what is new: after five minutes, or when the air has moved', () => {
    const { send, kept } = withSensor()
    send({ temperature: 12, humidity: 80 })
    expect(send({ temperature: 12.2, humidity: 80 }, now + 2 * minute)).toEqual({ ok: true, kept: false })
    expect(send({ temperature: 12.4, humidity: 80 }, now + 2 * minute)).toEqual({ ok: true, kept: true })
    expect(send({ temperature: 12.4, humidity: 80 }, now + 7 * minute)).toEqual({ ok: true, kept: true })
    expect(kept()).toHaveLength(3)
  })
  it('says what it could not read, and keeps saying it beside the address until something can be read', () => {
    const { db, studioId, rooms, send, kept } = withSensor()
    expect(send({ humidity: 0.5 })).toMatchObject({ ok: false, reason: 'malformed', fields: { humidity: 'Send the humidity in per cent, 1 to 100, as "humidity".' } })
    expect(send('50')).toMatchObject({ ok: false, reason: 'malformed' })
    expect(send({ humidity: 50, time: new Date(now + 10 * minute).toISOString() })).toMatchObject({ ok: false, fields: { time: 'The time lies ahead of now. Give the time of the reading.' } })
    expect(kept()).toEqual([])
    expect(readSensorAddress(db, studioId, rooms.bench)).toMatchObject({ sensor: { heardAt: null, refusal: 'The time lies ahead of now. Give the time of the reading.' } })
  })
  it('opens nothing once it was made anew or ended, and its hash alone is kept', () => {
    const { db, studioId, rooms, token, send } = withSensor()
    expect(JSON.stringify(db.select().from(sensorAddress).all())).not.toContain(token)
    const next = makeSensorAddress(db, studioId, rooms.bench, now)
    expect(send({ humidity: 50 })).toMatchObject({ reason: 'absent' })
    expect(endSensorAddress(db, studioId, rooms.bench)).toEqual({ ok: true })
    expect(next.ok && hearSensor(db, next.token, { humidity: 50 }, now)).toMatchObject({ reason: 'absent' })
  })
})
