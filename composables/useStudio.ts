import { useEventListener, useIntervalFn } from '@vueuse/core'
import { readPiece } from '#shared/verdict/piece'
import type { ReadPiece } from '#shared/verdict/piece'
import { cutOffAfterMs } from '#shared/verdict/verdict'
import type { Clock } from '#shared/time'
import { studioZone } from '#shared/time'
import { withUntold } from '#shared/verdict/untold'
import type { Who } from '#shared/verdict/begin'
import type { Door } from '~/stores/studio'

/**
 * The studio on a page: loaded on the server, kept up by the live stream, read anew as the clock moves. `pieces` holds
 * every piece as `readPiece` reads it, so that all screens say the same.
 * @param door what the page comes by
 * @param acting who acts at a bench tablet; otherwise whoever is signed in
 */
export async function useStudio(door: Door = {}, acting: Ref<Who | null> | null = null) {
  const store = useStudioStore()
  const untold = useUntoldStore()
  const { session, load: askWho } = useSession()
  const route = useRoute()
  const shell = useShell()
  const deviceNow = useClock()
  const now = computed(() => deviceNow.value + store.clockShift)
  const zone = computed(() => studioZone(store.state?.studio.zone ?? 'UTC'))
  const clock = computed((): Clock => ({ now: now.value, zone: zone.value }))
  const heardAt = computed(() => (store.heardAt === null ? null : store.heardAt + store.clockShift))
  const cutOff = computed(() => heardAt.value !== null && now.value - heardAt.value >= cutOffAfterMs)
  const who = computed((): Who | null => {
    if (acting) return acting.value
    const member = session.value?.member
    return member ? { role: member.role, helperKinds: member.stepKinds, equipped: false, memberId: member.id } : null
  })
  const pieces = computed((): ReadPiece[] => {
    const state = store.state
    if (!state) return []
    return state.pieces.map(piece => readPiece(withUntold(piece, untold.acts), state, now.value, heardAt.value, who.value))
  })

  watchEffect(() => {
    shell.value = { zone: store.state?.studio.zone ?? null, studio: store.state?.studio.name ?? null, notHeardSince: cutOff.value ? heardAt.value : null }
  })
  const live = useLive(door)
  watch(live.word, word => word !== null && void store.hear(word, door).catch(() => undefined))
  onMounted(() => {
    untold.start()
    void untold.tellAll().then(() => untold.acts.length > 0 ? undefined : store.load(door))
  })
  useEventListener('online', () => void untold.tellAll())
  useIntervalFn(() => untold.acts.length > 0 && void untold.tellAll(), 15_000)
  // The word came through and the state did not: the next word may be twenty seconds away.
  useIntervalFn(() => store.failed && live.open.value && void store.load(door).catch(() => undefined), 2000)

  // Signed out elsewhere, the page would stand as it was and look alive: a stream refused does not say why.
  useIntervalFn(async () => {
    if (live.open.value || acting || Object.keys(door).length > 0) return
    const found = await askWho().catch(() => null)
    if (found && !found.person) await navigateTo({ path: '/sign-in', query: { to: route.fullPath } })
  }, 10_000)

  // Last, for after a wait nothing can be tied to the page any more: what was would never start, or never end.
  await callOnce(`studio ${Object.values(door).join()}`, () => store.load(door).catch((error: unknown) => {
    // On the way from another page the page itself says that nothing came, and asks again; without it there would be none.
    if (import.meta.server) throw error
  }), { mode: 'navigation' })
  return { store, state: computed(() => store.state), pieces, now, zone, clock, heardAt, cutOff, who, reload: () => store.load(door) }
}
