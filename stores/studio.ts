import { defineStore } from 'pinia'
import type { StudioState } from '#shared/schemas/piece-state'
import { clockShift as shiftOf, heardBy } from '#shared/heard'
import type { Word } from '#shared/heard'
import { fromWire } from '#shared/schemas/wire'
import type { Wire } from '#shared/schemas/wire'

/** A question on a dead connection is given up after so long, so that the next goes another way. ms. */
const answerMs = 10_000

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
  let askingNext: Promise<void> | null = null

  async function ask(wallToken: string | null) {
    const request = useRequestFetch()
    // What the answer says was true at the earliest when it was asked for: a device may sleep over an answer.
    const askedAt = Date.now()
    try {
      const answer = await request<Wire<StudioState>>('/api/state', { query: wallToken === null ? {} : { wall: wallToken }, ...import.meta.client ? { timeout: answerMs } : {} })
      state.value = fromWire<StudioState>(answer)
      heardAt.value = askedAt
      clockShift.value = shiftOf(askedAt, state.value.at, Date.now())
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

  /**
   * Asks for the state as it is from now on: those who come while a question is on its way share the one after it.
   * What is shown stays when no answer comes.
   */
  function load(wallToken: string | null = null): Promise<void> {
    if (asking === null) {
      asking = ask(wallToken).finally(() => { asking = null })
      return asking
    }
    askingNext ??= asking.catch(() => undefined).then(() => {
      askingNext = null
      return load(wallToken)
    })
    return askingNext
  }

  /** A word from the live stream: that the studio is there, or that the state has to be asked for. */
  async function hear(word: Word, wallToken: string | null) {
    const at = heardBy(word, state.value, Date.now(), clockShift.value)
    if (at === null) await load(wallToken)
    else heardAt.value = Math.max(heardAt.value ?? 0, at)
  }

  return { state, heardAt, clockShift, failed, refused, load, hear }
})
