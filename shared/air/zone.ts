const dayMs = 86_400_000

/** The offsets of a studio's zone over a stretch of time: from `starts[i]` on, local time is UTC + `offsets[i]` (ms). */
export interface ZoneClock { zone: string, from: number, to: number, starts: number[], offsets: number[] }

function offsetReader(zone: string): (at: number) => number {
  const format = new Intl.DateTimeFormat('en-US', {
    timeZone: zone, hourCycle: 'h23', year: 'numeric', month: 'numeric', day: 'numeric', hour: 'numeric', minute: 'numeric', second: 'numeric',
  })
  return (at) => {
    const part: Record<string, number> = {}
    for (const { type, value } of format.formatToParts(at)) part[type] = Number(value)
    const local = Date.UTC(part.year!, part.month! - 1, part.day!, part.hour!, part.minute!, part.second!)
    return local - Math.floor(at / 1000) * 1000
  }
}

/**
 * Reads the zone's clock changes between two instants (ms UTC) once, so that no loop asks Intl.
 * Probes every ten days and halves down to the second: a zone that changed twice within ten days would be read as unchanged.
 * Throws RangeError for an unknown zone.
 */
export function zoneClock(zone: string, from: number, to: number): ZoneClock {
  const offsetAt = offsetReader(zone)
  const starts = [from]
  const offsets = [offsetAt(from)]
  for (let at = from; at < to; at += 10 * dayMs) {
    const next = Math.min(to, at + 10 * dayMs)
    const after = offsetAt(next)
    if (after === offsets.at(-1)) continue
    let low = at
    let high = next
    while (high - low > 1000) {
      const middle = Math.floor((low + high) / 2)
      if (offsetAt(middle) === after) high = middle
      else low = middle
    }
    starts.push(Math.floor(high / 1000) * 1000)
    offsets.push(after)
  }
  return { zone, from, to, starts, offsets }
}

/** The zone's offset in ms at an instant; beyond the stretch, the nearest known one. */
export function offsetAt(clock: ZoneClock, at: number): number {
  let i = clock.starts.length - 1
  while (i > 0 && clock.starts[i]! > at) i--
  return clock.offsets[i]!
}

/** ms since local midnight, 0 up to one day. */
export function localTimeOfDay(clock: ZoneClock, at: number): number {
  const local = at + offsetAt(clock, at)
  return local - Math.floor(local / dayMs) * dayMs
}

/** Number of the local day, for counting distinct days. */
export function localDay(clock: ZoneClock, at: number): number {
  return Math.floor((at + offsetAt(clock, at)) / dayMs)
}
