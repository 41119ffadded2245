import type { ScheduleLinkWire, ScheduleStepWire } from '#shared/schemas/schedule'

/** Coats of a later day of a round wait at least a night (planning value), minutes. */
const aNight = 12 * 60

/** A window in which hands were never at work. Minutes on the walk's own axis. */
export interface MissedWindow { step: string, after: string, opens: number, shuts: number }

/** The ends of a step: of its work, of all that hands still have to do about it, and of its film's drying to the touch of hands. */
export interface WalkEnd { work: number, free: number, last: number }

export interface Walk {
  /** When each step's work begins; a step that no end of waiting leads to is missing. */
  starts: Map<string, number>
  /** When each of them ends; missing where a wait has no end. */
  ends: Map<string, WalkEnd>
  /** The end of the last work and of the last film's drying to the touch of hands; null when some wait has no end. */
  end: number | null
  /** Windows that meet no open hours, the earliest first. */
  missed: MissedWindow[]
}

interface Asked { by: 'likelyMin' | 'giveTillMin', pieces: number, start: number, opens: (minute: number) => number }

/**
 * Walks a schedule through once with nothing in the way but its own waits and, if asked, the hours: no clamps taken, no
 * other work. Enough to say how long it takes at best and whether a window falls where nobody works.
 * @param schedule steps and links, whole minutes
 * @param asked the middle or the cautious waits, how many pieces, where the axis starts, and `opens`: the first minute
 * at or after a minute at which hands may begin (the same minute where work goes round the clock)
 */
export function walkSchedule(schedule: { steps: readonly ScheduleStepWire[], links: readonly ScheduleLinkWire[] }, asked: Asked): Walk {
  const walk: Walk = { starts: new Map(), ends: new Map(), end: null, missed: [] }
  const ended = new Map<string, WalkEnd | null>()
  for (const step of inGraphOrder(schedule.steps, schedule.links)) {
    const start = startOf(step, schedule.links.filter(link => link.to === step.key), ended, asked, walk)
    if (start !== null) walk.starts.set(step.key, start)
    const end = start === null ? null : endOf(step, start, asked)
    ended.set(step.key, end)
    if (end) walk.ends.set(step.key, end)
  }
  const ends = [...ended.values()]
  if (ends.length > 0 && ends.every(each => each !== null)) walk.end = Math.max(...ends.map(each => each.last))
  walk.missed.sort((a, b) => a.opens - b.opens)
  return walk
}

/** Steps so that each stands after all it waits for, otherwise as given; those in a circle come last. */
export function inGraphOrder<Step extends { key: string }>(steps: readonly Step[], links: readonly { from: string, to: string }[]): Step[] {
  const known = new Set(steps.map(step => step.key))
  const placed = new Set<string>()
  const ordered: Step[] = []
  for (let grew = true; grew;) {
    const next = steps.find(step => !placed.has(step.key) && links.every(link => link.to !== step.key || placed.has(link.from) || !known.has(link.from)))
    grew = next !== undefined
    if (!next) break
    placed.add(next.key)
    ordered.push(next)
  }
  return [...ordered, ...steps.filter(step => !placed.has(step.key))]
}

function startOf(step: ScheduleStepWire, links: readonly ScheduleLinkWire[], ended: ReadonlyMap<string, WalkEnd | null>, asked: Asked, walk: Walk): number | null {
  let earliest = asked.start
  for (const link of links) {
    const before = ended.get(link.from)
    const wait = link.wait === null ? 0 : link.wait[asked.by]
    if (!before || wait === null) return null
    earliest = Math.max(earliest, before.free, link.windowed && link.windows.length > 0 ? before.work : before.work + wait)
  }
  const windowed = links.filter(link => link.windowed && link.windows.length > 0)
  return windowed.reduce((at, link) => insideWindow(at, step, link, ended.get(link.from)?.work ?? at, asked, walk), asked.opens(earliest))
}

/** The first open minute inside one of the windows; past them all the wait alone counts, and the miss is noted. */
function insideWindow(earliest: number, step: ScheduleStepWire, link: ScheduleLinkWire, end: number, asked: Asked, walk: Walk): number {
  const wait = link.wait?.[asked.by] ?? 0
  for (const { opensMin, shutsMin } of link.windows) {
    const at = asked.opens(Math.max(earliest, end + (opensMin <= 0 ? opensMin : Math.max(opensMin, wait))))
    if (shutsMin === null || at <= end + shutsMin) return at
  }
  const [first] = link.windows
  if (first?.shutsMin != null) walk.missed.push({ step: step.name, after: link.from, opens: end + Math.max(0, first.opensMin), shuts: end + first.shutsMin })
  const shut = link.windows.reduce((last, each) => Math.max(last, each.shutsMin ?? 0), 0)
  return asked.opens(Math.max(earliest, end + wait, end + shut))
}

function endOf(step: ScheduleStepWire, start: number, { by, pieces, opens }: Asked): WalkEnd | null {
  const minutes = step.setupMin + step.pieceMin * pieces + step.cleanMin
  let work = start + minutes
  for (let turn = 1; turn < step.perDay * step.days; turn++) {
    const wait = step.again === null ? 0 : step.again[by]
    if (wait === null) return null
    work = opens(work + Math.max(wait, turn % step.perDay === 0 ? aNight : 0)) + minutes
  }
  const held = step.held === null ? 0 : step.held[by]
  const dry = step.dry === null ? 0 : step.dry[by]
  if (held === null || dry === null) return null
  const checks = step.checks.map(check => work + check.afterMin + check.minutes)
  const free = Math.max(work, ...checks, step.held === null ? 0 : opens(work + held) + step.releaseMin * pieces)
  return { work, free, last: Math.max(free, work + dry) }
}
