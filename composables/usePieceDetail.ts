import type { PieceDetail } from '#shared/schemas/piece-detail'
import { fromWire } from '#shared/schemas/wire'
import type { Wire } from '#shared/schemas/wire'

/** All that was and is to come of one piece, read anew whenever anything in the studio has changed. */
export async function usePieceDetail(id: string) {
  const ask = useRequestFetch()
  const store = useStudioStore()
  const asked = useAsyncData(`piece ${id}`, async () => fromWire<PieceDetail>(await ask<Wire<PieceDetail>>(`/api/pieces/${encodeURIComponent(id)}`)))
  const { data, error, refresh } = asked
  // Registered before the wait: after it the page's own scope is gone.
  watch(() => store.state?.revision, (now, before) => {
    if (now !== before) void refresh()
  })
  watch(() => store.heardAt, () => {
    if (error.value) void refresh()
  })
  await asked
  return { detail: computed(() => data.value ?? null), failed: computed(() => error.value !== null && error.value !== undefined), missing: computed(() => error.value?.statusCode === 404), refresh }
}
