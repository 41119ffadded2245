import { useEventListener, useIntervalFn } from '@vueuse/core'
import type { InjectionKey } from 'vue'
import { asPersonMs, locksAt, tellsAwake } from '#shared/bench/lock'
import type { BenchWire } from '#shared/schemas/bench'
import { stepKinds } from '#shared/terms'
import type { Who } from '#shared/verdict/begin'

const answerMs = 10_000

/** Tells the studio of touches, and locks when there has been none for as long as the tablet is set to. */
function useIdleLock(tablet: Ref<BenchWire | null>, load: () => Promise<void>, lock: () => Promise<void>) {
  let touchedAt = Date.now()
  let toldAt: number | null = null
  async function tellAwake(now: number) {
    toldAt = now
    const answer = await callApi<{ locked: boolean }>('/api/bench/awake', { method: 'POST', timeout: answerMs }).catch(() => null)
    if (answer?.locked) await load()
  }
  function touch() {
    const now = Date.now()
    // A device that slept wakes with a touch: it was locked long before.
    if (!tablet.value || tablet.value.locked || now >= locksAt(touchedAt, tablet.value.lockMin)) return
    touchedAt = now
    if (tellsAwake(toldAt, now)) void tellAwake(now)
  }
  if (import.meta.client) for (const kind of ['pointerdown', 'keydown'] as const) useEventListener(window, kind, touch, { passive: true })
  useIntervalFn(() => tablet.value && !tablet.value.locked && Date.now() >= locksAt(touchedAt, tablet.value.lockMin) && void lock(), 1000)
  return { start: () => { touchedAt = Date.now() } }
}

/**
 * The tablet on its page: who acts at it, opening it and acting under a name with a PIN, and the lock. The studio decides
 * all of it; a tablet that cannot reach the studio still locks itself.
 */
export function provideBench() {
  const { tablet, load } = useBenchTablet()
  const untold = useUntoldStore()
  const store = useStudioStore()
  const { busy, message, submit } = useSubmit()
  const locked = computed(() => tablet.value?.locked ?? true)
  const as = computed(() => (locked.value ? null : tablet.value?.as ?? null))
  /** Without a name a bench does every kind of step that it may tell; under a name what that person may. */
  const who = computed((): Who => (as.value ? { role: as.value.role, helperKinds: as.value.stepKinds, equipped: false, memberId: as.value.memberId } : { role: 'helper', helperKinds: stepKinds, equipped: false }))
  const personTill = ref<number | null>(as.value ? Date.parse(as.value.till) : null)

  untold.atBench = true
  watchEffect(() => { untold.memberId = as.value?.memberId ?? null })
  onUnmounted(() => { untold.atBench = false })

  const refresh = async () => {
    await load()
    await store.load({ bench: '1' })
  }
  const idle = useIdleLock(tablet, refresh, lock)
  async function lock() {
    if (tablet.value) tablet.value = { ...tablet.value, locked: true, as: null }
    await callApi('/api/bench/lock', { method: 'POST', timeout: answerMs }).catch(() => undefined)
    await store.load({ bench: '1' }).catch(() => undefined)
  }
  /** Opens the tablet, or takes a name at one that is open. True when the PIN was right. */
  async function enter(memberId: number, pin: string): Promise<boolean> {
    const done = await submit(() => callApi('/api/bench/person', { method: 'POST', body: { memberId, pin }, timeout: answerMs }))
    if (done === null) return false
    idle.start()
    personTill.value = Date.now() + asPersonMs
    await refresh()
    return true
  }
  async function handBack() {
    if (tablet.value) tablet.value = { ...tablet.value, as: null }
    personTill.value = null
    await callApi('/api/bench/person', { method: 'DELETE', timeout: answerMs }).catch(() => undefined)
  }
  /** An act keeps whoever told it acting. */
  const acted = () => { if (as.value) personTill.value = Date.now() + asPersonMs }
  useIntervalFn(() => personTill.value !== null && Date.now() >= personTill.value && void handBack(), 1000)

  const bench = { tablet, locked, as, who, personTill, busy, message, lock, enter, handBack, acted, load }
  provide(key, bench)
  return bench
}

const key: InjectionKey<ReturnType<typeof provideBench>> = Symbol('bench')

/** The tablet of the page around. */
export function useBench() {
  const bench = inject(key)
  if (!bench) throw new Error('A bench tablet is provided by its page.')
  return bench
}
