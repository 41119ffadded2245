import { choicesOf, withChoice } from '#shared/sentence/card'
import { readSentence } from '#shared/sentence/read'
import type { Sentence } from '#shared/sentence/read'
import { rungFor } from '#shared/sentence/rung'
import { answeredAt } from '#shared/time'
import type { TimeAnswer } from '#shared/time'
import { controlWords } from '#shared/words/controls'
import { sentenceWords, understoodText, wantedText } from '#shared/words/sentence'

type PutOn = ReturnType<typeof usePutOn>
type Reading = Extract<Sentence, { kind: 'reading' }>

async function noteAir({ room, tempC, rh, words }: Reading, doneAt: number): Promise<string> {
  const path: string = `/api/rooms/${room?.id}/readings`
  await callApi<unknown>(path, { method: 'POST', body: { clientKey: newClientKey(), at: new Date(doneAt).toISOString(), tempC, rh, words } })
  return sentenceWords.noted(room?.name ?? '')
}

/** The card: which sentence was read, what was chosen on it, and what it says so far. */
function useCard(putOn: PutOn, mayPut: Ref<boolean>) {
  const { studio } = putOn
  const vocabulary = useVocabulary(putOn)
  const units = computed(() => studio.state.value?.studio.units ?? 'metric')
  const sentence = shallowRef<Sentence | null>(null)
  const left = ref<number[]>([])
  const chosenId = ref<number | null>(null)
  const when = ref<TimeAnswer | null>(null)
  /** How many sentences were read or dropped: the keys of time begin anew with each. */
  const count = ref(0)
  const choices = computed(() => (sentence.value ? choicesOf(sentence.value, vocabulary.value.rooms) : []))
  const reads = computed(() => {
    const ids = sentence.value && 'pieceIds' in sentence.value ? sentence.value.pieceIds : []
    return studio.pieces.value.filter(({ piece }) => ids.includes(piece.id))
  })
  const meant = computed(() => reads.value.filter(({ piece }) => !left.value.includes(piece.id)).map(({ piece }) => piece))
  const settled = computed((): Sentence | null => {
    const said = sentence.value && withChoice(sentence.value, choices.value.find(each => each.id === chosenId.value) ?? null)
    return said?.kind === 'touch test' ? { ...said, milestone: rungFor(said.milestone, meant.value.flatMap(piece => piece.groups.flatMap(group => group.films))) } : said
  })
  const says = computed(() => settled.value && understoodText(settled.value, meant.value.map(piece => piece.name), units.value))
  const wanted = computed(() => settled.value && wantedText(settled.value, meant.value.length, mayPut.value))

  function show(text: string) {
    sentence.value = readSentence(text, vocabulary.value, studio.clock.value, units.value)
    left.value = []
    count.value += 1
    when.value = sentence.value?.when ?? null
    const said = sentence.value
    chosenId.value = said && (said.kind !== 'reading' || said.room) ? choices.value[0]?.id ?? null : null
  }
  return { sentence, left, chosenId, when, count, choices, settled, reads, meant, says, wanted, show }
}

const formOf = ({ chosen, materialId, when }: PutOn) => [chosen, materialId, when] as const

/** The form below says what the card says, so that what was not understood is chosen there. Nothing of a sentence that was not meant stays in it. */
function useFilling(putOn: PutOn, card: ReturnType<typeof useCard>) {
  const fields = formOf(putOn)
  const said = () => fields.map(field => JSON.stringify(field.value))
  let before: unknown[] | null = null
  let filled: string[] = []

  function fill() {
    before ??= fields.map(field => field.value)
    putOn.chosen.value = card.meant.value.map(piece => piece.id)
    putOn.on.wholeAgain()
    if (card.chosenId.value !== null) putOn.materialId.value = card.chosenId.value
    putOn.when.value = card.when.value
    filled = said()
  }
  /** What the form held before; what hands have chosen in it since is theirs. */
  function empty() {
    const now = said()
    fields.forEach((field, i) => { if (before && now[i] === filled[i]) (field as Ref<unknown>).value = before[i] })
    before = null
  }
  return { fill, empty, keep: () => { before = null } }
}

/** One sentence from the words to the card and to what is told. What is put on is told by `putOn`, as its own page tells it. */
export function useSentence(putOn: PutOn, say: ReturnType<typeof provideTelling>['say'], mayPut: Ref<boolean>) {
  const { studio } = putOn
  const text = ref('')
  const problem = ref<string | null>(null)
  const result = ref<string | null>(null)
  const { busy, message, submit } = useSubmit()
  const card = useCard(putOn, mayPut)
  const form = useFilling(putOn, card)

  function read() {
    form.empty()
    result.value = null
    card.show(text.value)
    problem.value = text.value.trim() === '' ? sentenceWords.empty : card.sentence.value ? null : sentenceWords.nothing
    if (card.sentence.value?.kind === 'put on' && mayPut.value) form.fill()
  }
  function drop() {
    form.empty()
    card.count.value += 1
    card.sentence.value = null
    problem.value = null
  }

  async function tell(said: Sentence, doneAt: number): Promise<boolean> {
    const pieces = card.meant.value
    if (said.kind === 'reading') {
      const noted = await submit(() => noteAir(said, doneAt))
      result.value = noted
      return noted !== null
    }
    if (said.kind === 'touch test') await say({ kind: 'touch test', body: { milestone: said.milestone, reached: said.reached }, pieces, doneAt })
    else if (said.kind === 'moved') await say({ kind: 'moved', body: { placeId: said.place?.id }, pieces, doneAt })
    else {
      form.fill()
      form.keep()
      await putOn.done(putOn.parts.value.some(part => part.step !== null))
    }
    return true
  }

  async function note() {
    const said = card.settled.value
    const when = card.when.value
    problem.value = card.wanted.value ?? (when === null ? controlWords.timeWanted : null)
    if (!said || problem.value !== null || when === null || busy.value || putOn.busy.value) return
    if (!await tell(said, answeredAt(when, studio.now.value))) return
    text.value = ''
    drop()
  }

  return { ...card, text, problem, result, message, busy, read, drop, note, studio }
}
