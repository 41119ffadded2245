import { useEventSource } from '@vueuse/core'

interface Word { revision: number, at: number }

/**
 * The studio's live word: `revision` grows with every change anybody makes, `heardAt` is this device's clock
 * (ms) at the last word, heard at least every 20 seconds while connected. Null before the first.
 * @param wallToken for a wall tablet; otherwise the session opens the stream
 */
export function useLive(wallToken: string | null = null) {
  const revision = ref<number | null>(null)
  const heardAt = ref<number | null>(null)
  const url = wallToken === null ? '/api/live' : `/api/live?wall=${encodeURIComponent(wallToken)}`
  // On the server there is nothing to listen with, and nobody to tell.
  if (import.meta.server) return { revision, heardAt, state: ref<'open' | 'connecting' | 'cut off'>('connecting') }

  const { data, status } = useEventSource<string[], Word>(url, [], {
    autoReconnect: { delay: 2000 },
    serializer: { read: raw => raw ? JSON.parse(raw) as Word : { revision: 0, at: 0 } },
  })
  watch(data, (word) => {
    if (!word) return
    revision.value = word.revision
    heardAt.value = Date.now()
  })
  const state = computed(() => status.value === 'OPEN' ? 'open' as const : heardAt.value === null ? 'connecting' as const : 'cut off' as const)
  return { revision, heardAt, state }
}
