import { describe, expect, it } from 'vitest'
import { areaOf, bandOf, heightAt, lineOf, pointTime, scaleOf, timeTicks } from '#shared/air-chart'
import type { CoursePoint } from '#shared/schemas/air'
import { studioZone } from '#shared/time'

const at = (text: string) => Date.parse(text)
const point = (time: number, tempC: number, reckoned = false): CoursePoint => ({ at: time, tempC, rh: 0.5, dewPointC: 9, boardMoisture: 9, speeds: [1, 1, 1, 1, 1, 1], reckoned, doubt: reckoned ? { tempC: [tempC - 2, tempC + 2], rh: [0.4, 0.6], pace: 1.2 } : null })

describe('a scale', () => {
  it('takes whole steps around its values', () => {
    expect(scaleOf([16.2, 21.7], 4)).toEqual({ low: 16, high: 22, ticks: [16, 18, 20, 22] })
    expect(scaleOf([42, 68], 20)).toEqual({ low: 40, high: 70, ticks: [40, 50, 60, 70] })
  })
  it('does not make a storm of a still room', () => {
    // 19 and 19.2 alone would be stretched over the whole height; the least of 4 gives 17.1 to 21.1.
    expect(scaleOf([19, 19.2], 4)).toEqual({ low: 16, high: 22, ticks: [16, 18, 20, 22] })
    expect(scaleOf([], 4)).toEqual({ low: 0, high: 4, ticks: [0, 1, 2, 3, 4] })
  })
  it('keeps what is beyond it at its edge', () => expect([heightAt({ low: 0, high: 2 }, 3), heightAt({ low: 0, high: 2 }, 1), heightAt({ low: 0, high: 2 }, -1)]).toEqual([0, 50, 100]))
})

describe('a line', () => {
  const scale = { low: 10, high: 20 }
  const span = { from: 0, to: 100 }
  it('is told up to the last reading and reckoned from there', () => {
    expect(lineOf([point(0, 10), point(50, 15), point(100, 20, true)], each => each.tempC, scale, span)).toEqual({ told: 'M0,100L500,50', reckoned: 'M500,50L1000,0' })
  })
  it('may be wholly one or the other, or none', () => {
    expect(lineOf([point(0, 10, true), point(100, 20, true)], each => each.tempC, scale, span)).toEqual({ told: '', reckoned: 'M0,100L1000,0' })
    expect(lineOf([point(0, 10)], each => each.tempC, scale, span)).toEqual({ told: '', reckoned: '' })
  })
  it('has its doubt around it from the last reading on', () => {
    // 15 C read at 50; 20 C reckoned at 100, give or take 2: heights 50, then 100 - 120 kept at 0, and 20.
    expect(bandOf([point(0, 10), point(50, 15), point(100, 20, true)], each => each.doubt?.tempC ?? [each.tempC, each.tempC], scale, span)).toBe('M500,50L1000,0L1000,20L500,50Z')
    expect(bandOf([point(0, 10), point(50, 15)], each => [each.tempC, each.tempC], scale, span)).toBe('')
  })
  it('has its ground under it', () => expect(areaOf([point(0, 15), point(100, 20)], each => each.tempC, scale, span)).toBe('M0,100L0,50L1000,0L1000,100Z'))
})

describe('time along a chart', () => {
  const zone = studioZone('Europe/London')
  it('stands at six hours of the studio’s day', () => {
    // London keeps UTC+1 in June.
    const span = { from: at('2026-06-10T10:00Z'), to: at('2026-06-11T10:00Z') }
    expect(timeTicks('day', span, zone).map(tick => tick.says)).toEqual(['12:00', '18:00', 'Thu', '6:00'])
    expect(timeTicks('day', span, zone)[0]?.x).toBeCloseTo(1 / 24)
  })
  it('stands at midnights of a week', () => expect(timeTicks('week', { from: at('2026-06-03T10:00Z'), to: at('2026-06-10T10:00Z') }, zone).map(tick => tick.says)).toEqual(['Thu', 'Fri', 'Sat', 'Sun', 'Mon', 'Tue', 'Wed']))
  it('stands at dates of a month', () => expect(timeTicks('month', { from: at('2026-05-11T10:00Z'), to: at('2026-06-10T10:00Z') }, zone).map(tick => tick.says)).toEqual(['15 May', '22 May', '29 May', '5 Jun']))
  it('is said with the day where it is not today', () => {
    const clock = { now: at('2026-06-10T10:00Z'), zone }
    expect(['2026-06-10T08:30Z', '2026-06-09T08:30Z', '2026-05-20T08:30Z'].map(time => pointTime(at(time), clock))).toEqual(['9:30', 'Tue 9:30', 'Wed 20 May 9:30'])
  })
})
