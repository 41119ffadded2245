import { openHours } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { pieceStates } from '~~/server/services/piece-states'
import { hour, testStudio } from './studio'

let keys = 0

/** A studio open from 8:30 on working days, with one batch on Shelf A that is due in ten days. `tell` says that work was done, `batch` starts another. */
export function plannedStudio(now: number, schedule: string, count: number, shutsMin = 17 * 60 + 30) {
  const studio = testStudio(now)
  for (let weekday = 1; weekday <= 5; weekday++) studio.db.insert(openHours).values({ studioId: studio.studioId, weekday, fromMin: 8 * 60 + 30, toMin: shutsMin }).run()
  const batch = (name: string, size: number, key: string = schedule, at = now) => {
    const started = startBatch(studio.db, studio.studioId, { member: studio.members.maker }, {
      clientKey: `start-${++keys}`, name: `${name}s`, scheduleId: studio.scheduleOf(key), pieces: Array.from({ length: size }, (_, i) => `${name} ${i + 1}`), sizeUnits: 1,
      placeId: studio.places.shelf, order: { name: `${name} order`, dueAt: new Date(now + 10 * 24 * hour).toISOString() }, startsAt: new Date(at).toISOString(), oldObject: false,
    }, at)
    if (!started.ok) throw new Error(started.message)
    return started.pieceIds
  }
  const tell = (kind: 'work done' | 'coat on' | 'began', at: number, step: string, pieceIds: readonly number[]) => {
    const pieces = pieceStates(studio.db, studio.studioId, pieceIds).map(({ id, version }) => ({ id, version }))
    const told = recordAct(studio.db, studio.studioId, { member: studio.members.maker }, { clientKey: `told-${++keys}`, kind, doneAt: new Date(at).toISOString(), pieces, body: { step } }, at)
    if (!told.ok) throw new Error(told.message)
  }
  return { ...studio, pieceIds: batch('Box', count), batch, tell }
}
