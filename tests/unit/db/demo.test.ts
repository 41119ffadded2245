import { beforeAll, describe, expect, it } from 'vitest'
import { seedDemo } from '~~/db/seed/demo'
import { pieceStates } from '~~/server/services/piece-states'
import { placeStates, roomStates } from '~~/server/services/room-states'
import { listRags } from '~~/server/services/rags'
import type { Database } from '~~/server/utils/database'
import { readPiece } from '#shared/verdict/piece'
import type { ReadPiece } from '#shared/verdict/piece'
import { testDatabase } from '../../helpers/database'

const moments = [
  ['a Monday morning', '2026-03-02T10:00:00Z', 'UTC'],
  ['a Saturday afternoon', '2026-03-07T14:00:00Z', 'UTC'],
  ['a Wednesday night', '2026-03-04T02:00:00Z', 'UTC'],
  // Clocks went back there at 3:00 on 5 April 2026; it is 8:30 on the 6th.
  ['the morning after a clock change in the south', '2026-04-05T22:30:00Z', 'Australia/Hobart'],
] as const

const minutes = 60_000

async function openStudio(at: string, zone: string) {
  const db = testDatabase() as Database
  const now = Date.parse(at)
  const { studioId } = await seedDemo(db, now, zone)
  const where = { rooms: roomStates(db, studioId, now), places: placeStates(db, studioId) }
  const pieces = pieceStates(db, studioId, null).map(piece => readPiece(piece, where, now, null))
  return { db, now, studioId, where, pieces }
}

const named = (pieces: readonly ReadPiece[], name: string) => pieces.filter(each => each.piece.name.startsWith(name))
const turnOf = (read: ReadPiece, step: string) => read.turns.find(each => each.turn.step.key === step && each.turn.kind === 'work')
const verdictOf = (read: ReadPiece, part: string) => read.groups.find(each => each.group.parts.some(one => one.key === part))?.verdict

describe.each(moments)('the demo studio, made on %s', (_, at, zone) => {
  let demo: Awaited<ReturnType<typeof openStudio>>
  beforeAll(async () => {
    demo = await openStudio(at, zone)
  }, 120_000)

  it('has a window about to shut, for want of a second varnish', () => {
    const books = named(demo.pieces, 'Almanac').map(each => turnOf(each, 'varnish-2'))
    const frames = named(demo.pieces, 'Skylight').map(each => turnOf(each, 'oil-3'))
    const shutting = [...books, ...frames].filter(each => each?.begin.may === true && each.begin.till !== null && each.begin.till - demo.now < 110 * minutes)
    expect(shutting.length).toBeGreaterThanOrEqual(3)
  })

  it('holds five boxes in clamps', () => {
    const boxes = named(demo.pieces, 'Hollow box')
    expect(boxes).toHaveLength(5)
    for (const box of boxes) expect(verdictOf(box, 'box')).toMatchObject({ kind: 'hands off', reason: { code: 'held', hold: 'clamps' } })
  })

  it('keeps everybody out of the spray room until somebody named opens it', () => {
    expect(demo.where.rooms.find(room => room.sprayArea)?.keepOut?.opensBy).toBe('Isaura')
    for (const lute of named(demo.pieces, 'Reed lute')) expect(verdictOf(lute, 'body')).toMatchObject({ kind: 'hands off', reason: { code: 'keep out' }, betterAt: null })
  })

  it('has a carcase that was chilled in the night and is asked about first, or not touched at all', () => {
    const films = named(demo.pieces, 'Orchard dresser').flatMap(each => each.piece.groups).flatMap(group => group.films)
    expect(films.find(film => film.material?.includes('polyurethane') && film.doubts.some(doubt => doubt.cause === 'chilled'))).toBeDefined()
  })

  it('has covers ready for light sanding', () => {
    const covers = named(demo.pieces, 'Ferry cover')
    expect(covers).toHaveLength(6)
    for (const cover of covers) expect(turnOf(cover, 'sand-1')?.state).toBe('may begin')
    expect(Math.max(...covers.map(each => each.piece.name.length))).toBe(60)
  })

  it('asks where the oily rags of today are', () => {
    expect(listRags(demo.db, demo.studioId).map(each => each.room)).toEqual(['Bench room'])
  })
})

describe('the demo studio', () => {
  it('is made once', async () => {
    const db = testDatabase() as Database
    const now = Date.parse('2026-03-02T10:00:00Z')
    const first = await seedDemo(db, now, 'UTC')
    const before = db.$client.prepare('select total_changes() as n').get()
    expect(await seedDemo(db, now + minutes, 'UTC')).toEqual(first)
    expect(db.$client.prepare('select total_changes() as n').get()).toEqual(before)
    expect(first.signIns.map(each => each.role)).toEqual(['owner', 'maker', 'helper'])
  }, 120_000)
})
