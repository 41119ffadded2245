import type { InjectionKey } from 'vue'
import { useIntervalFn } from '@vueuse/core'
import type { AdviceLine } from '#shared/schemas/advice'
import type { AdviceAnswer } from '#shared/terms'

/** The night comes nearer without anybody telling it. */
const againMs = 10 * 60_000

function makeAdvice(pieceId: number | null) {
  const store = useStudioStore()
  const { data, error, refresh } = useLazyFetch<AdviceLine[]>('/api/advice', { query: pieceId === null ? {} : { piece: pieceId }, key: `advice ${pieceId ?? ''}`, server: false, default: () => [] })
  watch(() => store.state?.revision, (now, before) => {
    if (before !== undefined && now !== before) void refresh()
  })
  useIntervalFn(() => void refresh(), againMs)

  /** The advice about some films and turns, each line with those of them that it is about. */
  function about(coatIds: readonly number[], turnIds: readonly number[]): AdviceLine[] {
    const among = (mine: readonly number[], of: readonly number[]) => of.filter(id => mine.includes(id))
    return data.value.map(line => ({ ...line, coatIds: among(coatIds, line.coatIds), turnIds: among(turnIds, line.turnIds) })).filter(line => line.coatIds.length + line.turnIds.length > 0)
  }

  async function answer({ code, coatIds, turnIds }: AdviceLine, word: AdviceAnswer) {
    await callApi('/api/advice', { method: 'POST', body: { code, answer: word, coatIds, turnIds } })
    await refresh()
    return true
  }

  return { about, answer, failed: computed(() => error.value !== null && error.value !== undefined), refresh }
}

type Advice = ReturnType<typeof makeAdvice>
const key: InjectionKey<Advice> = Symbol('advice')

/** Lets everything on a page read the advice of the studio, or of one piece, and answer it. */
export function provideAdvice(pieceId: number | null = null): Advice {
  const advice = makeAdvice(pieceId)
  provide(key, advice)
  return advice
}

/** The advice of the page around. */
export function useAdvice(): Advice {
  const advice = inject(key)
  if (!advice) throw new Error('This component belongs on a page that provides advice.')
  return advice
}
