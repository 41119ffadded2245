import { beforeAll, describe, expect, it } from 'vitest'
import { eq } from 'drizzle-orm'
import { studio } from '~~/db/schema'
import { seedDemo } from '~~/db/seed/demo'
import { learnedPart } from '~~/server/services/learned'
import { listMaterials, materialSheet } from '~~/server/services/materials'
import { pieceStates } from '~~/server/services/piece-states'
import { placeStates, roomStates } from '~~/server/services/room-states'
import { listRags } from '~~/server/services/rags'
import { studioState } from '~~/server/services/studio-state'
import { foldPieces, refold } from '~~/server/work/refold'
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
  const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()
  if (!owner) throw new Error('There is no demo studio.')
  return { db, now, studioId, where, pieces, hours: studioState(db, owner, now).hours }
}

/** Every row that is a fold of acts; the version counts refolds and is left aside. */
function foldedRows(db: Database) {
  const tables = ['piece_step', 'step_target', 'step_link', 'turn', 'coat', 'coat_target', 'doubt', 'touch_test', 'stay', 'air_note', 'branch', 'part', 'piece']
  return tables.map(table => db.$client.prepare<[], Record<string, unknown>>(`select * from "${table}" order by 1, 2, 3`).all().map(({ version: _, ...row }) => row))
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

  it('has a coat that is due and that nobody has spoken of', () => {
    const due = demo.pieces.filter(each => each.verdict.reason.code === 'coat due')
    expect(due.map(each => each.piece.name)).toEqual(['Dusk panel 1', 'Dusk panel 2'])
    for (const panel of due) expect(panel.turns.map(each => each.turn.step.key)).toEqual(['back'])
  })

  it('tells the last moment to start where that moment lies in working hours', () => {
    const starts = demo.pieces.flatMap(each => (each.next?.kind === 'start by' ? [each.next] : []))
    const inHours = demo.hours.some(span => span.opensAt <= demo.now && demo.now + 60 * minutes <= span.closesAt)
    if (inHours) expect(Math.min(...starts.map(start => start.at - demo.now))).toBeLessThan(75 * minutes)
    expect(starts.every(start => start.shutsAt === null || start.at <= start.shutsAt)).toBe(true)
  })

  it('is open today, in the middle of five working days', () => {
    expect(demo.hours).toHaveLength(1)
  })

  it('has eight batches here, some history, and a piece on a way of its own', () => {
    expect(new Set(demo.pieces.map(each => each.piece.batch.name)).size).toBe(8)
    const of = (question: string) => demo.db.$client.prepare<[], { n: number }>(question).get()?.n ?? 0
    expect(of('select count(*) as n from piece where gone_at is not null')).toBe(3)
    expect(of('select count(*) as n from act where replaces_act_id is not null')).toBeGreaterThanOrEqual(2)
    expect(of('select count(*) as n from touch_test where reached = 1')).toBeGreaterThanOrEqual(1)
    expect(of('select count(*) as n from touch_test where reached = 0')).toBeGreaterThanOrEqual(1)
    expect(of('select count(*) as n from branch where rejoined_act_id is null')).toBe(1)
  })

  it('has a mix on hand with a part that the owner sees and a helper does not', () => {
    const seen = listMaterials(demo.db, demo.studioId, true)
    const mix = seen.find(each => each.mix)
    expect(mix).toMatchObject({ name: 'House brown', kind: 'paint', glue: false })
    const sheet = (seesPrivate: boolean) => materialSheet(demo.db, demo.studioId, mix?.id ?? 0, seesPrivate)
    expect(sheet(true)).toMatchObject({ hiddenParts: 0, parts: [{ name: 'Heavy-body acrylic paint', private: false }, { name: 'Walnut tint paste', private: true }] })
    expect(sheet(false)).toMatchObject({ hiddenParts: 1, parts: [{ name: 'Heavy-body acrylic paint' }] })
    expect(listMaterials(demo.db, demo.studioId, false).map(each => each.name)).toEqual(seen.map(each => each.name).filter(name => name !== 'Walnut tint paste'))
    expect(JSON.stringify(sheet(false))).not.toContain('Walnut')
    const learned = learnedPart(demo.db, demo.studioId, mix?.id ?? 0, demo.now)
    if ('reason' in learned) throw new Error('The demo has no mix.')
    expect(Date.parse(learned.newestTinAt ?? '')).toBeLessThan(demo.now)
  })

  it('stands exactly as its acts make it', () => {
    const ids = demo.pieces.map(each => each.piece.id)
    const before = foldedRows(demo.db)
    demo.db.transaction(tx => refold(tx, demo.studioId, ids))
    expect(foldedRows(demo.db)).toEqual(before)
    expect(foldPieces(demo.db, demo.studioId, ids).flatMap(each => each.folded.problems)).toEqual([])
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
