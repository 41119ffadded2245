import { defineStore } from 'pinia'
import { FetchError } from 'ofetch'
import type { ActRequest } from '#shared/schemas/act'

/** A person's taps and a bench tablet's lie apart on a device that is both. */
const shelvesOf = (atBench: boolean) => atBench ? { acts: 'stillwet untold at the bench', refused: 'stillwet refused at the bench' } : { acts: 'stillwet untold', refused: 'stillwet refused' }
/** An act without an answer for so long counts as not told yet: telling it twice under its key records it once. ms. */
const answerMs = 15_000

/** A tap; at a bench tablet with the member it was pressed as, or null for the bench. */
export type KeptAct = ActRequest & { memberId?: number | null }

/** A tap that the studio refused when it came through late, with its sentence. */
export interface RefusedAct { act: KeptAct, message: string }

/** What came of telling an act. `later`: not reached; it is kept on this device and told as soon as it can be. */
export type Told =
  | { outcome: 'told', actId: number }
  | { outcome: 'later', clientKey: string }
  | { outcome: 'refused', message: string, fields: Record<string, string>, current: unknown }

function readShelf<Kept>(shelf: string): Kept[] {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(shelf) ?? '[]')
    return Array.isArray(kept) ? kept as Kept[] : []
  }
  catch {
    return []
  }
}

/** The refusal that came with an answer, or null when there was no answer of ours. */
function refusalOf(error: unknown): Extract<Told, { outcome: 'refused' }> | null {
  if (!(error instanceof FetchError) || error.statusCode === undefined || error.statusCode >= 500) return null
  const { message, fields, current } = (error.data?.data ?? {}) as { message?: string, fields?: Record<string, string>, current?: unknown }
  return { outcome: 'refused', message: message ?? error.message, fields: fields ?? {}, current: current ?? null }
}

/** Which way taps go: set by the page of a bench tablet, they go its way, under the name of whoever gave a PIN (null: the bench). */
function makeDoor() {
  const atBench = ref(false)
  const memberId = ref<number | null>(null)
  const path = computed(() => atBench.value ? '/api/bench/acts' : '/api/acts')
  return { atBench, memberId, path }
}

/** Acts that this device has not been able to tell yet: nothing tapped is ever lost, not to a dead spot nor to a closed page. */
export const useUntoldStore = defineStore('untold', () => {
  const acts = ref<KeptAct[]>([])
  const refused = ref<RefusedAct[]>([])
  /** What became of acts that were told late: the studio's number of each, by client key. */
  const arrived = ref<Record<string, number>>({})

  const { atBench, memberId, path } = makeDoor()

  function keep() {
    const shelves = shelvesOf(atBench.value)
    localStorage.setItem(shelves.acts, JSON.stringify(acts.value))
    localStorage.setItem(shelves.refused, JSON.stringify(refused.value))
  }

  /** Takes a tap that is not told yet off the device. */
  function drop(clientKey: string) {
    acts.value = acts.value.filter(each => each.clientKey !== clientKey)
    keep()
  }

  /** Puts a late refusal away once somebody has read it. */
  function dismiss(clientKey: string) {
    refused.value = refused.value.filter(each => each.act.clientKey !== clientKey)
    keep()
  }

  /** Tells one act, keeping it on the device until the studio has answered. */
  async function tell(tapped: KeptAct): Promise<Told> {
    const act = atBench.value && tapped.memberId === undefined ? { ...tapped, memberId: memberId.value } : tapped
    if (!acts.value.some(each => each.clientKey === act.clientKey)) acts.value = [...acts.value, act]
    keep()
    try {
      const { actId } = await callApi<{ actId: number }>(path.value, { method: 'POST', body: act, timeout: answerMs })
      drop(act.clientKey)
      return { outcome: 'told', actId }
    }
    catch (error) {
      const refusal = refusalOf(error)
      if (!refusal) return { outcome: 'later', clientKey: act.clientKey }
      drop(act.clientKey)
      return refusal
    }
  }

  /** Tells what waits, in the order it was tapped; stops at the first that does not get through. */
  async function tellAll() {
    for (const act of [...acts.value]) {
      const told = await tell(act)
      if (told.outcome === 'later') return
      if (told.outcome === 'told') arrived.value = { ...arrived.value, [act.clientKey]: told.actId }
      else refused.value = [...refused.value, { act, message: told.message }]
    }
    keep()
  }

  function start() {
    const shelves = shelvesOf(atBench.value)
    acts.value = readShelf<KeptAct>(shelves.acts)
    refused.value = readShelf<RefusedAct>(shelves.refused)
  }

  return { acts, refused, arrived, atBench, memberId, path, tell, tellAll, drop, dismiss, start }
})
