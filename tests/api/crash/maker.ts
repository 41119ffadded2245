import type { Visitor } from '../../helpers/sign-in'
import { roomOf } from '../access/rows'

const minute = 60_000

/** What the server said it has: by the name or the key it was told under. */
export interface Told { rooms: string[], readings: string[], acts: string[] }

/** Null when the server went away before it answered: then nothing was acknowledged. */
async function post<T>(owner: Visitor, path: string, body: unknown): Promise<T | null> {
  const answer = await owner.post<T>(path, body).catch((error: unknown) => {
    // The kill itself, or a connection kept from the last life.
    if (error instanceof TypeError) return null
    throw error
  })
  if (answer && answer.status !== 200) throw new Error(`${path} was answered with ${answer.status}: ${JSON.stringify(answer.body)}`)
  return answer?.body ?? null
}

/** Makes rooms and notes their air, one after another, until the server is gone. */
export async function keepWriting(owner: Visitor, round: number, told: Told) {
  for (let number = 0; ; number += 1) {
    const name = `Told ${round}-${number}`
    const room = await post<{ id: number }>(owner, '/api/rooms', { ...roomOf(name) })
    if (!room) return
    told.rooms.push(name)
    const clientKey = `reading-${round}-${number}`
    const noted = await post(owner, `/api/rooms/${room.id}/readings`, { clientKey, at: new Date(Date.now() - minute).toISOString(), tempC: 19, rh: 0.5, words: null })
    if (!noted) return
    told.readings.push(clientKey)
  }
}

/** Where one batch lies alone: its last moment does not depend on the others'. */
export interface Bench { placeId: number, scheduleId: number }

/** A resin tray whose seal has been tacky for so long that the flood coat must go on within half an hour. */
const sealedMs = 320 * minute

/**
 * Starts the batch of one round and tells its first coat, under keys that stay the same: it can be told again after
 * a kill and must not be recorded twice.
 * @returns whether both were acknowledged
 */
export async function tellBatch(owner: Visitor, number: number, { placeId, scheduleId }: Bench, told: Told): Promise<boolean> {
  const startKey = `tray-start-${number}`
  const startsAt = new Date(Date.now() - 2 * sealedMs).toISOString()
  const started = await post<{ pieceIds: number[] }>(owner, '/api/batches', { clientKey: startKey, name: `Trays ${number}`, scheduleId, pieces: ['Tray'], placeId, order: null, startsAt })
  if (!started) return false
  if (!told.acts.includes(startKey)) told.acts.push(startKey)
  const coatKey = `tray-coat-${number}`
  const pieces = await Promise.all(started.pieceIds.map(async (id) => {
    const detail = await owner.get<{ version: number }>(`/api/pieces/${id}`).catch(() => null)
    return detail && { id, version: detail.body.version }
  }))
  if (pieces.includes(null)) return false
  const coat = await post(owner, '/api/acts', { clientKey: coatKey, kind: 'coat on', doneAt: new Date(Date.now() - sealedMs).toISOString(), pieces, body: { step: 'seal' } })
  if (!coat) return false
  if (!told.acts.includes(coatKey)) told.acts.push(coatKey)
  return true
}
