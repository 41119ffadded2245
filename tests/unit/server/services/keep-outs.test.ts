import { describe, expect, it } from 'vitest'
import { act, keepOut, vapourStart } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { openRoom, shutAgain } from '~~/server/services/keep-outs'
import { pieceStates } from '~~/server/services/piece-states'
import { roomStates } from '~~/server/services/room-states'
import { hour, minute, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const iso = (at: number) => new Date(at).toISOString()

/** A maker puts lacquer on in the spray room: the room shuts, and the maker is the one named. */
function withShutRoom() {
  const studio = testStudio(now)
  const { db, studioId, members, places } = studio
  const started = startBatch(db, studioId, { member: members.maker }, { clientKey: 'start-one', name: 'Bodies', scheduleId: null, pieces: ['Body 1'], sizeUnits: 1, placeId: places.booth, order: null, startsAt: iso(now - hour), oldObject: false }, now)
  if (!started.ok) throw new Error(started.message)
  const pieces = pieceStates(db, studioId, started.pieceIds).map(({ id, version }) => ({ id, version }))
  const told = recordAct(db, studioId, { member: members.maker }, { clientKey: 'lacquer-1', kind: 'coat on', doneAt: iso(now - 10 * minute), pieces, body: { step: null, materialVersionId: studio.materialOf('nitrocellulose-lacquer') }, vapour: { exhaust: 'running', flamesOff: true, nobodyElse: true } }, now)
  if (!told.ok) throw new Error(told.message)
  return studio
}

describe('opening a room that was shut', () => {
  it('ends the keep-out with an act of the one who did it', () => {
    const { db, studioId, members, rooms } = withShutRoom()
    expect(roomStates(db, studioId, now).find(room => room.id === rooms.spray)?.keepOut).toMatchObject({ sinceAt: now - 10 * minute, opensBy: 'The maker', operatorId: members.maker.id })
    expect(openRoom(db, studioId, members.maker, rooms.spray, now)).toEqual({ ok: true })
    expect(roomStates(db, studioId, now).find(room => room.id === rooms.spray)?.keepOut).toBeNull()
    const opened = db.select().from(act).all().find(row => row.kind === 'room opened')
    expect(opened).toMatchObject({ memberId: members.maker.id, doneAt: now, body: { roomId: rooms.spray } })
    expect(db.select().from(keepOut).get()).toMatchObject({ openedAt: now, openedActId: opened?.id })
  })

  it('is refused to a helper, and leaves the room shut', () => {
    const { db, studioId, members, rooms } = withShutRoom()
    expect(openRoom(db, studioId, members.helper, rooms.spray, now)).toMatchObject({ ok: false, reason: 'not allowed' })
    expect(roomStates(db, studioId, now).find(room => room.id === rooms.spray)?.keepOut).not.toBeNull()
  })

  it('is for the one named or an owner, not for another maker', () => {
    const { db, studioId, members, rooms } = withShutRoom()
    const other = { ...members.maker, id: members.helper.id }
    expect(openRoom(db, studioId, other, rooms.spray, now)).toMatchObject({ ok: false, reason: 'not allowed', message: 'Spray room is opened by The maker or an owner. Ask first.' })
    expect(openRoom(db, studioId, members.owner, rooms.spray, now)).toEqual({ ok: true })
  })

  it('says so when it is open already, and knows no room of another studio', () => {
    const { db, studioId, members, rooms } = withShutRoom()
    openRoom(db, studioId, members.maker, rooms.spray, now)
    expect(openRoom(db, studioId, members.maker, rooms.spray, now)).toMatchObject({ ok: false, reason: 'conflict' })
    expect(openRoom(db, studioId + 1, members.owner, rooms.spray, now)).toMatchObject({ ok: false, reason: 'absent' })
  })
})

describe('taking an opening back', () => {
  it('shuts the room as if it had not been opened, by anybody, and keeps both acts', () => {
    const { db, studioId, members, rooms } = withShutRoom()
    openRoom(db, studioId, members.maker, rooms.spray, now)
    expect(db.select().from(vapourStart).get()?.endedAt).toBe(now)
    expect(shutAgain(db, studioId, members.helper, rooms.spray, now + minute)).toEqual({ ok: true })
    expect(db.select().from(vapourStart).get()?.endedAt).toBeNull()
    expect(roomStates(db, studioId, now + minute).find(room => room.id === rooms.spray)?.keepOut).toMatchObject({ sinceAt: now - 10 * minute, opensBy: 'The maker' })
    const opened = db.select().from(act).all().filter(row => row.kind === 'room opened')
    expect(opened.map(row => [row.memberId, row.voided])).toEqual([[members.maker.id, false], [members.helper.id, true]])
    expect(openRoom(db, studioId, members.maker, rooms.spray, now + 2 * minute)).toEqual({ ok: true })
  })

  it('is refused when nothing was opened in the last day, and in another studio', () => {
    const { db, studioId, members, rooms } = withShutRoom()
    expect(shutAgain(db, studioId, members.maker, rooms.spray, now)).toMatchObject({ ok: false, reason: 'conflict' })
    openRoom(db, studioId, members.maker, rooms.spray, now)
    expect(shutAgain(db, studioId, members.maker, rooms.spray, now + 25 * hour)).toMatchObject({ ok: false, reason: 'conflict' })
    expect(shutAgain(db, studioId + 1, members.owner, rooms.spray, now)).toMatchObject({ ok: false, reason: 'absent' })
  })
})
