import { defineStore } from 'pinia'
import type { StudioState } from '#shared/schemas/piece-state'
import { fromWire } from '#shared/schemas/wire'
import type { Wire } from '#shared/schemas/wire'

/** A device whose clock is off by more than this is read by the studio's clock. */
const clockSlackMs = 60_000

const isAbsent = (error: unknown) => typeof error === 'object' && error !== null && 'statusCode' in error && error.statusCode === 404

/** The studio as this page last heard of it. State only: what it means is asked of `#shared/verdict`. */
export const useStudioStore = defineStore('studio', () => {
  const state = shallowRef<StudioState | null>(null)
  /** This device's clock at the last word, ms; null before the first. */
  const heardAt = ref<number | null>(null)
  const clockShift = ref(0)
  const failed = ref(false)
  /** The wall link opens nothing: revoked, or never made. */
  const refused = ref(false)
  let asking: Promise<void> | null = null

  async function ask(wallToken: string | null) {
    const request = useRequestFetch()
    try {
      const answer = await request<Wire<StudioState>>('/api/state', { query: wallToken === null ? {} : { wall: wallToken } })
      const now = Date.now()
      state.value = fromWire<StudioState>(answer)
      heardAt.value = now
      clockShift.value = Math.abs(state.value.at - now) > clockSlackMs ? state.value.at - now : 0
      failed.value = false
      refused.value = false
    }
    catch (error) {
      if (wallToken !== null && isAbsent(error)) {
        refused.value = true
        state.value = null
        return
      }
      failed.value = true
      if (state.value === null) throw error
    }
  }

  /** Asks for the state; two who ask at once share one answer. What is shown stays when it does not come. */
  function load(wallToken: string | null = null): Promise<void> {
    asking ??= ask(wallToken).finally(() => { asking = null })
    return asking
  }

  /** A word from the live stream: the studio is there, even when nothing changed. */
  function hear(at: number) {
    heardAt.value = Math.max(heardAt.value ?? 0, at)
  }

  return { state, heardAt, clockShift, failed, refused, load, hear }
})
