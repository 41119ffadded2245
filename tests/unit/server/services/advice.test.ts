import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { coat } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { answerAdvice } from '~~/server/services/advice/answer'
import { hazeGaps, hazeTold } from '~~/server/services/advice/answers'
import { adviceNow } from '~~/server/services/advice/now'
import { startBatch } from '~~/server/services/batches'
import { pieceStates } from '~~/server/services/piece-states'
import { addReading } from '~~/server/services/readings'
import type { ActRequest } from '#shared/schemas/act'
import { usualHazeGapC } from '#shared/drying/haze'
import { hour, minute, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const iso = (at: number) => new Date(at).toISOString()
type Studio = ReturnType<typeof testStudio>
let keys = 0

const read = ({ db, studioId, members }: Studio, roomId: number, tempC: number, rh: number, at = now - hour) => addReading(db, studioId, members.maker.id, roomId, { clientKey: `advice-air-${++keys}`, at: iso(at), tempC, rh, words: null, same: false }, at)

function start({ db, studioId, members, scheduleOf, places }: Studio, key: string, pieces: string[], placeId = places.shelf, at = now) {
  const started = startBatch(db, studioId, { member: members.maker }, { clientKey: `advice-start-${++keys}`, name: 'Batch', scheduleId: scheduleOf(key), pieces, sizeUnits: 1, placeId, order: null, startsAt: iso(at), oldObject: false }, at)
  if (!started.ok) throw new Error(started.message)
  return started.pieceIds
}

function tell({ db, studioId, members }: Studio, kind: ActRequest['kind'], pieceIds: number[], body: ActRequest['body'], at = now) {
  const pieces = pieceStates(db, studioId, pieceIds).map(({ id, version }) => ({ id, version }))
  const told = recordAct(db, studioId, { member: members.maker }, { clientKey: `advice-act-${++keys}`, kind, doneAt: iso(at), pieces, body, vapour: { exhaust: 'running', flamesOff: true, nobodyElse: true } }, at)
  if (!told.ok) throw new Error(told.message)
  return told.actId
}

const codes = (studio: Studio, pieces: number[] | null = null, at = now) => adviceNow(studio.db, studio.studioId, pieces, at).map(line => line.code)
const only = (studio: Studio, code: string, at = now) => adviceNow(studio.db, studio.studioId, null, at).find(line => line.code === code)

/** Two boxes with shellac on, in air that stands 20 - 13.2 = 6.8 C above its dew point (20 C, 65 %). */
function shellacOn() {
  const studio = testStudio(now)
  read(studio, studio.rooms.bench, 20, 0.65)
  const ids = start(studio, 'painted-waxed-box', ['Box 1', 'Box 2'])
  tell(studio, 'coat on', ids, { step: null, materialVersionId: studio.materialOf('shellac') })
  return { ...studio, ids, coats: studio.db.select().from(coat).where(eq(coat.studioId, studio.studioId)).all() }
}

describe('advice where it acts', () => {
  it('is one line about a whole row, with its figures', () => {
    const studio = shellacOn()
    const line = only(studio, 'blush')
    expect(line?.coatIds).toEqual(studio.coats.map(row => row.id))
    expect(line?.text).toMatch(/^The air is 6.8 °C above its dew point; under 11.1 °C such a film may haze\./)
    expect(line?.answers).toEqual(['waiting', 'going on', 'haze'])
  })

  it('comes before a coat goes on: the room is under what the paint needs, the pressing first', () => {
    const studio = testStudio(now)
    const ids = start(studio, 'painted-waxed-box', ['Box 1'])
    // Gluing up the box is next too: 10 minutes, with glue that is open for 5 and can be moved for 10 more.
    expect(codes(studio)).toEqual(['air-assumed'])
    read(studio, studio.rooms.bench, 6, 0.6)
    const [first] = adviceNow(studio.db, studio.studioId, ids, now)
    expect(first).toMatchObject({ code: 'chilled', presses: true, coatIds: [] })
    expect(first?.text).toMatch(/^The room is under \d+ °C, the least for this: warm it first/)
    // The first paint of the lid and that of the box.
    expect(first?.turnIds).toHaveLength(2)
  })

  it('knows the rules of one finish over another, in hours of the clock', () => {
    const studio = testStudio(now)
    read(studio, studio.rooms.bench, 20, 0.5)
    const ids = start(studio, 'painted-waxed-box', ['Box 1'])
    tell(studio, 'coat on', ids, { step: null, materialVersionId: studio.materialOf('wax') })
    // Nothing sticks on top of wax: the first paint of the schedule would go over it.
    expect(only(studio, 'never-over')?.text).toMatch(/^Nothing sticks on top of wax\. Strip the film beneath/)
    const other = testStudio(now)
    read(other, other.rooms.bench, 20, 0.5)
    const boxes = start(other, 'painted-waxed-box', ['Box 2'])
    tell(other, 'coat on', boxes, { step: null, materialVersionId: other.materialOf('boiled-linseed-oil') })
    // Water-based over oil-based: three days after 10:00 on Tuesday 7 April.
    const told = (hours: number) => only(other, 'over-too-early', now + hours * hour)?.text
    expect(told(60)).toBe('Water-based over oil-based: wait three days. The film beneath went on Tue 10:00: not before Fri 10:00.')
    expect(told(72)).toBeUndefined()
  })

  it('says nothing of haze once nobody asked, and nothing in good air', () => {
    const studio = testStudio(now)
    read(studio, studio.rooms.bench, 20, 0.45)
    const ids = start(studio, 'painted-waxed-box', ['Box 1'])
    tell(studio, 'coat on', ids, { step: null, materialVersionId: studio.materialOf('shellac') })
    expect(codes(studio)).not.toContain('blush')
  })
})

describe('answers to advice', () => {
  it('are remembered for every coat named, and the last one counts', () => {
    const { db, studioId, members, coats, ...studio } = shellacOn()
    const about = { coatIds: coats.map(row => row.id), turnIds: [] }
    answerAdvice(db, studioId, members.maker, { code: 'blush', answer: 'waiting', ...about }, now)
    answerAdvice(db, studioId, members.maker, { code: 'blush', answer: 'going on', ...about }, now)
    expect(only({ db, studioId, members, ...studio }, 'blush')).toMatchObject({ answered: 'going on', coatIds: about.coatIds, known: null })
  })

  it('given before a coat hold for the coat', () => {
    const studio = testStudio(now)
    read(studio, studio.rooms.bench, 6, 0.6)
    const ids = start(studio, 'painted-waxed-box', ['Box 1'])
    const line = adviceNow(studio.db, studio.studioId, ids, now)[0]!
    expect(answerAdvice(studio.db, studio.studioId, studio.members.maker, { code: line.code, answer: 'seen', coatIds: [], turnIds: line.turnIds }, now)).toEqual({ ok: true })
    expect(adviceNow(studio.db, studio.studioId, ids, now).find(each => each.code === line.code)?.answered).toBe('seen')
    tell(studio, 'coat on', ids, { step: 'lid-1' })
    expect(adviceNow(studio.db, studio.studioId, ids, now + minute).find(each => each.code === line.code && each.coatIds.length > 0)?.answered).toBe('seen')
  })

  it('about haze move the gap for the material: wider where it hazed, narrower where it stayed clear a day', () => {
    const { db, studioId, members, coats } = shellacOn()
    const about = { coatIds: coats.map(row => row.id), turnIds: [] }
    const versionId = coats[0]!.materialVersionId!
    const gap = (at: number) => hazeGaps(hazeTold(db, studioId), at).get(versionId)
    expect(gap(now)).toBeUndefined()
    answerAdvice(db, studioId, members.maker, { code: 'blush', answer: 'going on', ...about }, now)
    // Not yet a day: nobody knows whether it stays clear.
    expect(gap(now + 23 * hour)).toBeUndefined()
    expect(gap(now + 25 * hour)!).toBeLessThan(usualHazeGapC)
    answerAdvice(db, studioId, members.maker, { code: 'blush', answer: 'haze', ...about }, now + 20 * hour)
    expect(hazeTold(db, studioId)).toHaveLength(1)
    expect(gap(now + 20 * hour)!).toBeGreaterThanOrEqual(usualHazeGapC)
  })

  it('about haze are asked for after the film has dried', () => {
    const studio = shellacOn()
    const about = { coatIds: studio.coats.map(row => row.id), turnIds: [] }
    answerAdvice(studio.db, studio.studioId, studio.members.maker, { code: 'blush', answer: 'going on', ...about }, now)
    const after = only(studio, 'blush', now + 12 * hour)
    expect(after?.text).toMatch(/^It went on with the air 6.8 °C above its dew point/)
    expect(only(studio, 'blush', now + 49 * hour)).toBeUndefined()
  })

  it('know no coat of another studio', () => {
    const { db, studioId, members, coats } = shellacOn()
    expect(answerAdvice(db, studioId + 1, members.maker, { code: 'blush', answer: 'haze', coatIds: [coats[0]!.id], turnIds: [] }, now)).toMatchObject({ ok: false, reason: 'absent' })
  })
})
