import { describe, expect, it } from 'vitest'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { pieceStates } from '~~/server/services/piece-states'
import { placeStates, roomStates } from '~~/server/services/room-states'
import { manyActs } from '#shared/many-acts'
import { readPiece } from '#shared/verdict/piece'
import { clockAt } from '../helpers/board'
import { hour, minute, testStudio } from '../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const iso = (at: number) => new Date(at).toISOString()
let keys = 0

function withBatches() {
  const studio = testStudio(now)
  const { db, studioId, members, places } = studio
  const start = (schedule: string | null, pieces: string[]) => {
    const started = startBatch(db, studioId, { member: members.maker }, { clientKey: `many-acts-${keys += 1}`, name: pieces[0] ?? '', scheduleId: schedule === null ? null : studio.scheduleOf(schedule), pieces, sizeUnits: 1, placeId: places.shelf, order: null, startsAt: iso(now - 2 * hour), oldObject: false }, now)
    if (!started.ok) throw new Error(started.message)
    return started.pieceIds
  }
  const read = (ids: readonly number[]) => {
    const where = { rooms: roomStates(db, studioId, now), places: placeStates(db, studioId) }
    return pieceStates(db, studioId, ids).map(piece => readPiece(piece, where, now, null))
  }
  const putOn = (ids: readonly number[], at: number) => recordAct(db, studioId, { member: members.maker }, { clientKey: `many-acts-${keys += 1}`, kind: 'coat on', doneAt: iso(at), pieces: pieceStates(db, studioId, ids).map(({ id, version }) => ({ id, version })), body: { step: null, materialVersionId: studio.materialOf('acrylic-varnish'), name: 'Varnish' } }, now)
  return { bowls: start('oiled-bowl', ['Bowl 1', 'Bowl 2']), plain: start(null, ['Sample 1', 'Sample 2']), boxes: start('painted-waxed-box', ['Box 1']), read, putOn }
}
const acts = (reads: Parameters<typeof manyActs>[0]) => manyActs(reads, clockAt(now), null)

describe('what many pieces are told of at once', () => {
  it('is one act for all whose next step is the same, and one for each other step', () => {
    const { bowls, boxes, read } = withBatches()
    const { aside } = acts(read([...bowls, ...boxes]))
    // Of a bowl one step waits; of a box the glue-up and the lid's first coat: three steps by three keys.
    expect(aside.map(part => part.pieceIds.length)).toEqual(expect.arrayContaining([2, 1, 1]))
    expect(new Set(aside.map(part => part.body.step)).size).toBe(aside.length)
  })

  it('offers a coat only where one may begin on every piece', () => {
    const { boxes, plain, read } = withBatches()
    expect(acts(read(boxes)).coat).toEqual([{ kind: 'coat on', body: { step: 'lid-1' }, pieceIds: boxes, step: 'First paint on the lid top' }])
    expect(acts(read([...boxes, ...plain])).coat).toBeNull()
    expect(acts([]).coat).toBeNull()
  })

  it('tests for dry to handle where a film dries and no step asks for more', () => {
    const { plain, read, putOn } = withBatches()
    expect(acts(read(plain)).dry).toEqual([])
    expect(putOn(plain, now - 10 * minute)).toMatchObject({ ok: true })
    expect(acts(read(plain)).dry).toMatchObject([{ kind: 'touch test', body: { milestone: 'dry-to-handle', reached: true }, pieceIds: plain }])
    expect(acts(read(plain)).tacky).toMatchObject([{ body: { milestone: 'dry-to-handle', reached: false } }])
  })
})
