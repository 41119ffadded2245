import { describe, expect, it } from 'vitest'
import { wayCurrent } from '#shared/ways'

describe('the current way', () => {
  it('is the page itself, or the one that a page belongs to', () => {
    expect(wayCurrent('/materials', '/materials')).toBe('page')
    expect(wayCurrent('/materials/', '/materials')).toBe('page')
    expect(wayCurrent('/materials/edit/4', '/materials')).toBe('true')
    expect(wayCurrent('/arrange', '/board')).toBe('true')
    expect(wayCurrent('/walk-round', '/hands')).toBe('true')
  })
  it('is no other, however alike the addresses begin', () => {
    expect(wayCurrent('/sheets', '/sheet')).toBeUndefined()
    expect(wayCurrent('/board', '/hands')).toBeUndefined()
    expect(wayCurrent('/materials', '/materials/new')).toBeUndefined()
  })
})
