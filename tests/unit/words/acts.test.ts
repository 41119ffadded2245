import { describe, expect, it } from 'vitest'
import { actBodies } from '#shared/schemas/act'
import { actKinds, goneWays } from '#shared/terms'
import { actText } from '#shared/words/steps'

describe('every kind of act', () => {
  it.each(actKinds)('%s has a sentence for the history, and none is another\'s', (kind) => {
    expect(actText(kind)).toMatch(/^[a-z]/)
    expect(actKinds.filter(each => actText(each) === actText(kind))).toEqual([kind])
  })

  it('can be corrected and taken back, but for those that have a page or a cause of their own', () => {
    // A start is the batch itself; a missed window is found by the clock; rooms and rags are answered where they are asked.
    expect(actKinds.filter(kind => !(kind in actBodies))).toEqual(['batch started', 'window missed', 'room opened', 'rags answered'])
  })

  it('says how a piece went, where it is back, and what it was put with', () => {
    expect(goneWays.map(gone => actText('gone', { gone }))).toEqual(['sold', 'given away', 'lost', 'discarded'])
    expect(actText('back', { place: 'Shelf A' })).toBe('back in the studio: Shelf A')
    expect(actText('regrouped', { batch: 'Seconds' })).toBe('put with the batch Seconds')
    expect(actText('cancelled', { reason: 'the order fell through' })).toBe('batch cancelled: the order fell through')
  })
})
