import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { coat } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { adviceLines, answerAdvice } from '~~/server/services/advice'
import { startBatch } from '~~/server/services/batches'
import { pieceStates } from '~~/server/services/piece-states'
import { minute, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const iso = (at: number) => new Date(at).toISOString()
const blush = { code: 'blush', text: 'The air is near its dew point.' }

function twoCoats() {
  const studio = testStudio(now)
  const started = startBatch(studio.db, studio.studioId, { member: studio.members.maker }, { clientKey: 'start', name: 'Boxes', scheduleId: studio.scheduleOf('painted-waxed-box'), pieces: ['Box 1', 'Box 2'], sizeUnits: 1, placeId: studio.places.shelf, order: null, startsAt: iso(now), oldObject: false }, now)
  if (!started.ok) throw new Error(started.message)
  const pieces = pieceStates(studio.db, studio.studioId, started.pieceIds).map(({ id, version }) => ({ id, version }))
  const told = recordAct(studio.db, studio.studioId, { member: studio.members.maker }, { clientKey: 'coat', kind: 'coat on', doneAt: iso(now + minute), pieces, body: { step: 'lid-1' } }, now + minute)
  if (!told.ok) throw new Error(told.message)
  const coats = studio.db.select().from(coat).where(eq(coat.studioId, studio.studioId)).all().map(row => ({ id: row.id, versionId: row.materialVersionId, advice: [blush, { code: 'air-assumed', text: 'Nobody has read the air here.' }] }))
  return { ...studio, coats, lines: () => adviceLines(studio.db, studio.studioId, coats) }
}

describe('advice and its answers', () => {
  it('remembers an answer, and the last one counts', () => {
    const { db, studioId, members, coats, lines } = twoCoats()
    expect(lines().get(coats[0]!.id)!.map(each => [each.code, each.answers, each.answered])).toEqual([['blush', ['waiting', 'going on', 'haze'], null], ['air-assumed', ['seen'], null]])
    answerAdvice(db, studioId, members.maker, coats[0]!.id, { code: 'blush', answer: 'waiting' }, now)
    answerAdvice(db, studioId, members.maker, coats[0]!.id, { code: 'blush', answer: 'going on' }, now)
    expect(lines().get(coats[0]!.id)![0]!.answered).toBe('going on')
    expect(lines().get(coats[0]!.id)![1]!.answered).toBeNull()
  })

  it('tells the next coat of the material what going on has led to', () => {
    const { db, studioId, members, coats, lines } = twoCoats()
    expect(lines().get(coats[1]!.id)![0]!.known).toBeNull()
    answerAdvice(db, studioId, members.maker, coats[0]!.id, { code: 'blush', answer: 'going on' }, now)
    expect(lines().get(coats[1]!.id)![0]!.known).toBe('Here it was gone on with once, and no haze was told of.')
    answerAdvice(db, studioId, members.maker, coats[0]!.id, { code: 'blush', answer: 'haze' }, now)
    expect(lines().get(coats[1]!.id)![0]!.known).toBe('Here haze was seen once of 1 so near the dew point.')
    expect(lines().get(coats[0]!.id)![0]!.known).toBeNull()
  })

  it('knows no coat of another studio', () => {
    const { db, studioId, members, coats } = twoCoats()
    expect(answerAdvice(db, studioId + 1, members.maker, coats[0]!.id, { code: 'blush', answer: 'haze' }, now)).toMatchObject({ ok: false, reason: 'absent' })
  })
})
