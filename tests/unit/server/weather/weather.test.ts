import { readFileSync } from 'node:fs'
import { createServer } from 'node:http'
import type { Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { and, asc, eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { coat, reading, room } from '~~/db/schema'
import { airNow } from '~~/server/services/air'
import { airCourses } from '~~/server/services/air-course'
import { predictFilms } from '~~/server/work/predict'
import { addressSource } from '~~/server/weather/source'
import { takeWeather } from '~~/server/weather/take'
import { hour, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const file = readFileSync(new URL('../../../fixtures/weather.json', import.meta.url), 'utf8')
let server: Server
let answer = { status: 200, text: file }
const address = () => `http://127.0.0.1:${(server.address() as AddressInfo).port}/weather`

beforeAll(async () => {
  server = createServer((_, response) => response.writeHead(answer.status, { 'content-type': 'application/json' }).end(answer.text))
  await new Promise<void>(resolve => void server.listen(0, '127.0.0.1', resolve))
})
afterAll(() => new Promise(resolve => server.close(resolve)))

function withYard() {
  const studio = testStudio(now)
  const yard = studio.db.insert(room).values({ studioId: studio.studioId, name: 'Yard', heated: false, outdoor: true, nightDropC: 4 }).returning().get().id
  const rows = () => studio.db.select().from(reading).where(and(eq(reading.studioId, studio.studioId), eq(reading.source, 'weather'))).orderBy(asc(reading.at)).all()
  return { ...studio, yard, rows }
}

describe('a weather source', () => {
  it('reads hours from its address', async () => {
    answer = { status: 200, text: file }
    const hours = await addressSource(address()).hours()
    expect(hours).toHaveLength(7)
    expect(hours[2]).toEqual({ at: now - hour, tempC: 13, rh: 0.6 })
  })

  it('says in one sentence what was wrong', async () => {
    answer = { status: 503, text: '' }
    await expect(addressSource(address()).hours()).rejects.toThrow('The weather\'s address answered with 503.')
    for (const text of ['{"hours":[{"at":"today","tempC":1,"rh":0.5}]}', '{"hours":[{"at":"2026-04-07T10:00:00Z","tempC":1,"rh":61}]}', '[]']) {
      answer = { status: 200, text }
      await expect(addressSource(address()).hours()).rejects.toThrow(/something else than hours/)
    }
  })
})

describe('weather in the yard', () => {
  const hours = (JSON.parse(file) as { hours: { at: string, tempC: number, rh: number }[] }).hours.map(each => ({ ...each, at: Date.parse(each.at) }))

  it('is taken from two days back to two days ahead, for outdoor rooms only, and twice is once', () => {
    const { db, yard, rows } = withYard()
    expect(takeWeather(db, hours, now)).toBe(1)
    takeWeather(db, hours, now)
    expect(rows().map(row => [row.roomId, row.tempC])).toEqual([[yard, 12], [yard, 13], [yard, 15], [yard, 8], [yard, 2]])
  })

  it('replaces the forecast before by the newer one', () => {
    const { db, rows } = withYard()
    takeWeather(db, hours, now)
    takeWeather(db, [{ at: now + 8 * hour, tempC: 10, rh: 0.7 }], now)
    expect(rows().map(row => row.tempC)).toEqual([12, 13, 10])
  })

  it('is not a note anybody made, and what is ahead is drawn as reckoned', () => {
    const { db, studioId, yard } = withYard()
    takeWeather(db, hours, now)
    const seen = airNow(db, studioId, now).find(each => each.roomId === yard)
    expect(seen?.readAt).toBe(now - hour)
    expect(seen?.last?.at).toBe(now - hour)
    expect(seen?.notes).toEqual([])
    const course = airCourses(db, studioId, 'day', now).find(each => each.roomId === yard)
    expect(course?.points.filter(point => point.at > now).every(point => point.reckoned)).toBe(true)
    // The night of the forecast: 2 C at three.
    expect(course?.points.find(point => point.at === now + 17 * hour)?.tempC).toBeCloseTo(2, 6)
  })

  it('moves what stands out there, and nothing where there is no outdoor room', () => {
    const { db, studioId } = testStudio(now)
    expect(takeWeather(db, hours, now)).toBe(0)
    expect(predictFilms(db, studioId, null, now)).toEqual([])
    expect(db.select().from(coat).all()).toEqual([])
  })
})
