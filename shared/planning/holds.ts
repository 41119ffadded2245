/** A place of its kind; `capacity` in size units. */
export interface HoldPlace { id: number, kind: string, capacity: number }

/**
 * A piece that wants one place of a kind from `fromAt` to `toAt` (any unit; Infinity: for good). `liesAt`: it lies there already and stays;
 * `likes`: where it would best go, if there is room.
 */
export interface HoldWish { key: string, kind: string, units: number, fromAt: number, toAt: number, liesAt: number | null, likes: number | null }

interface Held { units: number, fromAt: number, toAt: number }

/**
 * Gives each wish a single place of its kind: what lies stays, the others in the order of their beginnings, each where it leaves the
 * least room over, the liked place first. A planned rest is never put where it would overbook: it gets null, and the kind has room only in pieces.
 * Deterministic: the order of what is given does not matter.
 */
export function assignHolds(places: readonly HoldPlace[], wishes: readonly HoldWish[]): Map<string, number | null> {
  const held = new Map<number, Held[]>(places.map(place => [place.id, []]))
  const found = new Map<string, number | null>()
  const sorted = [...wishes].sort((a, b) => a.fromAt - b.fromAt || b.units - a.units || b.toAt - a.toAt || (a.key < b.key ? -1 : a.key > b.key ? 1 : 0))
  for (const wish of sorted) {
    if (wish.liesAt === null) continue
    held.get(wish.liesAt)?.push(wish)
    found.set(wish.key, wish.liesAt)
  }
  for (const wish of sorted) {
    if (wish.liesAt !== null) continue
    const fits = places.filter(place => place.kind === wish.kind).map(place => ({ id: place.id, over: place.capacity - most(held.get(place.id) ?? [], wish) - wish.units })).filter(each => each.over >= 0)
    const best = fits.sort((a, b) => Number(b.id === wish.likes) - Number(a.id === wish.likes) || a.over - b.over || a.id - b.id)[0]
    found.set(wish.key, best?.id ?? null)
    if (best) held.get(best.id)?.push(wish)
  }
  return found
}

/** The most size units held at one moment of a span. */
function most(held: readonly Held[], { fromAt, toAt }: Pick<Held, 'fromAt' | 'toAt'>): number {
  const here = held.filter(each => each.fromAt < toAt && each.toAt > fromAt)
  const moments = [fromAt, ...here.map(each => each.fromAt).filter(at => at > fromAt)]
  return Math.max(0, ...moments.map(at => here.reduce((sum, each) => sum + (each.fromAt <= at && at < each.toAt ? each.units : 0), 0)))
}
