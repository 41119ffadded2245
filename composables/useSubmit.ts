import { FetchError } from 'ofetch'
import { requests } from '#shared/words/requests'

interface Refusal { reason: string, message: string, fields?: Record<string, string>, current?: unknown }

/** What the server said no with, or null when it was not reached. */
function readRefusal(error: unknown): Refusal | null {
  const data: unknown = error instanceof FetchError ? error.data?.data : null
  return typeof data === 'object' && data !== null && 'message' in data && 'reason' in data ? data as Refusal : null
}

/**
 * One sending at a time of a form or an act. What was typed stays with the caller;
 * `message` and `fields` hold the sentences to show, `current` what stands there now after a conflict.
 */
export function useSubmit() {
  const busy = ref(false)
  const message = ref<string | null>(null)
  const fields = ref<Record<string, string>>({})
  const current = shallowRef<unknown>(null)

  /** Runs `send`; its answer, or null when it was refused or did not get through. */
  async function submit<T>(send: () => Promise<T>): Promise<T | null> {
    if (busy.value) return null
    busy.value = true
    message.value = null
    fields.value = {}
    current.value = null
    try {
      return await send()
    }
    catch (error) {
      const refusal = readRefusal(error)
      message.value = refusal?.message ?? (error instanceof FetchError ? requests.notReached : requests.failed)
      fields.value = refusal?.fields ?? {}
      current.value = refusal?.current ?? null
      return null
    }
    finally {
      busy.value = false
    }
  }

  return { busy, message, fields, current, submit }
}
