import { roomVapour } from '#shared/vapour/room'
import type { RoomCase } from './read-room'

const iso = (at: number | null) => at === null ? null : new Date(at).toISOString()

/** Works one room out and writes it as the contract asks: instants in ISO 8601 UTC, concentrations without the mixing factor. */
export function runRoom({ room, coats, period }: RoomCase) {
  const { massGrams, peakMgM3, peakAt, mean8hMgM3, lelShare, neededM3PerHour, notClearBefore, band } = roomVapour(room, coats, period)
  return { massGrams, peakMgM3, peakAt: iso(peakAt), mean8hMgM3, lelShare, neededM3PerHour, notClearBefore: iso(notClearBefore), band }
}
