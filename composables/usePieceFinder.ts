import { handsJobs } from '#shared/hands'
import { filterQuery, findPieces, groupPieces, readFilter, waitingForHands } from '#shared/piece-finder'
import type { PieceFilter, PieceGroup } from '#shared/piece-finder'
import type { PieceMarks } from '#shared/schemas/piece-list'
import type { ReadPiece } from '#shared/verdict/piece'
import { piecesWords } from '#shared/words/pieces'

type Studio = Awaited<ReturnType<typeof useStudio>>

/** Finding pieces: the filter lives in the address, what it leaves is read from the studio on this page. */
export function usePieceFinder(studio: Studio, marks: Ref<readonly PieceMarks[]>) {
  const route = useRoute()
  const router = useRouter()
  const filter = computed(() => readFilter(route.query))
  const byId = computed(() => new Map(marks.value.map(each => [each.id, each])))
  const hands = () => waitingForHands(handsJobs(studio.pieces.value, studio.clock.value, studio.heardAt.value))
  const shown = computed((): ReadPiece[] => (filter.value.gone ? [] : findPieces(studio.pieces.value, filter.value, { now: studio.now.value, marks: byId.value, hands })))
  const groups = computed((): PieceGroup[] => groupPieces(shown.value, filter.value.sort, studio.state.value ?? { places: [] }, studio.now.value, piecesWords))

  /** Changes the address without a step back in the browser for every letter. */
  function ask(change: Partial<PieceFilter>) {
    void router.replace({ query: filterQuery({ ...filter.value, ...change }) })
  }
  return { filter, shown, groups, ask, showAll: () => void router.replace({ query: {} }) }
}
