import type { CoursePoint, CourseSpan } from '#shared/schemas/air'
import { localDate, startOfLocalDay } from '#shared/time'
import type { Clock, StudioZone } from '#shared/time'

const hourMs = 3_600_000
const dayMs = 24 * hourMs

/** A chart's height of values, with the lines drawn across it. */
export interface Scale { low: number, high: number, ticks: number[] }

const steps = [0.5, 1, 2, 5, 10, 20, 25, 50]

/** A scale of whole steps around some values, with two to five lines. `least` is the least it spans, so that a still room does not look stormy. */
export function scaleOf(values: readonly number[], least: number): Scale {
  const [bottom, top] = values.length === 0 ? [0, least] : [Math.min(...values), Math.max(...values)]
  const spare = Math.max(0, least - (top - bottom)) / 2
  const [from, to] = [bottom - spare, top + spare]
  const step = steps.find(each => Math.ceil(to / each) - Math.floor(from / each) <= 4) ?? 100
  const [low, high] = [Math.floor(from / step) * step, Math.ceil(to / step) * step]
  return { low, high, ticks: Array.from({ length: Math.round((high - low) / step) + 1 }, (_, i) => low + i * step) }
}

/** Where a value stands in a box a hundred high, from the top, kept inside it. */
export const heightAt = ({ low, high }: Pick<Scale, 'low' | 'high'>, value: number) => 100 - 100 * Math.min(1, Math.max(0, (value - low) / (high - low)))

const short = (value: number) => String(Math.round(value * 10) / 10)

/** A line through points in a box 1000 wide and 100 high: `told` as far as readings reach, `reckoned` from there on. */
export interface Line { told: string, reckoned: string }

/** The line of one value over a stretch of time, ms UTC. The reckoned part begins where the told part ends. */
export function lineOf(points: readonly CoursePoint[], value: (point: CoursePoint) => number, scale: Pick<Scale, 'low' | 'high'>, span: { from: number, to: number }): Line {
  const place = (point: CoursePoint) => `${short(1000 * (point.at - span.from) / (span.to - span.from))},${short(heightAt(scale, value(point)))}`
  const turn = points.findIndex(point => point.reckoned)
  const told = turn < 0 ? points : points.slice(0, turn)
  const reckoned = turn < 0 ? [] : points.slice(Math.max(0, turn - 1))
  const path = (part: readonly CoursePoint[]) => part.length < 2 ? '' : `M${part.map(place).join('L')}`
  return { told: path(told), reckoned: path(reckoned) }
}

/** The band of doubt around the reckoned part of a line, from the last point that was read on. */
export function bandOf(points: readonly CoursePoint[], edges: (point: CoursePoint) => readonly [number, number], scale: Pick<Scale, 'low' | 'high'>, span: { from: number, to: number }): string {
  const turn = points.findIndex(point => point.reckoned)
  const part = turn < 0 ? [] : points.slice(Math.max(0, turn - 1))
  if (part.length < 2) return ''
  const at = (point: CoursePoint, edge: 0 | 1) => `${short(1000 * (point.at - span.from) / (span.to - span.from))},${short(heightAt(scale, edges(point)[edge]))}`
  return `M${part.map(point => at(point, 1)).join('L')}L${[...part].reverse().map(point => at(point, 0)).join('L')}Z`
}

/** The ground under a line, down to the box's floor. */
export function areaOf(points: readonly CoursePoint[], value: (point: CoursePoint) => number, scale: Pick<Scale, 'low' | 'high'>, span: { from: number, to: number }): string {
  const x = (at: number) => short(1000 * (at - span.from) / (span.to - span.from))
  const [first, last] = [points[0], points.at(-1)]
  if (!first || !last || points.length < 2) return ''
  return `M${x(first.at)},100L${points.map(point => `${x(point.at)},${short(heightAt(scale, value(point)))}`).join('L')}L${x(last.at)},100Z`
}

const everyHours: Record<Exclude<CourseSpan, 'month'>, number> = { day: 6, week: 24 }
const monthNames = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']
const weekdays = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun']

function tickText(at: number, span: CourseSpan, zone: StudioZone): string {
  const { date, minutes, weekday } = zone.wall(at)
  if (span === 'month') return `${Number(date.slice(8))} ${monthNames[Number(date.slice(5, 7)) - 1]}`
  return span === 'day' && minutes > 0 ? `${Math.floor(minutes / 60)}:${String(minutes % 60).padStart(2, '0')}` : weekdays[weekday - 1] ?? ''
}

/** Lines of time across a chart: every six hours of a day, each midnight of a week, each seventh of a month, with `x` 0..1. */
export function timeTicks(span: CourseSpan, { from, to }: { from: number, to: number }, zone: StudioZone): { at: number, x: number, says: string }[] {
  const found: number[] = []
  for (let day = startOfLocalDay(from, zone); day < to; day = startOfLocalDay(day + 1.5 * dayMs, zone)) {
    if (span === 'month') found.push(day)
    else for (let hours = 0; hours < 24; hours += everyHours[span]) found.push(day + hours * hourMs)
  }
  const inside = found.filter(at => at > from && at < to)
  const shown = span === 'month' ? inside.filter((_, index) => index % 7 === 3) : inside
  return shown.map(at => ({ at, x: (at - from) / (to - from), says: tickText(at, span, zone) }))
}

/** "14:00", "Tue 14:00", "Tue 14 Nov 14:00": a point of a course, day and minute. */
export function pointTime(at: number, { now, zone }: Clock): string {
  const { date, minutes, weekday } = zone.wall(at)
  const time = `${Math.floor(minutes / 60)}:${String(minutes % 60).padStart(2, '0')}`
  if (date === localDate(now, zone)) return time
  const near = now - at < 6 * dayMs
  return [weekdays[weekday - 1], ...near ? [] : [`${Number(date.slice(8))} ${monthNames[Number(date.slice(5, 7)) - 1]}`], time].join(' ')
}
