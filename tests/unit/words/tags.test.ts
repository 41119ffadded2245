import { describe, expect, it } from 'vitest'
import { partsSuffix } from '#shared/words/board'
import { printWords } from '#shared/words/tags'

describe('the words of tags', () => {
  it('tell the setting of the server to owners alone', () => {
    expect(printWords.loopback('http://localhost:3000', true)).toContain('STILLWET_PUBLIC_URL')
    expect(printWords.loopback('http://localhost:3000', false)).toBe('The codes lead to http://localhost:3000, which only this computer can open. Open this page by the address that phones use, or ask an owner which one that is.')
  })
})

describe('what stands apart from its piece', () => {
  it('is named, or counted beside it', () => {
    expect([partsSuffix([]), partsSuffix(['Spine']), partsSuffix(['Lid', 'Tray', 'Handle'])]).toEqual(['', ', spine', ' (3 parts)'])
  })
})
