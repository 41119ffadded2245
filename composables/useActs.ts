import type { ActRequest, TellableKind, VapourAnswers } from '#shared/schemas/act'
import type { PieceState } from '#shared/schemas/piece-state'
import type { Door } from '~/stores/studio'
import type { Told } from '~/stores/untold'

/** A fresh key for one tap. `randomUUID` is not there over plain http in a studio's network. */
export const newClientKey = () => Array.from(crypto.getRandomValues(new Uint8Array(16)), byte => byte.toString(16).padStart(2, '0')).join('')

/**
 * Telling acts from a page: one tap, one request, told again under the same key until the studio has answered.
 * After an answer the state is loaded at once, without waiting for the live stream.
 */
export function useActs() {
  const untold = useUntoldStore()
  const studio = useStudioStore()
  const door = (): Door => (untold.atBench ? { bench: '1' } : {})
  const busy = ref(false)
  const last = shallowRef<Told | null>(null)

  /**
   * Tells what was done.
   * @param pieces as they were on the page: their versions go along, so that a newer act of somebody else wins
   * @param doneAt ms UTC by this page's clock
   */
  async function tell(kind: TellableKind, pieces: readonly Pick<PieceState, 'id' | 'version'>[], body: ActRequest['body'], doneAt: number, partIds?: number[], vapour?: VapourAnswers): Promise<Told> {
    busy.value = true
    try {
      const act: ActRequest = { clientKey: newClientKey(), kind, doneAt: new Date(doneAt).toISOString(), pieces: pieces.map(({ id, version }) => ({ id, version })), body, ...partIds ? { partIds } : {}, ...vapour ? { vapour } : {} }
      last.value = await untold.tell(act)
      if (last.value.outcome !== 'later') await studio.load(door())
      return last.value
    }
    finally {
      busy.value = false
    }
  }

  /**
   * Takes an act back, or moves it in time: `{ takeBack: true }` or `{ doneAt }`.
   * @returns the act that now stands for it: the next correction is one of that
   */
  async function correct(actId: number, change: { doneAt?: number, takeBack?: boolean, pieces?: number[] }): Promise<number> {
    const body = { clientKey: newClientKey(), ...change, ...change.doneAt === undefined ? {} : { doneAt: new Date(change.doneAt).toISOString() } }
    const answer = await callApi<{ actId: number }>(`${untold.path}/${actId}/correct`, { method: 'POST', body })
    await studio.load(door())
    return answer.actId
  }

  return { tell, correct, busy, last }
}
