import { manyActs } from '#shared/many-acts'
import { isWetPiece } from '#shared/piece-finder'
import type { ReadPiece } from '#shared/verdict/piece'

/** The pieces chosen on the page, and what may be told of them together. What has left the studio is chosen no more. */
export function useChosenPieces({ studio }: ReturnType<typeof provideTelling>) {
  const ids = ref<ReadonlySet<number>>(new Set())
  const chosen = computed((): ReadPiece[] => studio.pieces.value.filter(read => ids.value.has(read.piece.id)))
  const acts = computed(() => manyActs(chosen.value, studio.clock.value, studio.heardAt.value))
  const wet = computed(() => chosen.value.filter(read => isWetPiece(read, studio.now.value)))

  function set(of: readonly number[], on: boolean) {
    const next = new Set(ids.value)
    for (const id of of) {
      if (on) next.add(id)
      else next.delete(id)
    }
    ids.value = next
  }
  return { ids, chosen, acts, wet, set, clear: () => { ids.value = new Set() } }
}
