import { studioZone } from '#shared/time'
import type { Clock } from '#shared/time'

/** The studio's clock and units for a page that reads no board, with the frame's clock filled from the session. */
export function useStudioClock() {
  const { session } = useSession()
  const shell = useShell()
  const now = useClock()
  const zone = computed(() => studioZone(session.value?.studio?.zone ?? 'UTC'))
  const clock = computed((): Clock => ({ now: now.value, zone: zone.value }))
  const units = computed(() => session.value?.studio?.units ?? 'metric')
  watchEffect(() => {
    const studio = session.value?.studio
    if (studio && shell.value.zone === null) shell.value = { ...shell.value, zone: studio.zone, studio: studio.name }
  })
  return { now, zone, clock, units }
}
