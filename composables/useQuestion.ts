import { FetchError } from 'ofetch'

/** What takes less than this says nothing of itself, ms. */
const slowMs = 500

/**
 * A question that takes a while and changes nothing. The last one asked counts: an older answer that comes after it is dropped.
 * `waits`: asked; `slow`: for so long that it should be said. `problem` holds the sentence of a refusal, `failed` that it did not get through.
 */
export function useQuestion<Answer>() {
  const answer = shallowRef<Answer | null>(null)
  const waits = ref(false)
  const slow = ref(false)
  const failed = ref(false)
  const problem = ref<string | null>(null)
  let count = 0

  function clear() {
    count += 1
    answer.value = null
    waits.value = slow.value = failed.value = false
    problem.value = null
  }

  async function ask(send: () => Promise<Answer>) {
    clear()
    const mine = count
    const isLast = () => mine === count
    waits.value = true
    const timer = setTimeout(() => { slow.value = isLast() && waits.value }, slowMs)
    try {
      const found = await send()
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

  return { answer, waits, slow, failed, problem, ask, clear }
}
