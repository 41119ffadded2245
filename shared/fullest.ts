import type { Load, WeekState } from '#shared/schemas/week'

/**
 * The resource that is fullest and on which days (indices into the week). `share` is load over capacity at its worst; of
 * people the load is in minutes. `isOne`: a single person.
 */
export interface Fullest { name: string, isPeople: boolean, isOne: boolean, share: number, used: number, of: number, days: number[] }

const share = ({ used, of }: Load) => of > 0 ? used / of : 0
/** Hours are never filled to the minute: with less than a twentieth left nothing more goes in (planning value). */
const full = 0.95

/**
 * The fullest resource of the week, or null when nothing is taken at all. Derived from load and capacity alone: it does not
 * say what would change it.
 * @param people what all the people together are called; a person by name comes before them only when fuller
 * @param nameOf what a kind of place is called
 */
export function fullest(week: Pick<WeekState, 'people' | 'places'>, people: string, nameOf: (kind: WeekState['places'][number]['kind']) => string): Fullest | null {
  const rows = [
    ...week.places.map(place => ({ name: nameOf(place.kind), isPeople: false, isOne: false, days: place.days })),
    ...[...week.people].sort((a, b) => Number(a.memberId !== null) - Number(b.memberId !== null))
      .map(each => ({ name: each.memberId === null ? people : each.name, isPeople: true, isOne: each.memberId !== null, days: each.days })),
  ]
  const worst = rows.map(row => ({ ...row, top: Math.max(0, ...row.days.map(share)) })).sort((a, b) => b.top - a.top)[0]
  if (!worst || worst.top <= 0) return null
  const days = worst.days.flatMap((day, index) => share(day) >= Math.min(full, worst.top) ? [index] : [])
  const { used, of } = worst.days.reduce((most, day) => share(day) > share(most) ? day : most)
  return { name: worst.name, isPeople: worst.isPeople, isOne: worst.isOne, share: worst.top, used, of, days }
}

export const isFull = (found: Fullest) => found.share >= full
