import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { act, keepOut, piece, pieceStep, ragDuty, reading, room, stay, vapourStart } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import type { Teller } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { correctAct } from '~~/server/services/corrections'
import { openRoom } from '~~/server/services/keep-outs'
import { adviceNow } from '~~/server/services/advice/now'
import { pieceStates } from '~~/server/services/piece-states'
import { addStatement } from '~~/server/services/vapour-settings'
import type { ActRequest, CorrectionRequest, VapourAnswers } from '#shared/schemas/act'
import { startVapour } from '#shared/words/vapour-starts'
import { hour, minute, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const iso = (at: number) => new Date(at).toISOString()
const running: VapourAnswers = { exhaust: 'running', flamesOff: true, nobodyElse: true }
const none: VapourAnswers = { ...running, exhaust: 'none' }

function workshop(given: { schedule?: string, oldObject?: boolean, place?: 'booth' | 'shelf', pieces?: number } = {}) {
  const studio = testStudio(now)
  const { db, studioId, members } = studio
  const start = (name: string, placeId: number) => {
    const started = startBatch(db, studioId, { member: members.maker }, {
      clientKey: `start-${name}`, name, scheduleId: given.schedule ? studio.scheduleOf(given.schedule) : null, pieces: Array.from({ length: given.pieces ?? 2 }, (_, i) => `${name} ${i + 1}`), sizeUnits: 1,
      placeId, order: null, startsAt: iso(now - 8 * hour), oldObject: given.oldObject ?? false,
    }, now)
    if (!started.ok) throw new Error(started.message)
    return started.pieceIds
  }
  const ids = start('Board', studio.places[given.place ?? 'booth'])
  let keys = 0
  const tell = (kind: ActRequest['kind'], id: number, body: ActRequest['body'], also: { vapour?: VapourAnswers, by?: Teller, at?: number, doneAt?: number } = {}) => {
    const at = also.at ?? now
    const pieces = pieceStates(db, studioId, [id]).map(each => ({ id: each.id, version: each.version }))
    return recordAct(db, studioId, also.by ?? { member: members.maker }, { clientKey: `key-of-test-${++keys}`, kind, doneAt: iso(also.doneAt ?? at), pieces, body, ...also.vapour ? { vapour: also.vapour } : {} }, at)
  }
  const made = (...what: Parameters<typeof tell>) => {
    const told = tell(...what)
    if (!told.ok) throw new Error(told.message)
    return told.actId
  }
  const correct = (actId: number, change: Omit<CorrectionRequest, 'clientKey'>, by: Teller = { member: members.owner }) => correctAct(db, studioId, by, actId, { clientKey: `key-of-test-${++keys}`, ...change }, now)
  const of = (material: string) => ({ step: null, materialVersionId: studio.materialOf(material) })
  return { ...studio, ids, start, tell, made, correct, of }
}

describe('a piece that comes back', () => {
  it('brings no wet solvent film into a room that somebody sleeps in', () => {
    const { db, studioId, members, ids: [one = 0], made, of, rooms, places } = workshop()
    made('coat on', one, of('nitrocellulose-lacquer'), { vapour: running })
    made('gone', one, {})
    db.update(room).set({ sleptIn: true }).where(eq(room.id, rooms.bench)).run()
    const back = (placeId: number) => recordAct(db, studioId, { member: members.maker }, { clientKey: `back-to-${placeId}`, kind: 'back', doneAt: iso(now), pieces: [{ id: one, version: db.select({ version: piece.version }).from(piece).where(eq(piece.id, one)).get()?.version ?? 0 }], body: { placeId } }, now)
    expect(back(places.shelf)).toMatchObject({ ok: false, message: startVapour.sleptIn('Bench') })
    expect(back(places.booth)).toMatchObject({ ok: true })
  })
})

describe('a correction', () => {
  it('puts no wet solvent film into a room that somebody sleeps in, nor solvent work done there', () => {
    const { ids: [one = 0, two = 0], made, correct, of, db, rooms, places, tell } = workshop()
    made('coat on', one, of('nitrocellulose-lacquer'), { vapour: running })
    const moved = made('moved', one, { placeId: places.booth })
    const water = made('moved', two, { placeId: places.shelf })
    db.update(room).set({ sleptIn: true }).where(eq(room.id, rooms.bench)).run()
    const refused = { ok: false, reason: 'impossible', message: startVapour.sleptIn('Bench') }
    expect(tell('moved', one, { placeId: places.shelf })).toMatchObject(refused)
    expect(correct(moved, { body: { placeId: places.shelf } })).toMatchObject(refused)
    // Another piece put onto an act that moved a dry one there.
    expect(correct(water, { pieces: [one, two] })).toMatchObject(refused)
    expect(db.select().from(stay).all().filter(each => each.toAt === null && each.placeId === places.shelf)).toHaveLength(1)
  })

  it('takes an act back whatever a caution says: that can only make less of it', () => {
    const { ids: [one = 0], made, correct, of, db, rooms } = workshop()
    const lacquer = made('coat on', one, of('nitrocellulose-lacquer'), { vapour: running })
    db.update(room).set({ sleptIn: true }).where(eq(room.id, rooms.spray)).run()
    expect(correct(lacquer, { takeBack: true })).toMatchObject({ ok: true })
    // The room stays shut: somebody may have sprayed, and a person opens it.
    expect(db.select().from(keepOut).all()).toMatchObject([{ roomId: rooms.spray, openedAt: null }])
  })

  it('makes no solvent work of what was none, and none in another room: the three things were not asked', () => {
    const { ids: [one = 0], start, made, correct, of, places, db } = workshop()
    const water = made('coat on', one, of('acrylic-varnish'))
    expect(correct(water, { body: of('nitrocellulose-lacquer') })).toMatchObject({ ok: false, reason: 'impossible', message: startVapour.tellAnew })
    expect(correct(water, { body: { step: null, materialVersionId: null } })).toMatchObject({ ok: false, message: startVapour.tellAnew })
    const lacquer = made('coat on', one, of('nitrocellulose-lacquer'), { vapour: running })
    const [other = 0] = start('Tray', places.shelf)
    expect(correct(lacquer, { pieces: [other] })).toMatchObject({ ok: false, reason: 'impossible', message: startVapour.tellAnew })
    expect(correct(lacquer, { doneAt: iso(now - 5 * minute) })).toMatchObject({ ok: true })
    expect(db.select().from(vapourStart).all()).toHaveLength(1)
  })

  it('brings in no isocyanate without the owner\'s statement', () => {
    const { ids: [one = 0], made, correct, of, db, studioId, members } = workshop({ place: 'shelf' })
    const glue = made('glue-up on', one, of('pva-yellow'))
    expect(correct(glue, { body: of('polyurethane-glue') })).toMatchObject({ ok: false, reason: 'impossible', message: expect.stringContaining('holds isocyanate') })
    addStatement(db, studioId, members.owner.id, 'From the bottle only, with gloves, windows open, by the owner alone.', now)
    expect(correct(glue, { body: of('polyurethane-glue') })).toMatchObject({ ok: true })
  })
})

describe('an old object that nobody has tested', () => {
  it('is not sanded, cut at the bench or stripped, in one word or two, by no role', () => {
    const { ids: [one = 0], tell, db, members } = workshop({ schedule: 'mitred-frame', oldObject: true, place: 'shelf', pieces: 1 })
    const refused = { ok: false, reason: 'impossible', message: expect.stringContaining('No sanding, scraping, heating, piercing or cutting') }
    const loosening = db.select().from(pieceStep).where(eq(pieceStep.pieceId, one)).all().filter(step => ['flat sanding', 'light sanding', 'levelling', 'bench work'].includes(step.kind))
    expect(new Set(loosening.map(step => step.kind))).toEqual(new Set(['flat sanding', 'light sanding', 'bench work']))
    for (const by of [{ member: members.owner }, { member: members.maker }]) {
      for (const { key } of loosening) for (const kind of ['began', 'work done'] as const) expect(tell(kind, one, { step: key }, { by }), `${kind} ${key}`).toMatchObject(refused)
      expect(tell('stripped', one, {}, { by })).toMatchObject(refused)
      expect(tell('air', one, { kind: 'warm air' }, { by })).toMatchObject(refused)
    }
  })

  it('stays so while one question is open, answered "not tested" or "found", and is let go by four times "none"', () => {
    const { ids: [one = 0], tell, made } = workshop({ schedule: 'mitred-frame', oldObject: true, place: 'shelf', pieces: 1 })
    const cut = () => tell('began', one, { step: 'cut' }).ok
    for (const question of ['lead', 'green cloth', 'mould']) made('intake answered', one, { question, answer: 'tested, none' })
    expect(cut()).toBe(false)
    made('intake answered', one, { question: 'metal coating', answer: 'not tested' })
    expect(cut()).toBe(false)
    made('intake answered', one, { question: 'metal coating', answer: 'tested, found' })
    expect(cut()).toBe(false)
    made('intake answered', one, { question: 'metal coating', answer: 'tested, none' })
    expect(cut()).toBe(true)
  })

  it('is asked of a maker, not of a helper', () => {
    const { ids: [one = 0], tell, members } = workshop({ oldObject: true, place: 'shelf' })
    expect(tell('intake answered', one, { question: 'lead', answer: 'tested, none' }, { by: { member: members.helper } })).toMatchObject({ ok: false, reason: 'not allowed' })
  })
})

describe('solvent work that is about to begin', () => {
  it('is held back while flames are on or others are inside; told a while after, it is a fact', () => {
    const { ids: [one = 0], tell, made } = workshop({ schedule: 'lacquered-instrument' })
    made('work done', one, { step: 'sand-body' }, { at: now - 2 * hour })
    for (const said of [{ flamesOff: false }, { nobodyElse: false }]) expect(tell('began', one, { step: 'seal' }, { vapour: { ...running, ...said } }), JSON.stringify(said)).toMatchObject({ ok: false, reason: 'impossible' })
    expect(tell('began', one, { step: 'seal' }, { vapour: { ...running, nobodyElse: false }, doneAt: now - hour })).toMatchObject({ ok: true })
  })
})

describe('the equipped operator', () => {
  const seal = { step: 'seal' }
  function shutBooth(exhaust: VapourAnswers = running) {
    const studio = workshop({ schedule: 'lacquered-instrument' })
    const [one = 0, two = 0] = studio.ids
    studio.made('work done', one, { step: 'sand-body' }, { at: now - 2 * hour })
    studio.made('work done', two, { step: 'sand-body' }, { at: now - 2 * hour })
    studio.made('coat on', one, seal, { vapour: exhaust, at: now - hour })
    return { ...studio, two }
  }

  it('goes on with the same work while the exhaust runs; nobody else goes in, an owner neither', () => {
    const { tell, two, members, rooms } = shutBooth()
    for (const by of [{ member: members.owner }, { member: members.helper, role: 'helper' }] as Teller[]) {
      const answer = tell('began', two, seal, { by, vapour: running })
      expect(answer.ok).toBe(false)
    }
    expect(tell('began', two, seal, { by: { member: members.owner }, vapour: running })).toMatchObject({ ok: false, reason: 'conflict', current: { keepOut: rooms.spray } })
    expect(tell('began', two, seal)).toMatchObject({ ok: true })
  })

  it('does no other work in there, and goes in no more with the exhaust off', () => {
    const { tell, two, made, rooms } = shutBooth()
    expect(tell('began', two, { step: 'sand-neck' })).toMatchObject({ ok: false, reason: 'conflict', current: { keepOut: rooms.spray } })
    // Four hours later the three things are asked anew. "There is none" is not an equipped answer.
    expect(tell('began', two, seal, { at: now + 4 * hour })).toMatchObject({ ok: false, reason: 'conflict', current: { ask: 'vapour' } })
    expect(tell('began', two, seal, { at: now + 4 * hour, vapour: none })).toMatchObject({ ok: false, reason: 'conflict', current: { keepOut: rooms.spray } })
    expect(made('began', two, seal, { at: now + 4 * hour, vapour: running })).toBeGreaterThan(0)
  })

  it('is nobody where no exhaust runs: the room is opened first', () => {
    const { tell, two, db, studioId, members, rooms } = shutBooth(none)
    expect(tell('began', two, seal, { vapour: running })).toMatchObject({ ok: false, reason: 'conflict', current: { keepOut: rooms.spray } })
    expect(openRoom(db, studioId, members.maker, rooms.spray, now)).toEqual({ ok: true })
    expect(tell('began', two, seal, { vapour: running })).toMatchObject({ ok: true })
  })
})

describe('rags', () => {
  it('are asked for after a film of drying oil was sanded, and not after another', () => {
    const { ids: [one = 0], made, db, rooms } = workshop({ schedule: 'mitred-frame', place: 'shelf', pieces: 1 })
    for (const key of ['glue-up', 'slot', 'make-keys', 'glue-keys', 'flush', 'cut']) db.update(pieceStep).set({ kind: 'packing' }).where(eq(pieceStep.key, key)).run()
    made('coat on', one, { step: null, materialVersionId: null }, { vapour: none, at: now - 7 * hour })
    expect(db.select().from(ragDuty).all()).toEqual([])
    made('coat on', one, { step: 'oil-1' }, { vapour: none, at: now - 6 * hour })
    db.update(ragDuty).set({ answer: 'in water can', answeredAt: now - 5 * hour }).run()
    const sanded = made('work done', one, { step: 'scuff' }, { at: now - hour })
    expect(db.select().from(ragDuty).all().filter(duty => duty.answeredAt === null)).toMatchObject([{ roomId: rooms.bench, lastOilAt: now - hour, lastOilActId: sanded }])
  })

  it('are asked for still when the oil coat is taken back or moved to another hour', () => {
    const { ids: [one = 0], made, correct, of, db } = workshop({ place: 'shelf' })
    const oil = made('coat on', one, of('wiping-varnish'), { vapour: none })
    expect(correct(oil, { takeBack: true })).toMatchObject({ ok: true })
    expect(db.select().from(ragDuty).all().map(duty => duty.answeredAt)).toEqual([null])
    expect(db.select().from(act).where(eq(act.kind, 'rags answered')).all()).toEqual([])
  })
})

describe('a step that could be next', () => {
  it('brings its cautions in few words to whoever does it', () => {
    const { ids: [one = 0], made, db, studioId } = workshop({ schedule: 'lacquered-instrument' })
    const next = () => pieceStates(db, studioId, [one])[0]?.turns.map(each => [each.step.key, each.step.cautions]) ?? []
    expect(next()).toContainEqual(['sand-body', ['sanding dust']])
    made('work done', one, { step: 'sand-body' })
    expect(next()).toContainEqual(['seal', ['flames', 'vapour', 'sleeping room']])
  })
})

describe('advice about a film', () => {
  it('asks for no heater, dehumidifier or fan while a solvent film is wet in its room', () => {
    const { ids: [one = 0, two = 0], made, of, db, studioId, rooms } = workshop({ place: 'shelf' })
    db.insert(reading).values({ studioId, roomId: rooms.bench, at: now, toldAt: now, tempC: 18, rh: 0.94, source: 'note' }).run()
    made('coat on', one, of('acrylic-varnish'))
    const advice = () => adviceNow(db, studioId, [one], now).find(line => line.code === 'too-damp' && line.coatIds.length > 0)?.text
    expect(advice()).toContain(': dry the room')
    made('coat on', two, of('nitrocellulose-lacquer'), { vapour: none })
    expect(advice()).toBe('Too damp for a time to be promised. Wait for drier air: no heater, dehumidifier or fan beside a wet solvent film.')
  })
})
