import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { materialFigure, pieceStep } from '~~/db/schema'
import { atWork } from '../../../helpers/advice-work'

/** A frame whose corners are next and take some minutes: yellow wood glue is open for 4 at the least at 21 °C and 50 %, and joined it can be moved for 10 more. */
function cornersNext(tempC: number | null, rh = 0.5, minutes = 16) {
  const studio = atWork()
  if (tempC !== null) studio.read(tempC, rh)
  studio.leaveAllBut('mitred-frame', studio.start('mitred-frame'), ['glue-up'])
  takes(studio, minutes)
  return studio
}
const takes = (studio: ReturnType<typeof cornersNext>, pieceMin: number) => studio.db.update(pieceStep).set({ pieceMin }).run()

describe('a glue-up against the open time of its glue', () => {
  it('is told with both numbers and what to do', () => {
    expect(cornersNext(21).line('open-time')?.text).toBe('Once spread, this glue may skin over or set after 4 min, and joined it can be moved for 10 min more; this glue-up takes 16. Spread only as much as is joined within that, have another pair of hands, work in a cooler room, or use a glue that stays open longer.')
  })

  it('goes by the air of the room', () => {
    // 4 min / 1.550 = 2.58 and 10 min / 1.550 = 6.45 in warm dry air; 4 min / 0.609 = 6.56 and 10 / 0.609 = 16.4 at 12 °C, which is too near the glue's 10 °C for a cooler room.
    expect(cornersNext(30, 0.3).line('open-time')?.text).toMatch(/after 2 min, and joined it can be moved for 6 min more; this glue-up takes 16\. .*work in a cooler room/)
    expect(cornersNext(12).line('open-time')).toBeUndefined()
    const cold = cornersNext(12, 0.5, 23).line('open-time')?.text
    expect(cold).toMatch(/after 6 min, and joined it can be moved for 16 min more; this glue-up takes 23\./)
    expect(cold).not.toMatch(/room/)
  })

  it('goes by the sheet where nobody read the air', () => {
    const text = cornersNext(null).line('open-time')?.text
    expect(text).toMatch(/after 4 min, .* 10 min more; this glue-up takes 16\./)
    expect(text).not.toMatch(/room/)
  })

  it('is spoken of past the last minute and not at it', () => {
    const studio = cornersNext(21)
    takes(studio, 14)
    expect(studio.line('open-time')).toBeUndefined()
    takes(studio, 15)
    expect(studio.line('open-time')?.text).toMatch(/this glue-up takes 15\./)
  })

  it('goes by the open time alone where the sheet says nothing of the joint', () => {
    const studio = cornersNext(21, 0.5, 5)
    expect(studio.line('open-time')).toBeUndefined()
    studio.db.delete(materialFigure).where(eq(materialFigure.name, 'closed assembly')).run()
    expect(studio.line('open-time')?.text).toMatch(/may skin over or set after 4 min; this glue-up takes 5\./)
  })

  it('is not spoken of where the sheet gives no open time', () => {
    const studio = cornersNext(21)
    studio.db.delete(materialFigure).where(eq(materialFigure.name, 'open time')).run()
    expect(studio.line('open-time')).toBeUndefined()
  })

  it('says so of glue that is open for less than a minute', () => {
    const studio = cornersNext(21)
    studio.db.update(materialFigure).set({ low: 0.1, typical: 0.3, high: 0.5 }).where(eq(materialFigure.name, 'open time')).run()
    expect(studio.line('open-time')?.text).toMatch(/may skin over or set within a minute, and joined it can be moved for 10 min more; this glue-up takes 16\./)
  })

  it('speaks of a coat never', () => {
    const studio = cornersNext(21)
    studio.db.update(pieceStep).set({ kind: 'coat' }).run()
    expect(studio.line('open-time')).toBeUndefined()
  })
})
