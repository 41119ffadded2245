import type { ToldLine } from '~/stores/told'
import { toldWords } from '#shared/words/hands'
import { startVapour } from '#shared/words/vapour-starts'

/** What waits for a PIN: its words, whose PIN is looked for first (null: anybody's), and how to tell it. */
interface Waiting { label: string, memberId: number | null, say: () => Promise<unknown> }

/**
 * Telling at a bench tablet, for everything on its desk: what is recorded under a name, or was, waits for a PIN, and the
 * tablet is handed back once it is told and no question about it stands open. What stood open when the tablet was locked is
 * left: whoever opens it next is somebody else.
 */
export function provideBenchTelling() {
  const telling = useTelling()
  const { as, handBack, acted } = useBench()
  const waiting = shallowRef<Waiting | null>(null)
  const asking = ref(false)
  const handsBack = ref(false)
  watch(() => handsBack.value && telling.asked.value.length === 0 && !telling.busy.value, (now) => {
    if (!now) return
    handsBack.value = false
    void handBack()
  })
  onUnmounted(telling.leave)

  /** Says it at once where somebody acts under their name, else after a PIN. */
  async function underName(label: string, memberId: number | null, say: () => Promise<unknown>) {
    if (as.value === null) {
      waiting.value = { label, memberId, say }
      asking.value = true
      return
    }
    await say()
    acted()
  }
  async function entered() {
    const what = waiting.value
    waiting.value = null
    if (!what) return
    await what.say()
    acted()
    handsBack.value = true
  }
  function sayWho() {
    waiting.value = null
    asking.value = true
  }
  const ofLine = (label: string, line: ToldLine, say: () => Promise<unknown>) => (line.by === null || line.state === 'later' ? say() : underName(label, line.by, say))
  const atDesk = provideTellingAs({
    ...telling,
    undo: line => ofLine(toldWords.undo, line, () => telling.undo(line)) as Promise<void>,
    move: (line, doneAt) => ofLine(toldWords.move, line, () => telling.move(line, doneAt)) as Promise<void>,
    again: line => ofLine(toldWords.again, line, () => telling.again(line)) as Promise<void>,
    answer: vapour => underName(startVapour.record, null, () => telling.answer(vapour)),
  })
  return { waiting, asking, underName, entered, sayWho, undo: atDesk.undo }
}
