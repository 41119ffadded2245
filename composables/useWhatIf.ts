import type { WhatIf, WhatIfAnswer, WhatIfKind } from '#shared/schemas/what-if'
import { fromWire } from '#shared/schemas/wire'
import type { Wire } from '#shared/schemas/wire'
import type { WeekState } from '#shared/schemas/week'
import type { PlaceKind } from '#shared/terms'
import { fromLocal } from '#shared/time'
import type { Clock } from '#shared/time'
import type { Units } from '#shared/units'
import { toCelsius } from '#shared/units'

interface Rooms { id: number, name: string }

/** The usual warmth of a bench room, in the studio's own degrees; a planning value. */
export const usualWarmth = (units: Units) => units === 'us' ? 68 : 20

/** As it stands before anything is typed. */
const firstWish = (units: Units) => ({
  kind: 'places' as WhatIfKind, placeKind: null as PlaceKind | null, more: 1 as number | null, roomId: null as number | null, rh: 45 as number | null, temp: usualWarmth(units) as number | null,
  weekday: 6 as number | null, from: '09:00', to: '15:00', memberId: null as number | null, batchId: null as number | null, day: '', time: '12:00',
})
type Wish = ReturnType<typeof firstWish>

function minutesOf(text: string): number {
  const [hours = NaN, rest = NaN] = text.split(':').map(Number)
  return hours * 60 + rest
}

/** The change that was typed; what is missing or wrong in it is for the server to say. */
function changeOf(wish: Wish, week: WeekState, { zone }: Clock, units: Units): WhatIf {
  const hours = { weekday: wish.weekday ?? 0, fromMin: minutesOf(wish.from), toMin: minutesOf(wish.to) }
  switch (wish.kind) {
    case 'places': return { kind: 'places', placeKind: wish.placeKind ?? week.places[0]?.kind ?? 'shelf', more: wish.more ?? 0 }
    case 'humidity': return { kind: 'humidity', roomId: wish.roomId ?? 0, rh: (wish.rh ?? 0) / 100 }
    case 'heat': return { kind: 'heat', roomId: wish.roomId ?? 0, tempC: wish.temp === null ? NaN : toCelsius(wish.temp, units) }
    case 'open day': return { kind: 'open day', ...hours }
    case 'hours of': return { kind: 'hours of', memberId: wish.memberId ?? 0, ...hours }
    case 'due': return { kind: 'due', batchId: wish.batchId ?? 0, dueAt: /^\d{4}-\d{2}-\d{2}$/.test(wish.day) ? new Date(fromLocal(wish.day, minutesOf(wish.time) || 0, zone)).toISOString() : '' }
  }
}

/** What is being tried on a copy of the plan: the wish as it is typed, the difference it makes, and keeping it where that means something. */
export function useWhatIf(week: () => WeekState, clock: () => Clock, units: () => Units) {
  const { busy, message, fields, submit } = useSubmit()
  const hours = useTriedHours()
  const wish = reactive(firstWish(units()))
  const rooms = shallowRef<Rooms[]>([])
  const answer = shallowRef<WhatIfAnswer | null>(null)
  const asked = shallowRef<WhatIf | null>(null)
  /** The hours that stand now on the day being tried; null where they are not known or none is tried. */
  const standing = computed(() => wish.kind === 'open day' ? hours.standingOn(null, wish.weekday) : wish.kind === 'hours of' && wish.memberId !== null ? hours.standingOn(wish.memberId, wish.weekday) : null)

  async function open() {
    const { weekday } = wish
    await hours.read()
    // Not over a day that somebody chose meanwhile.
    if (wish.weekday === weekday) wish.weekday = hours.closedDay()
    if (rooms.value.length === 0) rooms.value = await callApi<Rooms[]>('/api/rooms').catch(() => [])
  }
  async function ask() {
    const sent = changeOf(wish, week(), clock(), units())
    answer.value = null
    const found = await submit(() => callApi<Wire<WhatIfAnswer>>('/api/plan/what-if', { method: 'POST', body: sent }))
    if (!found) return
    asked.value = sent
    answer.value = fromWire<WhatIfAnswer>(found)
  }

  /** Keeps the hours that were tried; true when they are kept. */
  async function keep(): Promise<boolean> {
    const tried = asked.value
    if (tried?.kind !== 'open day' && tried?.kind !== 'hours of') return false
    const { weekday, fromMin, toMin } = tried
    const done = await hours.keep({ memberId: tried.kind === 'hours of' ? tried.memberId : null, weekday, fromMin, toMin })
    if (done) answer.value = null
    return done
  }
  watch(wish, () => { answer.value = null })
  const { before, keeping, refused, putBack } = hours
  return { wish, rooms, standing, before, answer, asked, busy, message, fields, keeping, refused, open, ask, keep, putBack }
}
