import { useIntervalFn } from '@vueuse/core'

/** The reader's now in ms UTC, the same at first paint on server and page, then moving every ten seconds. */
export function useClock() {
  const now = useState('now', () => Date.now())
  const { resume } = useIntervalFn(() => { now.value = Date.now() }, 10_000, { immediate: false })
  onMounted(() => {
    now.value = Date.now()
    resume()
  })
  return readonly(now)
}
