import { defineStore } from 'pinia'
import type { StudioState } from '#shared/schemas/piece-state'
import { clockShift as shiftOf, heardBy } from '#shared/heard'
import type { Word } from '#shared/heard'
import { fromWire } from '#shared/schemas/wire'
import type { Wire } from '#shared/schemas/wire'

/** A question on a dead connection is given up after so long, so that the next goes another way. ms. */
const answerMs = 10_000

/**
 * By what a page comes to the studio, as the query that says so: `{}` the session, `{ wall }` a wall link's secret,
 * `{ bench: '1' }` the tablet it runs on.
 */
export type Door = Readonly<Record<string, string>>

/** A door that opens nothing: never made, or ended. */
const isShut = (error: unknown) => typeof error === 'object' && error !== null && 'statusCode' in error && (error.statusCode === 404 || error.statusCode === 401)

/** The studio as this page last heard of it. State only: what it means is asked of `#shared/verdict`. */
export const useStudioStore = defineStore('studio', () => {
  const state = shallowRef<StudioState | null>(null)
  /** This device's clock at the last word, ms; null before the first. */
  const heardAt = ref<number | null>(null)
  const clockShift = ref(0)
  const failed = ref(false)
  /** The wall link or the tablet opens nothing: ended, or never made. */
  const refused = ref(false)
  let asking: Promise<void> | null = null
  let askingNext: Promise<void> | null = null

  async function ask(door: Door) {
    const request = useRequestFetch()
    // What the answer says was true at the earliest when it was asked for: a device may sleep over an answer.
    const askedAt = Date.now()
    try {
      const answer = await request<Wire<StudioState>>('/api/state', { query: door, ...import.meta.client ? { timeout: answerMs } : {} })
      state.value = fromWire<StudioState>(answer)
      heardAt.value = askedAt
      clockShift.value = shiftOf(askedAt, state.value.at, Date.now())
      failed.value = false
      refused.value = false
    }
    catch (error) {
      if (Object.keys(door).length > 0 && isShut(error)) {
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
  function load(door: Door = {}): Promise<void> {
    if (asking === null) {
      asking = ask(door).finally(() => { asking = null })
      return asking
    }
    askingNext ??= asking.catch(() => undefined).then(() => {
      askingNext = null
      return load(door)
    })
    return askingNext
  }

  /** A word from the live stream: that the studio is there, or that the state has to be asked for. */
  async function hear(word: Word, door: Door) {
    const at = heardBy(word, state.value, Date.now(), clockShift.value)
    if (at === null) await load(door)
    else heardAt.value = Math.max(heardAt.value ?? 0, at)
  }

  return { state, heardAt, clockShift, failed, refused, load, hear }
})
