/** A page that comes sooner needs no sign, ms. */
const patienceMs = 400

/** True while the next page is waited for longer than anybody waits without wondering: the old one stands until it has come. */
export function useOpening() {
  const opening = ref(false)
  if (import.meta.server) return opening
  let timer: ReturnType<typeof setTimeout> | undefined
  const ends = () => {
    clearTimeout(timer)
    opening.value = false
  }
  const { hook } = useNuxtApp()
  const off = [
    hook('page:loading:start', () => {
      ends()
      timer = setTimeout(() => { opening.value = true }, patienceMs)
    }),
    hook('page:loading:end', ends),
    hook('vue:error', ends),
  ]
  onUnmounted(() => {
    ends()
    off.forEach(each => each())
  })
  return opening
}
