import type { Vocabulary } from '#shared/sentence/read'

/** What a sentence can name in this studio: what "I put something on" offers, and the places that stand empty. */
export function useVocabulary({ all, places, studio }: Pick<ReturnType<typeof usePutOn>, 'all' | 'places' | 'studio'>) {
  return computed((): Vocabulary => {
    const standing = new Map(places.value.map(({ place, pieces }) => [place?.id, pieces.map(read => read.piece.id)]))
    return {
      materials: all.value.map(each => ({ id: each.versionId, name: each.name })),
      pieces: studio.pieces.value.map(({ piece }) => ({ id: piece.id, name: piece.name, batch: piece.batch.name })),
      places: (studio.state.value?.places ?? []).map(({ id, name }) => ({ id, name, pieceIds: standing.get(id) ?? [] })),
      rooms: (studio.state.value?.rooms ?? []).map(({ id, name }) => ({ id, name })),
    }
  })
}
