import { describe, expect, it } from 'vitest'
import { clearLabels } from '#shared/axis-labels'

const hours = ['12:00', '18:00', 'Thu', '6:00', '12:00', '18:00', 'Fri']
const labels = hours.map((says, index) => ({ x: (index + 1) / 8, says, rank: /^[A-Z]/.test(says) ? 0 : says === '12:00' ? 1 : 2 }))
const shownOn = (width: number, letter: number) => hours.filter((_, index) => clearLabels(labels, width, letter)[index])

describe('the words along an axis', () => {
  it('all stand where they keep apart', () => {
    expect(shownOn(600, 7)).toEqual(hours)
  })

  it('keep the days where there is no room for the hours, and noon before the rest', () => {
    expect(shownOn(230, 7)).toEqual(['12:00', 'Thu', '12:00', 'Fri'])
    expect(shownOn(230, 14)).toEqual(['Thu', 'Fri'])
  })

  it('never cover one another, whatever the width', () => {
    for (let width = 40; width < 700; width += 20) {
      const spans = labels.filter((_, index) => clearLabels(labels, width, 7)[index]).map(({ x, says }) => ({ from: x * width - says.length * 3.5, to: x * width + says.length * 3.5 }))
      expect(spans.length).toBeGreaterThan(0)
      for (const [index, span] of spans.entries()) if (index > 0) expect(span.from).toBeGreaterThan(spans[index - 1]!.to)
    }
  })
})
