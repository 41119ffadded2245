import { roomStates } from '~~/server/services/room-states'
import { listReadings } from '~~/server/services/readings'
import type { Database } from '~~/server/utils/database'
import { equilibriumMoisture } from '#shared/air/equilibrium'
import { dewPoint } from '#shared/air/psychrometrics'
import { driverRate } from '#shared/drying/rates'
import { filmDrivers } from '#shared/schemas/air'
import type { RoomAirState } from '#shared/schemas/air'

/** The climate most sheets give their times for, Celsius and a share. */
const sheetAir = { tempC: 20, rh: 0.5 }
/** Below this the published equation for wood does not speak. */
const coldestBoard = -5
const notesShown = 8

/** Every room's air at `now` (ms UTC), with what it means for films and for board. */
export function airNow(db: Database, studioId: number, now: number): RoomAirState[] {
  return roomStates(db, studioId, now).flatMap(({ id, name, outdoor, heated, air }) => {
    if (!air) return []
    const { tempC, rh, readAt, assumed } = air
    return [{
      roomId: id, name, outdoor, heated, tempC, rh, readAt, assumed,
      dewPointC: rh > 0 ? dewPoint(tempC, rh) : null,
      boardMoisture: tempC >= coldestBoard ? equilibriumMoisture(tempC, rh) : null,
      speeds: filmDrivers.map(driver => ({ driver, factor: driverRate(driver, { tempC, rh }, sheetAir) })),
      notes: listReadings(db, studioId, id, notesShown).map(({ doubt: _doubt, ...note }) => note),
    }]
  })
}
