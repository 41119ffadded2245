import type { ComputedRef } from 'vue'
import type { FaceWire } from '#shared/schemas/piece-list'
import type { ReadPiece } from '#shared/verdict/piece'

/** The most pieces that one request asks about. */
const atOnce = 200

/** The faces of the chosen pieces, asked for as they are chosen; what is known of a piece is not asked again. */
export function useFaces(reads: ComputedRef<readonly ReadPiece[]>) {
  const known = shallowRef<ReadonlyMap<number, FaceWire[]>>(new Map())
  const failed = ref(false)
  const waits = ref(false)
  const missing = () => reads.value.map(read => read.piece).filter(piece => !known.value.has(piece.id)).slice(0, atOnce)

  async function again() {
    const pieces = missing()
    if (pieces.length === 0 || waits.value) return
    waits.value = true
    failed.value = false
    try {
      const faces = await callApi<FaceWire[]>('/api/pieces/faces', { query: { pieces: pieces.map(piece => piece.id).join(',') } })
      const own = (piece: (typeof pieces)[number]) => piece.groups.flatMap(group => group.parts.map(part => part.partId))
      known.value = new Map([...known.value, ...pieces.map(piece => [piece.id, faces.filter(face => own(piece).includes(face.partId))] as const)])
    }
    catch {
      failed.value = true
    }
    waits.value = false
    if (!failed.value) await again()
  }
  onMounted(() => watch(() => reads.value.map(read => read.piece.id).join(','), () => void again(), { immediate: true }))
  const faces = computed(() => reads.value.flatMap(read => known.value.get(read.piece.id) ?? []))
  return { faces, failed, waits, again }
}
