import { eq } from 'drizzle-orm'
import { room } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { adviceNow } from '~~/server/services/advice/now'
import { startBatch } from '~~/server/services/batches'
import { pieceStates } from '~~/server/services/piece-states'
import { addReading } from '~~/server/services/readings'
import { librarySchedules } from '#shared/library/index'
import type { ActRequest } from '#shared/schemas/act'
import { hour, testStudio } from './studio'

/** The instant at which the studio of these tests begins, ms UTC. */
export const now = Date.parse('2026-04-07T10:00:00Z')
export const day = 24 * hour
const iso = (at: number) => new Date(at).toISOString()
let keys = 0

/** A studio whose work is told in few words. */
export function atWork() {
  const studio = testStudio(now)
  const { db, studioId, members } = studio
  return {
    ...studio,
    read: (tempC: number, rh: number, at = now - hour, roomId = studio.rooms.bench) => addReading(db, studioId, members.maker.id, roomId, { clientKey: `kinds-air-${++keys}`, at: iso(at), tempC, rh, words: null, same: false }, at),
    /** No heating, and nights colder by so much. */
    unheated: (nightDropC: number) => db.update(room).set({ heated: false, nightDropC }).where(eq(room.id, studio.rooms.bench)).run(),
    start(key: string, at = now, placeId = studio.places.shelf): number[] {
      const started = startBatch(db, studioId, { member: members.maker }, { clientKey: `kinds-start-${++keys}`, name: 'Batch', scheduleId: studio.scheduleOf(key), pieces: ['Piece 1'], sizeUnits: 1, placeId, order: null, startsAt: iso(at), oldObject: false }, at)
      if (!started.ok) throw new Error(started.message)
      return started.pieceIds
    },
    tell(kind: ActRequest['kind'], pieceIds: number[], body: ActRequest['body'], at = now) {
      const pieces = pieceStates(db, studioId, pieceIds).map(({ id, version }) => ({ id, version }))
      const told = recordAct(db, studioId, { member: members.maker }, { clientKey: `kinds-act-${++keys}`, kind, doneAt: iso(at), pieces, body, vapour: { exhaust: 'running', flamesOff: true, nobodyElse: true } }, at)
      if (!told.ok) throw new Error(told.message)
    },
    /** Leaves out every step of a schedule but these, so that they are next. */
    leaveAllBut(key: string, pieceIds: number[], kept: string[], at = now) {
      for (const step of librarySchedules.find(each => each.key === key)!.steps) if (!kept.includes(step.key)) this.tell('left out', pieceIds, { step: step.key }, at)
    },
    line: (code: string, at = now) => adviceNow(db, studioId, null, at).find(each => each.code === code),
  }
}
export type Work = ReturnType<typeof atWork>

/** A coat of a library material on a piece of any schedule, told at `at`. */
export function coated(studio: Work, key: string, at = now, over: ActRequest['body'] = {}, kind: 'coat on' | 'glue-up on' = 'coat on') {
  const ids = studio.start('painted-waxed-box', at)
  studio.tell(kind, ids, { step: null, materialVersionId: studio.materialOf(key), ...over }, at)
  return ids
}
