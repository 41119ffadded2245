import { useDebounceFn } from '@vueuse/core'
import { arrangementOf, isSameArrangement } from '#shared/arrangement'
import type { Arrangement } from '#shared/schemas/arrangement'
import { arrangeWords } from '#shared/words/arrange'

type Studio = Awaited<ReturnType<typeof useStudio>>

/** Taps that follow one another so closely are kept in one go, ms. */
const gathers = 500

/** One thing that was done: how the studio stood before, or how to take away what was added. */
interface Before { what: string, arrangement: Arrangement | null, takeAway: (() => Promise<unknown>) | null }

/** What is drawn and what the studio has, and the keeping of the one as the other. */
function useKeeping(studio: Studio) {
  const { busy, message, current, submit } = useSubmit()
  const base = shallowRef<Arrangement>([])
  const draft = shallowRef<Arrangement>([])
  const before = shallowRef<Before[]>([])
  const changed = computed(() => !isSameArrangement(base.value, draft.value))
  let own = false

  function take(arrangement: Arrangement) {
    // What somebody else has done since is not undone with ours.
    if (!own && !isSameArrangement(arrangement, base.value)) before.value = []
    base.value = arrangement
    draft.value = arrangement
  }
  watch(() => studio.state.value && JSON.stringify(arrangementOf(studio.state.value)), () => {
    if (studio.state.value && !changed.value && !busy.value) take(arrangementOf(studio.state.value))
  }, { immediate: true })

  /** After something of our own that no arrangement says: a place more, or one less. */
  async function reload() {
    own = true
    await studio.reload().catch(() => undefined)
    await nextTick()
    own = false
  }
  async function keep() {
    if (!changed.value || busy.value) return
    const now = draft.value
    const done = await submit(() => callApi<{ ok: true }>('/api/places/arrangement', { method: 'PUT', body: { was: base.value, now } }))
    if (done) base.value = now
    else if (Array.isArray(current.value)) take(current.value as Arrangement)
    else return
    await studio.reload().catch(() => undefined)
    // What was tapped while it was being kept follows at once.
    if (done && changed.value) await keep()
  }
  return { base, draft, before, changed, busy, message, submit, reload, keep }
}

/**
 * The rooms and places as they are being arranged: `draft` is what is drawn, kept at once and shown while it is kept. What the
 * studio refuses stays drawn with the sentence; what somebody else did meanwhile takes its place.
 */
export function useArrange(studio: Studio) {
  const keeping = useKeeping(studio)
  const { base, draft, before, message, submit, reload, keep } = keeping
  const said = ref('')
  const keepSoon = useDebounceFn(keep, gathers)

  /** Draws it so and keeps it. `what` is said now, and again when it is undone. */
  function change(next: Arrangement, what: string) {
    if (isSameArrangement(next, draft.value)) return
    before.value = [...before.value.slice(-30), { what, arrangement: draft.value, takeAway: null }]
    draft.value = next
    said.value = what
    message.value = null
    void keepSoon()
  }

  /** Something was added by a request of its own. */
  async function added(what: string, takeAway: () => Promise<unknown>) {
    before.value = [...before.value, { what, arrangement: null, takeAway }]
    said.value = what
    await reload()
  }

  async function undo() {
    const last = before.value.at(-1)
    if (!last) return
    if (last.takeAway && await submit(last.takeAway) === null) return
    before.value = before.value.slice(0, -1)
    said.value = arrangeWords.undone(last.what)
    message.value = null
    if (last.takeAway) return reload()
    draft.value = last.arrangement ?? draft.value
    await keepSoon()
  }

  /** Gives up what the studio did not take. */
  function leave() {
    draft.value = base.value
    message.value = null
  }

  return { ...keeping, said, change, added, undo, leave }
}
