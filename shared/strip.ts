import { type Wall, type WallClock, wallClock } from '#shared/time'

/** All instants are ms UTC; a null end is open or unknown. */
export interface StripMilestone { label: string, likelyAt: number, giveTillAt: number | null }
export interface StripWindow { opensAt: number | null, shutsAt: number | null }
export interface StripPlanned { at: number, label: string }
/** A film: glossy from `onAt` to `likelyAt`, in doubt till `giveTillAt`, chalk after; null means nobody knows when. */
export interface StripCoat { onAt: number, likelyAt: number | null, giveTillAt: number | null }

export interface PieceStrip {
  fromAt: number
  toAt: number
  nowAt: number
  /** IANA zone of the studio. */
  zone: string
  coats: readonly StripCoat[]
  milestones: readonly StripMilestone[]
  windows: readonly StripWindow[]
  planned: readonly StripPlanned[]
}

export type SegmentKind = 'today' | 'day' | 'night'
/** A stretch of the axis: instants to shares of the width, straight within. `day` and `night` are folded. */
export interface AxisSegment { fromAt: number, toAt: number, start: number, end: number, kind: SegmentKind }

export interface StripAxis {
  segments: readonly AxisSegment[]
  /** Share 0..1 of the width; instants outside the axis fall on its ends. */
  place: (at: number) => number
}

export interface AxisTick { at: number, x: number, kind: 'hour' | 'day', wall: Wall }

const minute = 60_000
const dayStart = 6 * 60
const dayEnd = 21 * 60
/** Width of an hour against one of today: a folded day's and a folded night's, divided again by how many days it is away. */
const dayFold = 0.25
const nightFold = 0.1
const mostDays = 400

/**
 * Where an instant stands on a drying strip: today at full scale, nights and other days folded.
 * @throws RangeError when the ends are not finite, not in order, or more than 400 days apart, or the zone is unknown.
 */
export function stripAxis({ fromAt, toAt, nowAt, zone }: Pick<PieceStrip, 'fromAt' | 'toAt' | 'nowAt' | 'zone'>): StripAxis {
  if (![fromAt, toAt, nowAt].every(Number.isFinite) || toAt <= fromAt || toAt - fromAt > mostDays * 1440 * minute) {
    throw new RangeError('A strip needs two instants in order, at most 400 days apart.')
  }
  const clock = wallClock(zone)
  const weighed = stretches(fromAt, toAt, clock).map(stretch => ({ ...stretch, ...weigh(stretch, nowAt, clock) }))
  const whole = weighed.reduce((sum, { weight }) => sum + weight, 0)
  let end = 0
  const segments = weighed.map(({ fromAt, toAt, kind, weight }) => {
    const start = end
    end += weight / whole
    return { fromAt, toAt, kind, start, end }
  })
  return { segments, place: at => placeOn(segments, at) }
}

interface Stretch { fromAt: number, toAt: number, night: boolean }

/** Days and nights between two instants, cut at the ends. */
function stretches(fromAt: number, toAt: number, clock: WallClock): Stretch[] {
  const first = clock.wallAt(fromAt)
  const found: Stretch[] = []
  for (let offset = -1; offset <= mostDays + 1; offset++) {
    const at = (minuteOfDay: number, more = 0) => clock.instantAt({ ...first, day: first.day + offset + more, minute: minuteOfDay })
    if (at(dayStart) >= toAt) break
    found.push({ fromAt: at(dayStart), toAt: at(dayEnd), night: false }, { fromAt: at(dayEnd), toAt: at(dayStart, 1), night: true })
  }
  return found
    .map(stretch => ({ ...stretch, fromAt: Math.max(stretch.fromAt, fromAt), toAt: Math.min(stretch.toAt, toAt) }))
    .filter(stretch => stretch.toAt > stretch.fromAt)
}

function weigh({ fromAt, toAt, night }: Stretch, nowAt: number, clock: WallClock): { kind: SegmentKind, weight: number } {
  const length = toAt - fromAt
  const holdsNow = fromAt <= nowAt && nowAt < toAt
  const away = Math.abs(dayNumber(clock.wallAt(fromAt)) - dayNumber(clock.wallAt(nowAt)))
  if (holdsNow || (!night && away === 0)) return { kind: 'today', weight: length }
  return { kind: night ? 'night' : 'day', weight: length * (night ? nightFold : dayFold) / Math.max(1, away) }
}

const dayNumber = ({ year, month, day }: Wall) => Date.UTC(year, month - 1, day) / (1440 * minute)

function placeOn(segments: readonly AxisSegment[], at: number): number {
  if (at <= (segments[0]?.fromAt ?? at)) return 0
  const segment = segments.find(({ toAt }) => at < toAt)
  if (!segment) return 1
  return segment.start + (at - segment.fromAt) / (segment.toAt - segment.fromAt) * (segment.end - segment.start)
}

/**
 * Hours of today and beginnings of other days, no closer than `least` (share of the width; days, with longer words, half as much again).
 * The step of the hours grows (1, 2, 3, 6, 12 h) until they fit.
 */
export function axisTicks(axis: StripAxis, zone: string, least: number): AxisTick[] {
  const clock = wallClock(zone)
  const days = axis.segments.filter(({ kind }) => kind === 'day').map(({ fromAt }) => tick(axis, fromAt, 'day', clock))
  const open = axis.segments.filter(({ kind }) => kind === 'today')
  const hours = open.flatMap(segment => hoursWithin(segment, axis, clock, least))
  const kept: AxisTick[] = []
  for (const next of [...hours, ...days]) {
    const room = next.kind === 'day' ? least * 1.5 : least
    if (kept.every(({ x }) => Math.abs(x - next.x) >= room)) kept.push(next)
  }
  return kept.sort((a, b) => a.at - b.at)
}

function tick(axis: StripAxis, at: number, kind: AxisTick['kind'], clock: WallClock): AxisTick {
  return { at, x: axis.place(at), kind, wall: clock.wallAt(at) }
}

function hoursWithin(segment: AxisSegment, axis: StripAxis, clock: WallClock, least: number): AxisTick[] {
  const perHour = (segment.end - segment.start) / ((segment.toAt - segment.fromAt) / (60 * minute))
  const step = [1, 2, 3, 6, 12].find(hours => hours * perHour >= least) ?? 24
  const wall = clock.wallAt(segment.fromAt)
  const found: AxisTick[] = []
  for (let hour = Math.ceil(wall.minute / 60 / step) * step; hour <= 48; hour += step) {
    const at = clock.instantAt({ ...wall, minute: hour * 60 })
    if (at > segment.toAt) break
    found.push(tick(axis, at, 'hour', clock))
  }
  return found
}

/** A label that wants a place: its mark's x and its own width, both shares 0..1. */
export interface LabelWish { x: number, width: number }
export interface LabelPlace { row: number, side: 'right' | 'left' }

/**
 * Stagger labels over rows so that none covers another; null where no row is free (the mark stays, the word is left out).
 * Row 0 is next to the marks. The latest is placed first, so that the stem of an earlier one, further out, crosses no label.
 * A label stands to the right of its mark, to the left where it would leave the strip.
 */
export function staggerLabels(wishes: readonly LabelWish[], rows: number): (LabelPlace | null)[] {
  const taken: { start: number, end: number, x: number, row: number }[] = []
  const places: (LabelPlace | null)[] = wishes.map(() => null)
  const latestFirst = [...wishes.entries()].sort(([, a], [, b]) => b.x - a.x)
  for (const [index, { x, width }] of latestFirst) {
    const side = x + width > 1 && x - width >= 0 ? 'left' : 'right'
    const start = side === 'right' ? x : x - width
    const end = start + width
    // In its own row no label may be met, in a row further out no stem on its way down to the marks.
    const free = (row: number) => taken.every(other =>
      other.row < row || (other.row === row ? start >= other.end || end <= other.start : other.x <= start || other.x >= end))
    const row = Array.from({ length: rows }, (_, index) => index).find(free)
    if (row === undefined) continue
    taken.push({ start, end, x, row })
    places[index] = { row, side }
  }
  return places
}
