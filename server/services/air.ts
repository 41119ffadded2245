import { roomStates } from '~~/server/services/room-states'
import { listImports } from '~~/server/services/reading-imports'
import { listReadings } from '~~/server/services/readings'
import type { Database } from '~~/server/utils/database'
import { boardMoisture, sheetAir, toldDewPoint } from '#shared/air-course'
import { driverRate } from '#shared/drying/rates'
import { filmDrivers } from '#shared/schemas/air'
import type { RoomAirState } from '#shared/schemas/air'

const notesShown = 8

/** Every room's air at `now` (ms UTC), with what it means for films and for board. */
export function airNow(db: Database, studioId: number, now: number): RoomAirState[] {
  return roomStates(db, studioId, now).flatMap(({ id, name, outdoor, heated, air }) => {
    if (!air) return []
    const { tempC, rh, readAt, assumed } = air
    return [{
      roomId: id, name, outdoor, heated, tempC, rh, readAt, assumed,
      dewPointC: toldDewPoint({ tempC, rh }),
      boardMoisture: boardMoisture({ tempC, rh }),
      speeds: filmDrivers.map(driver => ({ driver, factor: driverRate(driver, { tempC, rh }, sheetAir) })),
      notes: listReadings(db, studioId, id, notesShown, now, 'told').map(({ doubt: _doubt, ...note }) => note),
      last: listReadings(db, studioId, id, 1, now).map(({ doubt: _doubt, ...note }) => note)[0] ?? null,
      imports: listImports(db, studioId, id),
    }]
  })
}
