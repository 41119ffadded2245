import type { ManyPart } from '#shared/many-acts'
import type { ActRequest, TellableKind } from '#shared/schemas/act'
import type { ActDetail } from '#shared/words/steps'

/** Telling of many pieces at once. What was told is chosen no more; what was refused stays chosen, with its sentence. */
export function useManyActs(telling: ReturnType<typeof provideTelling>, chosen: ReturnType<typeof useChosenPieces>) {
  const { studio, told, sayAll } = telling
  const busy = ref(false)
  const idsNow = () => chosen.chosen.value.map(read => read.piece.id)

  async function tellParts(parts: readonly ManyPart[], detail: ActDetail = {}): Promise<boolean> {
    if (busy.value || parts.length === 0) return false
    busy.value = true
    try {
      const before = told.lines.at(-1)?.key ?? 0
      await sayAll(parts, studio.now.value, detail)
      const failed = told.lines.filter(line => line.key > before && line.state === 'refused')
      if (failed.length === 0) chosen.clear()
      return failed.length === 0
    }
    finally {
      busy.value = false
    }
  }
  const one = (kind: TellableKind, body: ActRequest['body'], detail: ActDetail = {}) => tellParts([{ kind, body, pieceIds: idsNow(), step: null }], detail)
  const acts = () => chosen.acts.value

  return {
    busy,
    move: (placeId: number, place: string) => one('moved', { placeId }, { place }),
    coat: () => tellParts(acts().coat ?? []),
    test: (reached: boolean) => tellParts(reached ? acts().dry : acts().tacky),
    aside: (reason: string) => tellParts(acts().aside.map(part => ({ ...part, body: { ...part.body, reason } }))),
    resume: () => tellParts(acts().resume),
    gone: (how: NonNullable<ActDetail['gone']>) => one('gone', { how }, { gone: how }),
    regroup: (into: { batchId: number } | { name: string }, batch: string) => one('regrouped', into, { batch }),
    cancel: (reason: string) => one('cancelled', reason === '' ? {} : { reason }),
  }
}
