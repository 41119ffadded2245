/** Runs `work` once nothing has asked for it for `delay` ms. */
export function useDebounced(work: () => unknown, delay: number): () => void {
  let timer: ReturnType<typeof setTimeout> | undefined
  onBeforeUnmount(() => clearTimeout(timer))
  return () => {
    clearTimeout(timer)
    timer = setTimeout(work, delay)
  }
}
