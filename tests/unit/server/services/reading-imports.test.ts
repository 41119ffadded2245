import { and, eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { prediction, reading, readingImport, studio } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { airNow } from '~~/server/services/air'
import { airCourses } from '~~/server/services/air-course'
import { startBatch } from '~~/server/services/batches'
import { exportReadings } from '~~/server/services/reading-export'
import { pieceStates } from '~~/server/services/piece-states'
import { bringInFile, removeImport } from '~~/server/services/reading-imports'
import { addReading } from '~~/server/services/readings'
import { temperatureText } from '#shared/units'
import { hour, minute, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-06-10T12:00:00Z')
let keys = 0
const request = (times: number[], temp: number | null = 12, rh = 0.8) => ({ clientKey: `import-key-${keys += 1}`, fileName: 'shed.csv', times, temps: times.map(() => temp), humidities: times.map(() => rh) })
const every10 = (count: number) => Array.from({ length: count }, (_, i) => now - (count - i) * 10 * minute)

const made = () => testStudio(now)
type Made = ReturnType<typeof made>
const readingsOf = ({ db, studioId }: Made) => db.select().from(reading).where(eq(reading.studioId, studioId)).all()
const revisionOf = ({ db, studioId }: Made) => db.select().from(studio).where(eq(studio.id, studioId)).get()?.revision

describe('a logger’s file', () => {
  it('comes in as a whole, and the room’s air follows', () => {
    const of = made()
    const done = bringInFile(of.db, of.studioId, of.members.helper.id, of.rooms.bench, request(every10(144)), now)
    expect(done).toMatchObject({ ok: true, added: 144, known: 0 })
    expect(readingsOf(of)).toHaveLength(144)
    expect(readingsOf(of)[0]).toMatchObject({ source: 'file', tempC: 12, rh: 0.8, doubt: 0, memberId: of.members.helper.id, clientKey: null })
    const air = airNow(of.db, of.studioId, now)[0]
    expect(air).toMatchObject({ tempC: 12, readAt: now - 10 * minute, notes: [], last: { source: 'file' }, imports: [{ fileName: 'shed.csv', readings: 144, fromAt: now - 1440 * minute, toAt: now - 10 * minute, by: 'The helper' }] })
  })
  it('passes over instants the room has from a file, and keeps a note beside it', () => {
    const of = made()
    const [first = 0, second = 0] = every10(2)
    addReading(of.db, of.studioId, of.members.maker.id, of.rooms.bench, { clientKey: 'a-note-of-mine', at: new Date(first).toISOString(), tempC: 20, rh: 0.5, words: null, same: false }, now)
    expect(bringInFile(of.db, of.studioId, of.members.maker.id, of.rooms.bench, request([first]), now)).toMatchObject({ added: 1, known: 0 })
    expect(bringInFile(of.db, of.studioId, of.members.maker.id, of.rooms.bench, request([first, second, second]), now)).toMatchObject({ added: 1, known: 2 })
    const before = revisionOf(of)
    expect(bringInFile(of.db, of.studioId, of.members.maker.id, of.rooms.bench, request([first, second]), now)).toEqual({ ok: true, importId: null, added: 0, known: 2 })
    expect(revisionOf(of)).toBe(before)
    expect(readingsOf(of).map(each => each.source)).toEqual(['note', 'file', 'file'])
  })
  it('told twice under one key comes in once', () => {
    const of = made()
    const body = request(every10(3))
    const answers = [1, 2].map(() => bringInFile(of.db, of.studioId, of.members.maker.id, of.rooms.bench, body, now))
    expect(answers[0]).toEqual(answers[1])
    expect(readingsOf(of)).toHaveLength(3)
  })
  it.each([
    ['ahead of now', now + hour, 'Reading 3 lies ahead of now. Nothing was brought in.'],
    ['from a clock nobody set', Date.parse('2000-01-01T00:00:00Z'), 'Reading 3 is more than ten years ago. Nothing was brought in.'],
  ])('with one reading %s leaves nothing behind', (_name, at, message) => {
    const of = made()
    expect(bringInFile(of.db, of.studioId, of.members.maker.id, of.rooms.bench, request([...every10(2), at]), now)).toMatchObject({ ok: false, reason: 'malformed', message })
    expect(readingsOf(of)).toEqual([])
  })
  it('that the database refuses half-way leaves nothing behind', () => {
    const of = made()
    const body = request(every10(3))
    // The route's schema would have stopped this one; the last line of defence is the database's own check.
    body.temps[2] = 99
    expect(() => bringInFile(of.db, of.studioId, of.members.maker.id, of.rooms.bench, body, now)).toThrow(/insert into reading/)
    expect([readingsOf(of).length, of.db.select().from(readingImport).all().length]).toEqual([0, 0])
  })
  it('goes into no other studio’s room', () => {
    const of = made()
    expect(bringInFile(of.db, of.studioId, of.members.maker.id, 999, request(every10(2)), now)).toMatchObject({ reason: 'absent' })
  })
})

describe('taking a file back', () => {
  it('takes every reading of it and no other', () => {
    const of = made()
    const one = bringInFile(of.db, of.studioId, of.members.maker.id, of.rooms.bench, request(every10(5)), now)
    bringInFile(of.db, of.studioId, of.members.maker.id, of.rooms.spray, request(every10(4)), now)
    if (!one.ok || one.importId === null) throw new Error('The file did not come in.')
    expect(removeImport(of.db, of.studioId, of.members.helper, one.importId, now)).toMatchObject({ reason: 'not allowed' })
    expect(removeImport(of.db, of.studioId, of.members.maker, one.importId, now)).toEqual({ ok: true })
    expect(readingsOf(of).map(each => each.roomId)).toEqual(Array(4).fill(of.rooms.spray))
    expect(removeImport(of.db, of.studioId, of.members.maker, one.importId, now)).toMatchObject({ reason: 'absent' })
  })
})

describe('films', () => {
  it('are foretold anew by a file, and as before once it is taken back', () => {
    const of = made()
    const batch = startBatch(of.db, of.studioId, { member: of.members.maker }, { clientKey: 'batch-key-1', name: 'Boxes', scheduleId: null, pieces: ['Box 1'], sizeUnits: 1, oldObject: false, placeId: of.places.shelf, order: null, startsAt: new Date(now - 3 * hour).toISOString() }, now)
    if (!batch.ok) throw new Error(batch.message)
    const on = recordAct(of.db, of.studioId, { member: of.members.maker }, { clientKey: 'coat-key-1', kind: 'coat on', doneAt: new Date(now - 2 * hour).toISOString(), pieces: pieceStates(of.db, of.studioId, batch.pieceIds).map(({ id, version }) => ({ id, version })), body: { step: null, materialVersionId: of.materialOf('acrylic-gesso') } }, now)
    if (!on.ok) throw new Error(on.message)
    const times = () => of.db.select().from(prediction).where(and(eq(prediction.studioId, of.studioId), eq(prediction.milestone, 'dry-to-handle'))).all().map(each => each.likelyAt ?? Infinity)
    const before = times()
    const done = bringInFile(of.db, of.studioId, of.members.maker.id, of.rooms.bench, request(every10(30), 12, 0.8), now)
    // Twelve degrees and 80 % dry a water-borne film slower than the studio's usual climate.
    expect(times()[0]).toBeGreaterThan(before[0] ?? Infinity)
    if (!done.ok || done.importId === null) throw new Error('The file did not come in.')
    removeImport(of.db, of.studioId, of.members.maker, done.importId, now)
    expect(times()).toEqual(before)
  })
})

describe('the course of the air', () => {
  it('is drawn from the first reading on, and after the last it is reckoned', () => {
    const of = made()
    bringInFile(of.db, of.studioId, of.members.maker.id, of.rooms.bench, request(every10(36).map(at => at - 2 * hour), 20, 0.5), now)
    const [bench, spray] = airCourses(of.db, of.studioId, 'day', now)
    // Six hours of readings end 2 h 10 min ago; a point every half-hour: 4:00 to 9:30 UTC measured, 10:00 to 12:00 reckoned, and 18 hours ahead.
    expect(bench?.points.map(each => each.reckoned)).toEqual([...Array(12).fill(false), ...Array(5 + 36).fill(true)])
    // 20 °C and 50 % is the sheets' own climate: every film at its sheet's speed. Table of the Wood Handbook: 9.3 % at 70 °F and 50 %, hardly another at 68.
    expect(bench?.points[0]).toMatchObject({ at: now - 8 * hour, tempC: 20, rh: 0.5, speeds: [1, 1, 1, 1, 1, 1] })
    expect(bench?.points[0]?.dewPointC).toBeCloseTo(9.27, 2)
    expect(bench?.points[0]?.boardMoisture).toBeCloseTo(9.3, 0)
    expect(spray?.points).toEqual([])
  })

  // Near 51 % the dew point passes 9.55 °C, where rounding first to hundredths and then to tenths says another tenth than rounding once.
  it.each(Array.from({ length: 12 }, (_, index) => 0.5085 + index * 0.0001))('says one dew point for one air, here at %f', (rh) => {
    const of = made()
    bringInFile(of.db, of.studioId, of.members.maker.id, of.rooms.bench, request([now], 20, rh), now)
    const told = airNow(of.db, of.studioId, now).find(each => each.roomId === of.rooms.bench)
    const drawn = airCourses(of.db, of.studioId, 'day', now).find(each => each.roomId === of.rooms.bench)?.points.find(each => each.at === now)
    expect(told?.dewPointC).not.toBeNull()
    expect(drawn && [drawn.dewPointC, temperatureText(drawn.tempC, 'metric')]).toEqual(told && [told.dewPointC, temperatureText(told.tempC, 'metric')])
  })
})

describe('the file of a room', () => {
  it('holds every reading and whose it is', () => {
    const of = made()
    bringInFile(of.db, of.studioId, of.members.maker.id, of.rooms.spray, request([now - hour], 20, 0.5), now)
    const saved = exportReadings(of.db, of.db.select().from(studio).get()!, of.rooms.spray, now)
    if (!saved.ok) throw new Error(saved.message)
    expect(saved.fileName).toBe('air-spray-room.csv')
    expect(saved.text.split('\r\n')[1]).toBe('2026-06-10T11:00:00.000Z,2026-06-10 11:00:00,20.00,50.00,9.27,9.3,from a file,The maker')
    expect(exportReadings(of.db, of.db.select().from(studio).get()!, 999, now)).toMatchObject({ reason: 'absent' })
  })
})
