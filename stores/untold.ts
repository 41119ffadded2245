import { defineStore } from 'pinia'
import { FetchError } from 'ofetch'
import type { ActAnswer, ActRequest } from '#shared/schemas/act'
import { untoldShelves } from '#shared/untold-shelves'

const shelvesOf = (atBench: boolean) => untoldShelves[atBench ? 'bench' : 'own']
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

/** Lets jobs run one after the other, in the order in which they came. */
function makeTurns() {
  let last: Promise<unknown> = Promise.resolve()
  return <Answer>(job: () => Promise<Answer>): Promise<Answer> => {
    const mine = last.then(job)
    last = mine.catch(() => undefined)
    return mine
  }
}

/** Which way taps go: set by the page of a bench tablet, they go its way, under the name of whoever gave a PIN (null: the bench). */
function makeDoor() {
  const atBench = ref(false)
  const memberId = ref<number | null>(null)
  const path = computed(() => atBench.value ? '/api/bench/acts' : '/api/acts')
  return { atBench, memberId, path }
}

type Door = ReturnType<typeof makeDoor>

/** What this device keeps: acts that are not told yet, and those that were refused late. */
function makeShelf({ atBench }: Door) {
  const acts = ref<KeptAct[]>([])
  const refused = ref<RefusedAct[]>([])

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

  /** What waits and was tapped on a piece as it stood before the act that has just been told, follows on from that act. */
  function followOn(sent: KeptAct, { versions }: ActAnswer) {
    const seen = new Map(sent.pieces.map(({ id, version }) => [id, version]))
    const after = new Map(versions.map(({ id, version }) => [id, version]))
    acts.value = acts.value.map(act => ({ ...act, pieces: act.pieces.map(({ id, version }) => ({ id, version: seen.get(id) === version ? after.get(id) ?? version : version })) }))
  }

  function start() {
    const shelves = shelvesOf(atBench.value)
    acts.value = readShelf<KeptAct>(shelves.acts)
    refused.value = readShelf<RefusedAct>(shelves.refused)
  }

  return { acts, refused, keep, drop, dismiss, followOn, start }
}

/** Acts that this device has not been able to tell yet: nothing tapped is ever lost, not to a dead spot nor to a closed page. */
export const useUntoldStore = defineStore('untold', () => {
  const door = makeDoor()
  const { acts, refused, keep, drop, dismiss, followOn, start } = makeShelf(door)
  /** What became of acts that were told late: the studio's number of each, by client key. */
  const arrived = ref<Record<string, number>>({})
  const inTurn = makeTurns()
  /** Taps whose page waits for the answer. */
  const awaited = new Set<string>()
  let notReached = 0

  async function send(act: KeptAct): Promise<Told> {
    try {
      const answer = await callApi<ActAnswer>(door.path.value, { method: 'POST', body: act, timeout: answerMs })
      followOn(act, answer)
      drop(act.clientKey)
      return { outcome: 'told', actId: answer.actId }
    }
    catch (error) {
      const refusal = refusalOf(error)
      if (refusal) drop(act.clientKey)
      else notReached += 1
      return refusal ?? { outcome: 'later', clientKey: act.clientKey }
    }
  }

  /**
   * Tells what waits, in the order it was tapped; stops at the first that does not get through.
   * @param last the key to end at; null to tell all that no page waits for
   * @returns what came of the last, or null where it was not reached
   */
  async function tellUntil(last: string | null): Promise<Told | null> {
    for (const key of acts.value.map(each => each.clientKey)) {
      const act = acts.value.find(each => each.clientKey === key)
      if (!act) continue
      if (key !== last && awaited.has(key)) return null
      const told = await send(act)
      if (key === last) return told
      if (told.outcome === 'later') return null
      if (told.outcome === 'told') arrived.value = { ...arrived.value, [key]: told.actId }
      else refused.value = [...refused.value, { act, message: told.message }]
      keep()
    }
    return null
  }

  /** Tells one act after those that wait, keeping it on the device until the studio has answered. */
  async function tell(tapped: KeptAct): Promise<Told> {
    const act = door.atBench.value && tapped.memberId === undefined ? { ...tapped, memberId: door.memberId.value } : tapped
    acts.value = [...acts.value, act]
    keep()
    awaited.add(act.clientKey)
    const failures = notReached
    // Not reached while this one waited for its turn, the studio is not asked again for it now.
    const told = await inTurn(async () => failures < notReached ? null : tellUntil(act.clientKey))
    awaited.delete(act.clientKey)
    return told ?? { outcome: 'later', clientKey: act.clientKey }
  }

  let telling: Promise<unknown> | null = null
  const tellAll = () => telling ??= inTurn(() => tellUntil(null)).finally(() => { telling = null })

  return { acts, refused, arrived, atBench: door.atBench, memberId: door.memberId, path: door.path, tell, tellAll, drop, dismiss, start }
})
