import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { keepOut, part, ragDuty } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { pieceStates } from '~~/server/services/piece-states'
import type { ActRequest } from '#shared/schemas/act'
import { minute, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const iso = (at: number) => new Date(at).toISOString()

/** One instrument: its neck on a shelf of the bench room, its body in the booth of the spray room. */
function apart() {
  const studio = testStudio(now)
  const teller = { member: studio.members.maker }
  const started = startBatch(studio.db, studio.studioId, teller, {
    clientKey: 'start-one', name: 'Body', scheduleId: studio.scheduleOf('lacquered-instrument'), pieces: ['Body 1'], sizeUnits: 1, placeId: studio.places.shelf, order: null, startsAt: iso(now - 60 * minute), oldObject: false,
  }, now)
  if (!started.ok) throw new Error(started.message)
  const tell = (kind: ActRequest['kind'], at: number, body: ActRequest['body'], partIds?: number[]) => {
    const pieces = pieceStates(studio.db, studio.studioId, started.pieceIds).map(({ id, version }) => ({ id, version }))
    const told = recordAct(studio.db, studio.studioId, teller, { clientKey: `key-${at}`, kind, doneAt: iso(at), pieces, body, vapour: { exhaust: 'running', flamesOff: true, nobodyElse: true }, ...(partIds ? { partIds } : {}) }, now)
    if (!told.ok) throw new Error(told.message)
  }
  const body = studio.db.select().from(part).where(eq(part.key, 'body')).all().map(row => row.id)
  tell('moved', now - 50 * minute, { placeId: studio.places.booth }, body)
  const shut = () => studio.db.select().from(keepOut).all().map(row => row.roomId)
  const rags = () => studio.db.select().from(ragDuty).all().map(row => row.roomId)
  return { ...studio, tell, shut, rags }
}

describe('what a coat leaves behind', () => {
  it('asks for rags where the oiled part stands, and nowhere else', () => {
    const { tell, rags, shut, rooms } = apart()
    tell('coat on', now - 40 * minute, { step: 'oil-neck' })
    expect(rags()).toEqual([rooms.bench])
    expect(shut()).toEqual([])
  })

  it('shuts the spray room for a solvent film on a part that stands there', () => {
    const { tell, rags, shut, rooms } = apart()
    tell('coat on', now - 30 * minute, { step: 'round-1' })
    expect(shut()).toEqual([rooms.spray])
    expect(rags()).toEqual([])
  })
})
