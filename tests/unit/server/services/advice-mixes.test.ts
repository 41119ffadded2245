import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { materialFigure, pieceStep } from '~~/db/schema'
import { piecesOfMix } from '~~/server/work/pots'
import { atWork } from '../../../helpers/advice-work'

const trays = 5

/** Five trays whose handles are next, glued on with slow epoxy: 8 minutes each, and a mix lasts 20 minutes at the least at 22 °C. */
function handlesNext(tempC: number) {
  const studio = atWork()
  studio.read(tempC, 0.5)
  for (let i = 0; i < trays; i++) studio.leaveAllBut('resin-tray', studio.start('resin-tray'), ['handles-on'])
  return studio
}

describe('what goes off in its pot', () => {
  it('is told how often to mix before the work begins, once for all that are alike', () => {
    // Two trays are 16 minutes, three would be 24.
    const studio = handlesNext(22)
    const line = studio.line('several-mixes')
    expect(line?.text).toBe('What is mixed may go off after 20 min: enough for 2 of these 5. Mix 3 times.')
    expect(line?.turnIds).toHaveLength(trays)
  })

  it('lasts longer in the cold, and so for more', () => {
    // About half as quick ten degrees colder: at 16 °C some 30 minutes at the least, three trays of 8.
    expect(handlesNext(16).line('several-mixes')?.text).toMatch(/enough for 3 of these 5\. Mix 2 times\.$/)
  })

  it('is not spoken of where one mix is enough, nor where it lasts no single piece', () => {
    const quick = handlesNext(22)
    quick.db.update(pieceStep).set({ pieceMin: 4 }).run()
    expect(quick.line('several-mixes')).toBeUndefined()
    const short = handlesNext(22)
    short.db.update(materialFigure).set({ low: 5, typical: 6, high: 7 }).where(eq(materialFigure.name, 'pot life')).run()
    expect(short.line('several-mixes')).toBeUndefined()
  })

  it('is enough for whole pieces only', () => {
    const pot = { minutes: 30, least: 20, sheetMinutes: 30, tempC: null }
    expect([piecesOfMix(pot, 10), piecesOfMix(pot, 11), piecesOfMix(pot, 21), piecesOfMix(pot, 0)]).toEqual([2, 1, null, null])
  })
})
