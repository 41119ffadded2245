import type { HoursWire, Stretch } from '#shared/schemas/hours'

const saturday = 6
const weekendFirst = [saturday, 7, 1, 2, 3, 4, 5] as const

/** Hours of a weekday, of the studio or of one person (`memberId`); minutes since midnight. */
export interface TriedHours { memberId: number | null, weekday: number, fromMin: number, toMin: number }

/** Hours that are tried in a plan: what stands on that day now, keeping them, and putting back what stood before. */
export function useTriedHours() {
  const { busy: keeping, message: refused, submit } = useSubmit()
  const hours = shallowRef<HoursWire | null>(null)
  /** What stood before hours were kept. */
  const before = shallowRef<{ memberId: number | null, hours: Stretch[] } | null>(null)

  const read = async () => {
    hours.value = await callApi<HoursWire>('/api/hours').catch(() => hours.value)
  }
  /** What stands on a weekday now; null while it is not known. */
  function standingOn(memberId: number | null, weekday: number | null): Stretch[] | null {
    const own = memberId === null ? hours.value?.studio : hours.value?.members.find(each => each.memberId === memberId)?.hours ?? hours.value?.studio
    return own?.filter(each => each.weekday === weekday) ?? null
  }
  /** The first day without hours, weekends before others: an open day tried by mistake would be made shorter. */
  const closedDay = () => weekendFirst.find(day => hours.value && !hours.value.studio.some(each => each.weekday === day)) ?? saturday

  /** Keeps hours; true when they are kept. */
  async function keep({ memberId, ...tried }: TriedHours): Promise<boolean> {
    const done = await submit(async () => {
      const known = await callApi<HoursWire>('/api/hours')
      const had = memberId === null ? known.studio : known.members.find(each => each.memberId === memberId)?.hours ?? null
      const kept = [...(had ?? known.studio).filter(each => each.weekday !== tried.weekday), tried]
      await callApi('/api/hours', { method: 'PUT', body: { memberId, hours: kept } })
      before.value = { memberId, hours: had ?? [] }
      return true
    })
    await read()
    return done !== null
  }

  /** Puts back what stood before; true when it stands again. */
  async function putBack(): Promise<boolean> {
    const done = await submit(() => callApi('/api/hours', { method: 'PUT', body: before.value }))
    if (done !== null) before.value = null
    await read()
    return done !== null
  }
  return { before, keeping, refused, read, standingOn, closedDay, keep, putBack }
}
