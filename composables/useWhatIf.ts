import type { HoursWire, Stretch } from '#shared/schemas/hours'
import type { WhatIf, WhatIfAnswer, WhatIfKind } from '#shared/schemas/what-if'
import { fromWire } from '#shared/schemas/wire'
import type { Wire } from '#shared/schemas/wire'
import type { WeekState } from '#shared/schemas/week'
import type { PlaceKind } from '#shared/terms'
import { fromLocal } from '#shared/time'
import type { Clock } from '#shared/time'
import type { Units } from '#shared/units'
import { toCelsius } from '#shared/units'

const weekendFirst = [6, 7, 1, 2, 3, 4, 5] as const

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
  const { busy: keeping, message: refused, submit: send } = useSubmit()
  const wish = reactive(firstWish(units()))
  const rooms = shallowRef<Rooms[]>([])
  const answer = shallowRef<WhatIfAnswer | null>(null)
  const asked = shallowRef<WhatIf | null>(null)

  const hours = shallowRef<HoursWire | null>(null)
  /** What stood before hours were kept, to be put back. */
  const before = shallowRef<{ memberId: number | null, hours: Stretch[] } | null>(null)
  const keptOf = (memberId: number | null) => memberId === null ? hours.value?.studio : hours.value?.members.find(each => each.memberId === memberId)?.hours ?? hours.value?.studio
  /** The hours that stand now on the day being tried; null where they are not known or none is tried. */
  const standing = computed(() => {
    const own = wish.kind === 'open day' ? keptOf(null) : wish.kind === 'hours of' && wish.memberId !== null ? keptOf(wish.memberId) : undefined
    return own?.filter(each => each.weekday === wish.weekday) ?? null
  })
  const readHours = async () => {
    hours.value = await callApi<HoursWire>('/api/hours').catch(() => hours.value)
  }

  async function open() {
    await readHours()
    // The first day without hours, weekends before others: an open day tried by mistake would be made shorter.
    if (wish.weekday === firstWish('metric').weekday) wish.weekday = weekendFirst.find(day => hours.value && !hours.value.studio.some(each => each.weekday === day)) ?? wish.weekday
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
    const memberId = tried.kind === 'hours of' ? tried.memberId : null
    const done = await send(async () => {
      const known = await callApi<HoursWire>('/api/hours')
      const had = memberId === null ? known.studio : known.members.find(each => each.memberId === memberId)?.hours ?? null
      const kept = [...(had ?? known.studio).filter(each => each.weekday !== tried.weekday), { weekday: tried.weekday, fromMin: tried.fromMin, toMin: tried.toMin }]
      await callApi('/api/hours', { method: 'PUT', body: { memberId, hours: kept } })
      before.value = { memberId, hours: had ?? [] }
      return true
    })
    if (done !== null) answer.value = null
    await readHours()
    return done !== null
  }

  /** Puts back what stood before the hours were kept; true when it stands again. */
  async function putBack(): Promise<boolean> {
    const done = await send(() => callApi('/api/hours', { method: 'PUT', body: before.value }))
    if (done !== null) before.value = null
    await readHours()
    return done !== null
  }
  watch(wish, () => { answer.value = null })
  return { wish, rooms, standing, before, answer, asked, busy, message, fields, keeping, refused, open, ask, keep, putBack }
}
