import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { keepOut, materialVersion, ragDuty, room, vapourStart } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import type { Teller } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { openRoom } from '~~/server/services/keep-outs'
import { findPiece } from '~~/server/services/piece-detail'
import { pieceStates } from '~~/server/services/piece-states'
import { vapourState } from '~~/server/services/vapour'
import { addStatement, setSheetFigures, withdrawStatement } from '~~/server/services/vapour-settings'
import { wantedReminders } from '~~/server/reminders/wanted'
import type { ActRequest, VapourAnswers } from '#shared/schemas/act'
import { hour, minute, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const iso = (at: number) => new Date(at).toISOString()
const running: VapourAnswers = { exhaust: 'running', flamesOff: true, nobodyElse: true }
const none: VapourAnswers = { ...running, exhaust: 'none' }

/** Four boards in a booth or on a shelf, and a way to tell acts about one of them. */
function studioWith(place: 'booth' | 'shelf', oldObject = false, schedule: string | null = null) {
  const studio = testStudio(now)
  const { db, studioId, members } = studio
  const started = startBatch(db, studioId, { member: members.maker }, { clientKey: 'start-one', name: 'Boards', scheduleId: schedule === null ? null : studio.scheduleOf(schedule), pieces: ['Board 1', 'Board 2', 'Board 3', 'Board 4'], sizeUnits: 1, placeId: studio.places[place], order: null, startsAt: iso(now - hour), oldObject }, now)
  if (!started.ok) throw new Error(started.message)
  let keys = 0
  const tell = (kind: ActRequest['kind'], no: number, body: ActRequest['body'], given: { vapour?: VapourAnswers, at?: number, doneAt?: number, by?: Teller } = {}) => {
    const id = started.pieceIds[no - 1] ?? 0
    const pieces = pieceStates(db, studioId, [id]).map(each => ({ id: each.id, version: each.version }))
    const at = given.at ?? now
    return recordAct(db, studioId, given.by ?? { member: members.maker }, { clientKey: `key-of-test-${++keys}`, kind, doneAt: iso(given.doneAt ?? at), pieces, body, ...(given.vapour ? { vapour: given.vapour } : {}) }, at)
  }
  const lacquer = (no: number, given?: Parameters<typeof tell>[3]) => tell('coat on', no, { step: null, materialVersionId: studio.materialOf('nitrocellulose-lacquer') }, given)
  return { ...studio, tell, lacquer, pieceIds: started.pieceIds }
}

describe('solvent work in a room', () => {
  it('is not recorded without the three answers, and says what it asks', () => {
    const { lacquer, rooms, db } = studioWith('booth')
    expect(lacquer(1)).toMatchObject({ ok: false, reason: 'conflict', current: { ask: 'vapour', rooms: [{ id: rooms.spray, name: 'Spray room' }] } })
    expect(db.select().from(vapourStart).all()).toEqual([])
    expect(lacquer(1, { vapour: running })).toMatchObject({ ok: true })
    expect(db.select().from(vapourStart).all()).toMatchObject([{ roomId: rooms.spray, exhaust: 'running', flamesOff: true, nobodyElse: true }])
  })

  it('asks once a session where the exhaust runs, anew after four hours and after the room was opened', () => {
    const { lacquer, db, studioId, members, rooms } = studioWith('booth')
    lacquer(1, { vapour: running })
    expect(lacquer(2, { at: now + hour })).toMatchObject({ ok: true })
    expect(lacquer(3, { at: now + 5 * hour })).toMatchObject({ ok: false, reason: 'conflict' })
    openRoom(db, studioId, members.maker, rooms.spray, now + 2 * hour)
    expect(lacquer(3, { at: now + 3 * hour })).toMatchObject({ ok: false, reason: 'conflict' })
  })

  it('began when the work was done, however late it is told; told a day late nobody is called, and the next coat is asked about anew', () => {
    const { lacquer, db, studioId } = studioWith('booth')
    const calls = (at: number) => wantedReminders(db, studioId, at).filter(each => each.kind === 'vapour')
    expect(lacquer(1, { vapour: running, doneAt: now - 30 * minute })).toMatchObject({ ok: true })
    expect(db.select().from(vapourStart).all()).toMatchObject([{ at: now - 30 * minute }])
    expect(calls(now)).toHaveLength(1)
    const later = now + 24 * hour
    expect(lacquer(2, { at: later, doneAt: now + 5 * hour, vapour: running })).toMatchObject({ ok: true })
    expect(db.select().from(vapourStart).all().at(-1)).toMatchObject({ at: now + 5 * hour, endedAt: null })
    expect(calls(later)).toEqual([])
    expect(lacquer(3, { at: later })).toMatchObject({ ok: false, reason: 'conflict' })
  })

  it.each([{ flamesOff: false }, { nobodyElse: false }])('is recorded with what is answered when it lies behind, and that answer stands for no other coat: %j', (said) => {
    const { lacquer, db, studioId, members, rooms, pieceIds } = studioWith('booth')
    const vapour = { ...running, ...said }
    expect(lacquer(1, { vapour, doneAt: now - 30 * minute })).toMatchObject({ ok: true })
    expect(db.select().from(vapourStart).all()).toMatchObject([{ roomId: rooms.spray, ...vapour }])
    expect(findPiece(db, studioId, members.maker, pieceIds[0] ?? 0, now)).toMatchObject({ history: [{ kind: 'coat on', answered: vapour }, { answered: null }] })
    expect(lacquer(2)).toMatchObject({ ok: false, reason: 'conflict', current: { ask: 'vapour' } })
    expect(vapourState(db, studioId, members.owner, now).rooms.find(each => each.roomId === rooms.spray)?.start?.answers).toEqual(vapour)
    // Everybody is told all the same: vapour hangs there.
    expect(wantedReminders(db, studioId, now).filter(each => each.kind === 'vapour')).toHaveLength(1)
  })

  it('never begins before the start it follows', () => {
    const { lacquer, db } = studioWith('booth')
    lacquer(1, { vapour: running })
    lacquer(2, { at: now + 5 * hour, doneAt: now - 10 * minute, vapour: running })
    expect(db.select().from(vapourStart).all().map(row => row.at)).toEqual([now, now])
  })

  it('asks every time where there is no exhaust', () => {
    const { lacquer } = studioWith('booth')
    expect(lacquer(1, { vapour: none })).toMatchObject({ ok: true })
    expect(lacquer(2)).toMatchObject({ ok: false, reason: 'conflict' })
    expect(lacquer(2, { vapour: none })).toMatchObject({ ok: true })
  })

  it('asks of a film that nobody can name, and not of one with water in it', () => {
    const { tell, materialOf } = studioWith('shelf')
    expect(tell('coat on', 1, { step: null })).toMatchObject({ ok: false, reason: 'conflict' })
    expect(tell('coat on', 2, { step: null, materialVersionId: materialOf('craft-acrylic') ?? materialOf('acrylic-varnish') })).toMatchObject({ ok: true })
  })

  it('is refused where somebody sleeps, whoever asks and whatever is answered; a wet piece is not moved in', () => {
    const { lacquer, tell, db, rooms, members, places } = studioWith('booth')
    expect(lacquer(1, { vapour: running })).toMatchObject({ ok: true })
    db.update(room).set({ sleptIn: true }).where(eq(room.id, rooms.bench)).run()
    expect(tell('moved', 1, { placeId: places.shelf }, { by: { member: members.owner } })).toMatchObject({ ok: false, reason: 'impossible' })
    expect(tell('moved', 2, { placeId: places.shelf })).toMatchObject({ ok: true })
    for (const by of [{ member: members.owner }, { member: members.maker }, { bench: true } as const]) expect(lacquer(2, { vapour: running, by })).toMatchObject({ ok: false, reason: 'impossible' })
  })

  it('takes no warm air and no fan beside it, on no piece of the room', () => {
    const { lacquer, tell } = studioWith('booth')
    expect(tell('air', 2, { kind: 'warm air' })).toMatchObject({ ok: true })
    lacquer(1, { vapour: running })
    for (const no of [1, 2]) for (const kind of ['warm air', 'moving']) expect(tell('air', no, { kind })).toMatchObject({ ok: false, reason: 'impossible' })
  })

  it('shuts a room of which nothing is known, and not one that is known to carry so little off', () => {
    const unknown = studioWith('shelf')
    const wax = (studio: typeof unknown) => studio.tell('coat on', 1, { step: null, materialVersionId: studio.materialOf('wax'), areaM2: 0.05 }, { vapour: none })
    wax(unknown)
    expect(unknown.db.select().from(keepOut).all().map(row => row.roomId)).toEqual([unknown.rooms.bench])
    // 0.05 m2 at the sheet's cautious end, 650 g/L over 20 m2/L: 1.6 g in 100 m3, or 16 mg/m3 without any air; times 5 for mixing under half of 350.
    const known = studioWith('shelf')
    known.db.update(room).set({ volumeM3: 100, airChangesPerHour: 6, airMoves: 'fan and windows' }).where(eq(room.id, known.rooms.bench)).run()
    wax(known)
    expect(known.db.select().from(keepOut).all()).toEqual([])
  })
})

describe('a vapour that is spoken of in words only', () => {
  it('says whom to ask: before the work, on the page, and beside its room, where no figure of air stands', () => {
    const { lacquer, db, studioId, members, materialOf, rooms } = studioWith('booth')
    const materialId = db.select({ id: materialVersion.materialId }).from(materialVersion).where(eq(materialVersion.id, materialOf('nitrocellulose-lacquer') ?? 0)).get()?.id ?? 0
    const keys = () => {
      const asked = lacquer(1)
      return 'current' in asked ? (asked.current as { cautions: { key: string }[] }).cautions.map(each => each.key) : []
    }
    expect(keys()).not.toContain('ask first')
    const blank = { limitMgM3: null, ceilingMgM3: null, lelGramsM3: null, vocGramsPerLitre: null, exemptGramsPerLitre: null, spreadM2PerLitre: null, touchDryMinutes: null }
    setSheetFigures(db, studioId, members.owner.id, materialId, { ...blank, solventKey: 'methanol' }, now)
    expect(keys()).toContain('ask first')
    db.update(room).set({ volumeM3: 40, exhaustM3H: 400, airMoves: 'measured fan' }).where(eq(room.id, rooms.spray)).run()
    expect(lacquer(1, { vapour: running })).toMatchObject({ ok: true })
    const state = vapourState(db, studioId, members.owner, now)
    expect(state.rooms.find(each => each.roomId === rooms.spray)?.now).toMatchObject({ askFirst: true, cautious: { neededM3PerHour: null } })
    expect(state.cautions.find(each => each.key === 'ask first')?.materials).toContain('Nitrocellulose lacquer')
    expect(state.cautions.map(each => each.key)).toEqual(expect.arrayContaining(['phones', 'paint stripper']))
  })
})

describe('the call about solvent work', () => {
  it('goes out at once, names who and where, and ends when the room is opened', () => {
    const { lacquer, db, studioId, members, rooms } = studioWith('booth')
    lacquer(1, { vapour: running })
    const calls = wantedReminders(db, studioId, now).filter(call => call.kind === 'vapour')
    expect(calls).toMatchObject([{ dueAt: now, title: 'Keep out of Spray room: a solvent film is on' }])
    expect(calls[0]?.body).toContain('The maker has put a solvent film on in Spray room. The exhaust was said to run.')
    openRoom(db, studioId, members.maker, rooms.spray, now + minute)
    expect(wantedReminders(db, studioId, now + minute).filter(call => call.kind === 'vapour')).toEqual([])
  })

  it('says that work begins only when it does, and goes on saying it', () => {
    const told = (doneAt: number, at: number) => {
      const { tell, db, studioId } = studioWith('booth', false, 'lacquered-instrument')
      expect(tell('work done', 1, { step: 'sand-body' }, { doneAt: now - 40 * minute })).toMatchObject({ ok: true })
      expect(tell('began', 1, { step: 'seal' }, { vapour: running, doneAt })).toMatchObject({ ok: true })
      return wantedReminders(db, studioId, at).filter(call => call.kind === 'vapour').map(({ title, body }) => `${title}. ${body}`)[0]
    }
    const begins = /^Keep out of Spray room: solvent work begins. The maker begins solvent work in Spray room. The exhaust is running./
    expect(told(now, now)).toMatch(begins)
    expect(told(now, now + hour)).toMatch(begins)
    // Told later than a quarter of an hour after it.
    expect(told(now - 16 * minute, now)).toMatch(/^Keep out of Spray room: solvent work has begun. The maker began solvent work some time ago in Spray room. The exhaust was said to run./)
  })

  it('is listed on the page that it leads to, also where its one coat without an exhaust is on and ended it', () => {
    const { lacquer, db, studioId, members, rooms } = studioWith('booth')
    const listed = (at: number) => vapourState(db, studioId, members.owner, at).rooms.flatMap(each => (each.start === null ? [] : [each.start.id]))
    const called = (at: number) => wantedReminders(db, studioId, at).filter(call => call.kind === 'vapour').map(call => call.path)
    lacquer(1, { vapour: none, doneAt: now - 30 * minute })
    expect(listed(now)).toHaveLength(1)
    expect(vapourState(db, studioId, members.owner, now).rooms.find(each => each.roomId === rooms.spray)?.start?.phase).toBe('film on')
    expect(called(now)).toEqual([`/safety?start=${listed(now)[0]}`])
    expect(vapourState(db, studioId, members.owner, now).rooms.find(each => each.roomId === rooms.spray)?.exhaustRuns).toBe(false)
    // It is told of for two hours, and so long it is listed, unless the room is opened.
    expect([...called(now + 2 * hour), ...listed(now + 2 * hour)]).toEqual([])
    openRoom(db, studioId, members.maker, rooms.spray, now + minute)
    expect([...called(now + minute), ...listed(now + minute)]).toEqual([])
  })

  it('says when it is time to look, no sooner than the film is touch-dry, and only where that can be told', () => {
    const { lacquer, db, studioId, rooms } = studioWith('booth')
    db.update(room).set({ volumeM3: 40, exhaustM3H: 400, airMoves: 'measured fan' }).where(eq(room.id, rooms.spray)).run()
    lacquer(1, { vapour: running })
    const check = () => wantedReminders(db, studioId, now).filter(call => call.kind === 'check the room')
    expect(check()).toHaveLength(1)
    // Its sheet is touch-dry after a quarter of an hour at the latest; the call is rounded up to the quarter.
    expect(check()[0]?.dueAt).toBeGreaterThanOrEqual(now + 15 * minute)
    expect(check()[0]?.title).toBe('Time to check Spray room')
  })
})

describe('what else a caution refuses', () => {
  it('takes isocyanate only while an owner\'s statement stands', () => {
    const { tell, materialOf, db, studioId, members } = studioWith('shelf')
    const glue = (no: number) => tell('glue-up on', no, { step: null, materialVersionId: materialOf('polyurethane-glue') })
    expect(glue(1)).toMatchObject({ ok: false, reason: 'impossible' })
    const stated = addStatement(db, studioId, members.owner.id, 'Brushed only, with gloves, windows open, by the owner alone.', now)
    if (!stated.ok) throw new Error(stated.message)
    expect(glue(1)).toMatchObject({ ok: true })
    expect(addStatement(db, studioId, members.owner.id, 'Another one.', now)).toMatchObject({ ok: false, reason: 'conflict' })
    withdrawStatement(db, studioId, stated.id, now)
    expect(glue(2)).toMatchObject({ ok: false, reason: 'impossible' })
  })

  it('puts no heat on an old object that nobody has tested for everything', () => {
    const { tell } = studioWith('shelf', true)
    const answer = (question: string, given: string) => tell('intake answered', 1, { question, answer: given })
    expect(tell('air', 1, { kind: 'warm air' })).toMatchObject({ ok: false, reason: 'impossible', message: expect.stringContaining('lead not ruled out') })
    for (const question of ['lead', 'green cloth', 'mould']) answer(question, 'tested, none')
    answer('metal coating', 'not tested')
    expect(tell('air', 1, { kind: 'warm air' })).toMatchObject({ ok: false, reason: 'impossible' })
    answer('metal coating', 'tested, none')
    expect(tell('air', 1, { kind: 'warm air' })).toMatchObject({ ok: true })
  })

  it('asks for rags after any drying oil, per room', () => {
    const { tell, materialOf, db, rooms } = studioWith('shelf')
    tell('coat on', 1, { step: null, materialVersionId: materialOf('wiping-varnish') }, { vapour: none })
    expect(db.select().from(ragDuty).all().map(row => row.roomId)).toEqual([rooms.bench])
  })
})
