import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { finishingSchedule, studio } from '~~/db/schema'
import { findSchedule, listSchedules } from '~~/server/services/schedule-times'
import { isRefusal } from '~~/server/utils/errors'
import { testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const made = testStudio(now)
const owner = made.db.select().from(studio).where(eq(studio.id, made.studioId)).get()!
const list = listSchedules(made.db, owner, now)

describe('the schedules to choose from', () => {
  it('are the library\'s, each with a likely and a longer cautious time', () => {
    expect(list.length).toBeGreaterThanOrEqual(10)
    for (const each of list) {
      expect(each.elapsed.likelyMin, each.name).toBeGreaterThan(0)
      expect(each.elapsed.giveTillMin, each.name).toBeGreaterThan(each.elapsed.likelyMin ?? Infinity)
    }
  })

  it('take longer in the air than in the hands', () => {
    for (const each of list) expect(each.elapsed.likelyMin, each.name).toBeGreaterThanOrEqual(each.pieceMin)
  })

  it('count hands by hand: the box', () => {
    const box = list.find(each => each.libraryKey === 'painted-waxed-box')
    // Per piece: 10+12+10+6+10+10+6+1+5+10+6+8+20 = 114 of work, 5+4 buffing, 2+2 blotters, 3+1 taking out.
    expect(box?.pieceMin).toBe(114 + 9 + 4 + 4)
    expect(box?.cautions.length).toBeGreaterThan(0)
  })

  it('leave out what was put away and what is another studio\'s', () => {
    const other = testStudio(now)
    const id = other.scheduleOf('painted-waxed-box')!
    other.db.update(finishingSchedule).set({ archivedAt: now }).where(eq(finishingSchedule.id, id)).run()
    const row = other.db.select().from(studio).get()!
    expect(listSchedules(other.db, row, now).map(each => each.id)).not.toContain(id)
    expect(listSchedules(other.db, { ...row, id: 99 }, now)).toEqual([])
  })
})

describe('one schedule', () => {
  it('says what each step waits for', () => {
    const found = findSchedule(made.db, owner, made.scheduleOf('painted-waxed-box')!, now)
    if (isRefusal(found)) throw new Error(found.message)
    const link = found.links.find(each => each.from === 'glue-box' && each.to === 'clean-up')
    expect(link).toMatchObject({ milestone: 'full-strength', wait: { promised: true } })
    expect(link?.wait?.giveTillMin).toBeGreaterThan(link?.wait?.likelyMin ?? Infinity)
    expect(found.steps.find(each => each.key === 'glue-box')?.held?.likelyMin).toBeGreaterThan(0)
    expect(found.steps.find(each => each.key === 'clean-up')).toMatchObject({ dry: null, held: null, material: null })
  })

  it('is absent from a studio it is not in', () => {
    expect(findSchedule(made.db, { ...owner, id: 99 }, made.scheduleOf('painted-waxed-box')!, now)).toMatchObject({ ok: false, reason: 'absent' })
  })
})
