import type { studio } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { dryingMaterials, preparedMaterials } from '~~/server/work/materials'
import { sheetFigures } from '~~/server/work/sheet-figures'
import { airAt } from '#shared/air/room'
import { potLifeAt } from '#shared/drying/pot-life'
import { trackRoom } from '#shared/drying/tools'
import type { Air, RoomAir } from '#shared/drying/types'

/** How long a mixed quantity lasts, minutes: usually, and at the least. `tempC`: the warmth it was reckoned for, null where nobody read it and the sheet's stands. */
export interface Pot { minutes: number, least: number, sheetMinutes: number, tempC: number | null }

/** The air of a room at an instant (ms UTC) as its readings tell it; null where nobody read it, or read what hands do not work in (-20..60 °C). */
export function airRead(airs: ReadonlyMap<number, RoomAir>, roomId: number | null, at: number): Air | null {
  const known = airs.get(roomId ?? 0)
  const air = known && airAt(trackRoom(preparedMaterials.tools, known, at), at)
  return air && !air.assumed && air.tempC >= -20 && air.tempC <= 60 ? air : null
}

/** How long what is mixed of some material editions at an instant (ms UTC) lasts in the rooms of a studio; null for what does not go off in its pot. */
export function potsOf(db: Database, owner: typeof studio.$inferSelect, versionIds: readonly number[], airs: ReadonlyMap<number, RoomAir>) {
  const figures = sheetFigures(db, owner.id, versionIds, 'pot life')
  const sheets = dryingMaterials(db, owner.id, [...figures.keys()])
  return (versionId: number | null, roomId: number | null, at: number): Pot | null => {
    const [figure, sheet] = [figures.get(versionId ?? 0), sheets.get(versionId ?? 0)]
    if (!figure || !sheet) return null
    const tempC = airRead(airs, roomId, at)?.tempC ?? null
    const here = (minutes: number) => tempC === null ? minutes : potLifeAt(minutes, sheet.reference.tempC, tempC)
    return { minutes: here(figure.typical), least: here(figure.least), sheetMinutes: figure.typical, tempC }
  }
}

/** How many pieces one mix is enough for; null where it lasts no single one, so that mixing anew is part of its minutes. */
export function piecesOfMix(pot: Pot, pieceMinutes: number): number | null {
  return pieceMinutes > 0 && pot.least >= pieceMinutes ? Math.floor(pot.least / pieceMinutes) : null
}
