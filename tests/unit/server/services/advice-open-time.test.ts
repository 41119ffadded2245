import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { materialFigure, pieceStep } from '~~/db/schema'
import { atWork } from '../../../helpers/advice-work'

/** A frame whose corners are next, with yellow wood glue: 8 minutes, and the glue is open for 4 at the least at 21 °C and 50 %. */
function cornersNext(tempC: number | null, rh = 0.5) {
  const studio = atWork()
  if (tempC !== null) studio.read(tempC, rh)
  studio.leaveAllBut('mitred-frame', studio.start('mitred-frame'), ['glue-up'])
  return studio
}
const takes = (studio: ReturnType<typeof cornersNext>, pieceMin: number) => studio.db.update(pieceStep).set({ pieceMin }).run()

describe('a glue-up against the open time of its glue', () => {
  it('is told with both numbers and what to do', () => {
    expect(cornersNext(21).line('open-time')?.text).toBe('Once spread, this glue may skin over or set after 4 min; this glue-up takes 8. Join fewer parts at once, have another pair of hands, work in a cooler room, or use a glue that stays open longer.')
  })

  it('goes by the air of the room', () => {
    // 4 min / 1.550 = 2.58 in warm dry air; 4 min / 0.609 = 6.56 at 12 °C, which is too near the glue's 10 °C for a cooler room.
    expect(cornersNext(30, 0.3).line('open-time')?.text).toMatch(/after 2 min; this glue-up takes 8\. .*work in a cooler room/)
    const cold = cornersNext(12).line('open-time')?.text
    expect(cold).toMatch(/after 6 min; this glue-up takes 8\./)
    expect(cold).not.toMatch(/room/)
  })

  it('goes by the sheet where nobody read the air', () => {
    const text = cornersNext(null).line('open-time')?.text
    expect(text).toMatch(/after 4 min; this glue-up takes 8\./)
    expect(text).not.toMatch(/room/)
  })

  it('is spoken of past the last minute and not at it', () => {
    const studio = cornersNext(21)
    takes(studio, 4)
    expect(studio.line('open-time')).toBeUndefined()
    takes(studio, 5)
    expect(studio.line('open-time')?.text).toMatch(/after 4 min; this glue-up takes 5\./)
  })

  it('is not spoken of where the sheet gives no open time', () => {
    const studio = cornersNext(21)
    studio.db.delete(materialFigure).where(eq(materialFigure.name, 'open time')).run()
    expect(studio.line('open-time')).toBeUndefined()
  })

  it('says so of glue that is open for less than a minute', () => {
    const studio = cornersNext(21)
    studio.db.update(materialFigure).set({ low: 0.1, typical: 0.3, high: 0.5 }).where(eq(materialFigure.name, 'open time')).run()
    expect(studio.line('open-time')?.text).toMatch(/may skin over or set within a minute; this glue-up takes 8\./)
  })

  it('speaks of a coat never', () => {
    const studio = cornersNext(21)
    studio.db.update(pieceStep).set({ kind: 'coat' }).run()
    expect(studio.line('open-time')).toBeUndefined()
  })
})
