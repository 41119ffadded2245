import { describe, expect, it } from 'vitest'
import { airCourse, courseDoubt, courseTimes } from '#shared/air-course'
import { trackRoom } from '#shared/drying/tools'
import { at, hourMs, read, roomWith, tools } from '../helpers/drying'

const five = at('2026-03-10T17:00:00Z')
const shed = roomWith({ heated: false, nightDropC: 4, readings: [read('2026-03-10T17:00:00Z', 11, 0.7)] })
const course = (room = shed) => airCourse(trackRoom(tools, room, five), courseTimes('day', five, 0), tools)

describe('the air ahead', () => {
  it('has a point now and goes on into the morning', () => {
    const times = courseTimes('day', five + 60_000, 0)
    expect(times).toContain(five + 60_000)
    expect(times.at(-1)).toBe(five + 18 * hourMs)
    expect(times.every((time, i) => i === 0 || time > times[i - 1]!)).toBe(true)
  })

  it('falls by the night drop to six in the morning, with the dew point held', () => {
    const points = course()
    const coldest = points.reduce((low, point) => point.tempC < low.tempC ? point : low)
    expect(coldest.at).toBe(at('2026-03-11T06:00:00Z'))
    expect(coldest.tempC).toBeCloseTo(7, 6)
    expect(coldest.dewPointC).toBeCloseTo(points[0]!.dewPointC, 6)
    expect(coldest.reckoned).toBe(true)
  })

  it('follows the room\'s own hours once three days are known', () => {
    const days = [7, 8, 9].flatMap(day => [['06', 6], ['17', 14]].map(([hour, tempC]) => read(`2026-03-0${day}T${hour}:00:00Z`, Number(tempC), 0.6)))
    const points = course(roomWith({ heated: true, nightDropC: 0, readings: [...days, read('2026-03-10T17:00:00Z', 14, 0.6)] }))
    // The morning of each of those days lay 8 degrees under its evening: the next lies near that too, though the room is heated.
    expect(Math.min(...points.map(point => point.tempC))).toBeLessThan(8)
  })

  it('is doubted as far as the drying clock doubts it: nothing when read, wider by the hour', () => {
    const points = course()
    expect(points.filter(point => !point.reckoned).every(point => point.doubt === null)).toBe(true)
    const ahead = points.filter(point => point.doubt !== null)
    expect(ahead.every(({ tempC, rh, doubt }) => doubt!.tempC[0] <= tempC && tempC <= doubt!.tempC[1] && doubt!.rh[0] <= rh && rh <= doubt!.rh[1])).toBe(true)
    const width = (hours: number) => courseDoubt({ tempC: 15, dewPointC: 8 }, hours).tempC[1] - 15
    // 6 h: 1.2816 x 0.1 in log speed, over 0.0770 a kelvin: 1.66 K. 24 h: 2.5 times that.
    expect(width(0)).toBe(0)
    expect(width(6)).toBeCloseTo(1.66, 2)
    expect(width(24) / width(6)).toBeCloseTo(2.5, 6)
    expect(courseDoubt({ tempC: 15, dewPointC: 8 }, 6).pace).toBeCloseTo(Math.exp(1.2816 * 0.1), 4)
  })
})
