import type { studio } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { dryingMaterials } from '~~/server/work/materials'
import { airRead } from '~~/server/work/pots'
import { sheetFigures } from '~~/server/work/sheet-figures'
import { openDriver, openTimeAt } from '#shared/drying/open-time'
import type { RoomAir } from '#shared/drying/types'

/** So many degrees over its minimum temperature glue can be taken somewhere cooler, planning value. */
const coolerC = 3

/** How long glue stays open at the least, minutes; `joined`: how long a joint may be moved after that till it is clamped, 0 where its sheet says nothing of it. `room`: where it would stay open longer, null where nobody read the air or it is near the glue's minimum temperature. */
export interface OpenTime { least: number, joined: number, room: 'cooler' | 'warmer' | null }

/** How long glues of some editions stay open at an instant (ms UTC) once spread in the rooms of a studio; null where their sheets say nothing of it. */
export function openTimesOf(db: Database, owner: typeof studio.$inferSelect, versionIds: readonly number[], airs: ReadonlyMap<number, RoomAir>) {
  const figures = sheetFigures(db, owner.id, versionIds, 'open time')
  const closed = sheetFigures(db, owner.id, versionIds, 'closed assembly')
  const sheets = dryingMaterials(db, owner.id, [...figures.keys()])
  return (versionId: number | null, roomId: number | null, at: number): OpenTime | null => {
    const [figure, sheet] = [figures.get(versionId ?? 0), sheets.get(versionId ?? 0)]
    if (!figure || !sheet) return null
    const { least } = figure
    const joined = closed.get(versionId ?? 0)?.least ?? 0
    const air = airRead(airs, roomId, at)
    if (air === null) return { least, joined, room: null }
    // Air is read through tables: past a hundredth of a minute there is nothing but their rounding.
    const here = (minutes: number) => minutes > 0 ? Math.round(openTimeAt(minutes, sheet, air) * 100) / 100 : 0
    // Hot glue stays open until it gels, and that comes sooner in the cold.
    const gels = openDriver(sheet, least) === 'gel'
    const nearMinimum = sheet.minTempC !== null && air.tempC < sheet.minTempC + coolerC
    return { least: here(least), joined: here(joined), room: gels ? 'warmer' : nearMinimum ? null : 'cooler' }
  }
}
