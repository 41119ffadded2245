import { describe, expect, it } from 'vitest'
import { reading } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { pieceStates } from '~~/server/services/piece-states'
import { clockTime, studioZone } from '#shared/time'
import { hour, testStudio } from '../../helpers/studio'

/** A heated room held at one climate, a coat at `appliedAt`, and when it is likely dry to handle: elapsed and on the wall. */
function likelyHandled(zoneName: string, appliedAt: number) {
  const studio = testStudio(appliedAt - hour, zoneName)
  const { db, studioId } = studio
  for (let day = -4; day <= 0; day++) db.insert(reading).values({ studioId, roomId: studio.rooms.bench, at: appliedAt + day * 24 * hour, toldAt: appliedAt, tempC: 20, rh: 0.5, source: 'note' }).run()
  const started = startBatch(db, studioId, { member: studio.members.maker }, { clientKey: 'start-one', name: 'Bowls', scheduleId: null, pieces: ['Bowl 1'], sizeUnits: 1, placeId: studio.places.shelf, order: null, startsAt: new Date(appliedAt).toISOString(), oldObject: false }, appliedAt)
  if (!started.ok) throw new Error(started.message)
  const [piece] = pieceStates(db, studioId, started.pieceIds)
  if (!piece) throw new Error('no piece')
  const told = recordAct(db, studioId, { member: studio.members.maker }, { clientKey: 'coat-on-1', kind: 'coat on', doneAt: new Date(appliedAt).toISOString(), pieces: [{ id: piece.id, version: piece.version }], body: { step: null, materialVersionId: studio.materialOf('wiping-varnish') }, vapour: { exhaust: 'none', flamesOff: true, nobodyElse: true } }, appliedAt)
  if (!told.ok) throw new Error(told.message)
  const rung = pieceStates(db, studioId, started.pieceIds)[0]?.groups[0]?.films[0]?.milestones.find(each => each.name === 'dry-to-handle')
  const likelyAt = rung?.likelyAt ?? 0
  const zone = studioZone(zoneName)
  return { elapsed: likelyAt - appliedAt, wall: clockTime(likelyAt, { now: likelyAt, zone }), expectedWall: (shift: number) => wallAfter(appliedAt, likelyAt - appliedAt, shift, zoneName) }
}

/** The wall clock at application plus the hours that pass plus the hour that the clock jumps, worked out by hand. */
function wallAfter(appliedAt: number, elapsed: number, shift: number, zoneName: string): string {
  const parts = new Intl.DateTimeFormat('en-GB', { timeZone: zoneName, hour: '2-digit', minute: '2-digit', hourCycle: 'h23' }).format(appliedAt).split(':').map(Number)
  const minutes = ((parts[0] ?? 0) * 60 + (parts[1] ?? 0) + Math.floor(elapsed / 60_000) + shift) % 1440
  return `${Math.floor(minutes / 60)}:${String(minutes % 60).padStart(2, '0')}`
}

// Europe/Berlin goes from 02:00 to 03:00 on 29 March 2026; Australia/Sydney from 02:00 to 03:00 on 4 October 2026 (IANA tz database).
describe.each([
  ['Europe/Berlin', '2026-03-28T21:00:00Z', '2026-03-21T21:00:00Z'],
  ['Australia/Sydney', '2026-10-03T11:00:00Z', '2026-09-26T11:00:00Z'],
])('a coat put on in %s the evening before the spring change', (zone, evening, weekBefore) => {
  it('dries in as many hours as a week earlier and shows an hour more on the wall', () => {
    const over = likelyHandled(zone, Date.parse(evening))
    const plain = likelyHandled(zone, Date.parse(weekBefore))
    expect(over.elapsed).toBeGreaterThan(6 * hour)
    expect(Math.abs(over.elapsed - plain.elapsed)).toBeLessThan(60_000)
    expect(plain.wall).toBe(plain.expectedWall(0))
    expect(over.wall).toBe(over.expectedWall(60))
  })
})
