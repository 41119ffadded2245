import { useEventListener, useIntervalFn } from '@vueuse/core'
import type { Word } from '#shared/heard'
import type { Door } from '~/stores/studio'

/** Two beats and a little: a connection silent for so long is dead, whatever the browser thinks of it. ms. */
const silentMs = 45_000
/** On waking up, one missed beat is enough to doubt the connection. ms. */
const beatMissedMs = 25_000
const openWithinMs = 10_000
const firstTryMs = 1000
const slowestTryMs = 10_000

/**
 * The studio's live word, taken up again by itself: after an error, after silence, and at once when the device wakes or
 * finds its network again. `open` while the connection stands; `word` null before the first.
 * @param door what opens the stream
 */
export function useLive(door: Door = {}) {
  const word = shallowRef<Word | null>(null)
  const open = ref(false)
  // On the server there is nothing to listen with, and nobody to tell.
  if (import.meta.server) return { word, open }

  const url = ['/api/live', new URLSearchParams(door).toString()].filter(Boolean).join('?')
  let source: EventSource | null = null
  let signAt = 0
  let tryMs = firstTryMs
  let timer: ReturnType<typeof setTimeout> | undefined

  function close() {
    clearTimeout(timer)
    source?.close()
    source = null
    open.value = false
  }
  function connect() {
    close()
    signAt = Date.now()
    source = new EventSource(url)
    source.onopen = () => {
      open.value = true
      tryMs = firstTryMs
    }
    source.onmessage = ({ data }: MessageEvent<string>) => {
      signAt = Date.now()
      word.value = JSON.parse(data) as Word
    }
    // A browser tries again by itself after some failures and not after others: one way for all of them.
    source.onerror = () => {
      close()
      timer = setTimeout(connect, tryMs)
      tryMs = Math.min(tryMs * 2, slowestTryMs)
    }
  }
  const doubt = (afterMs: number) => (source === null || Math.abs(Date.now() - signAt) > afterMs) && connect()

  connect()
  useIntervalFn(() => source !== null && doubt(open.value ? silentMs : openWithinMs), 5000)
  useEventListener('online', () => doubt(0))
  useEventListener('pageshow', () => doubt(beatMissedMs))
  useEventListener(document, 'visibilitychange', () => document.visibilityState === 'visible' && doubt(beatMissedMs))
  onScopeDispose(close)
  return { word, open }
}

/**
 * Calls `refresh` whenever the studio has moved on, and again with every word until it has succeeded.
 * @param refresh resolves to whether the page now shows what it asked for
 */
export function useLiveRefresh(refresh: () => Promise<boolean>) {
  const { word } = useLive()
  let shown: number | null = null
  watch(word, async (said) => {
    if (said === null || said.revision === shown) return
    if (await refresh()) shown = said.revision
  })
}
