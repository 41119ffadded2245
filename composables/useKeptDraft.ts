/** A form kept in this tab until `forget`: a reload or a refusal loses nothing. */
export function useKeptDraft<Draft extends object>(key: string, blank: () => Draft) {
  const draft = reactive(blank()) as Draft
  const shelf = `stillwet ${key}`
  /** Whether something was typed before and taken up again. */
  const found = ref(false)
  onMounted(() => {
    try {
      const kept: unknown = JSON.parse(sessionStorage.getItem(shelf) ?? 'null')
      if (typeof kept === 'object' && kept !== null) {
        Object.assign(draft, kept)
        found.value = true
      }
    }
    catch {
      sessionStorage.removeItem(shelf)
    }
    watch(() => draft, () => sessionStorage.setItem(shelf, JSON.stringify(draft)), { deep: true })
  })
  function forget() {
    Object.assign(draft, blank())
    void nextTick(() => sessionStorage.removeItem(shelf))
  }
  return { draft, found, forget }
}
