import { FetchError } from 'ofetch'

/** What takes less than this says nothing of itself, ms. */
const slowMs = 500

/**
 * A question behind a fold, which takes a while and changes nothing: asked when it is opened, and again while it is open when its subject changes.
 * The last one asked counts: an older answer that comes after it is dropped. `waits`: asked; `slow`: for so long that it should be said.
 * `problem` holds the sentence of a refusal, `failed` that it did not get through.
 * @param send asks; null while there is nothing to ask about
 * @param subject changes when an answer would no longer be about the same thing
 */
export function useFoldedQuestion<Answer>(send: () => (() => Promise<Answer>) | null, subject: () => string) {
  const answer = shallowRef<Answer | null>(null)
  const waits = ref(false)
  const slow = ref(false)
  const failed = ref(false)
  const problem = ref<string | null>(null)
  const open = ref(false)
  let count = 0

  function clear() {
    count += 1
    answer.value = null
    waits.value = slow.value = failed.value = false
    problem.value = null
  }

  async function look() {
    const asks = send()
    if (!asks) return
    clear()
    const mine = count
    const isLast = () => mine === count
    waits.value = true
    const timer = setTimeout(() => { slow.value = isLast() && waits.value }, slowMs)
    try {
      const found = await asks()
      if (isLast()) answer.value = found
    }
    catch (error) {
      const message: unknown = error instanceof FetchError ? error.data?.data?.message : null
      if (isLast()) problem.value = typeof message === 'string' ? message : null
      if (isLast()) failed.value = problem.value === null
    }
    clearTimeout(timer)
    if (isLast()) waits.value = slow.value = false
  }

  function toggled(event: Event) {
    open.value = (event.target as HTMLDetailsElement).open
    if (open.value && answer.value === null && !waits.value) void look()
  }
  watch(subject, () => {
    clear()
    if (open.value) void look()
  })

  return { answer, waits, slow, failed, problem, look, toggled }
}
