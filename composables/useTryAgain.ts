/** What is shown as failed on the page, by its own way to try again. */
const shown = new Set<() => void>()

/**
 * One press tries everything again that failed on a page, whether it is shown as failed or only missing: one failure is seldom
 * alone, and nobody looks for the second key.
 * @param again this part's own way; it is kept while the part is on the page
 */
export function useTryAgain(again: () => void): () => void {
  const app = useNuxtApp()
  onMounted(() => shown.add(again))
  onBeforeUnmount(() => shown.delete(again))
  return () => {
    for (const one of [...shown]) one()
    const failed = Object.entries(app.payload._errors).filter(([, error]) => error).map(([key]) => key)
    if (failed.length > 0) void refreshNuxtData(failed)
  }
}
