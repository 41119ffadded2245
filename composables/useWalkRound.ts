import { firstStop, lostPieces, walkStops } from '#shared/walk-round'
import type { Expected } from '#shared/walk-round'

/** The walk-round: which shelf one stands before, what was tapped as not there, and the telling of it. */
export function useWalkRound({ say, busy, studio }: ReturnType<typeof provideTelling>) {
  const stops = computed(() => (studio.state.value ? walkStops(studio.state.value) : []))
  /** The places of the walk, kept from its beginning: what is moved on the way must not make shelves vanish underfoot. */
  const route = shallowRef<number[]>([])
  const at = ref(0)
  const stop = computed(() => stops.value.find(each => each.place.id === route.value[at.value]) ?? null)
  const done = computed(() => route.value.length > 0 && at.value >= route.value.length)
  const tapped = ref<number[]>([])
  const found = ref<number[]>([])
  const missing = computed(() => stop.value?.expected.filter(each => tapped.value.includes(each.piece.id)) ?? [])
  const here = computed(() => stop.value?.expected.filter(each => !tapped.value.includes(each.piece.id)) ?? [])
  const lost = computed(() => lostPieces(stops.value, stop.value?.place.id ?? 0))

  const flip = (list: Ref<number[]>) => (id: number) => { list.value = list.value.includes(id) ? list.value.filter(each => each !== id) : [...list.value, id] }
  function go(to: number) {
    at.value = Math.max(0, to)
    found.value = []
    tapped.value = stop.value?.expected.filter(each => each.missing).map(each => each.piece.id) ?? []
  }
  /** Whether it was taken, or kept for later. */
  async function tell(kind: 'seen' | 'not there', all: readonly Expected[]): Promise<boolean> {
    if (all.length === 0) return true
    const line = await say({ kind, body: {}, pieces: all.map(each => each.piece), partIds: all.flatMap(each => each.partIds), doneAt: studio.now.value })
    return line?.state !== 'refused'
  }

  async function note() {
    if (busy.value || !stop.value) return
    const [away, present] = [missing.value, here.value]
    // A refusal keeps the shelf: walked on from, its red line would soon be under those of the next.
    if (await tell('seen', present) && await tell('not there', away)) go(at.value + 1)
  }
  async function moveHere() {
    const placeId = stop.value?.place.id
    const all = lost.value.filter(each => found.value.includes(each.piece.id))
    if (busy.value || placeId === undefined || all.length === 0) return
    await say({ kind: 'moved', body: { placeId }, pieces: all.map(each => each.piece), partIds: all.flatMap(each => each.partIds), doneAt: studio.now.value })
    found.value = []
  }
  /** Where the walk was taken up: nothing, or the shelf it goes on with. */
  const takenUpAt = ref(0)
  function begin(first: number) {
    route.value = stops.value.map(each => each.place.id)
    takenUpAt.value = first
    go(first)
  }
  const restart = () => begin(0)
  watch(stops, () => { if (route.value.length === 0) begin(firstStop(stops.value, studio.now.value)) }, { immediate: true })
  return { route, at, takenUpAt, stop, done, tapped, found, missing, here, lost, tap: flip(tapped), find: flip(found), go, note, moveHere, restart, busy, studio }
}
