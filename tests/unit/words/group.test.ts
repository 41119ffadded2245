import { describe, expect, it } from 'vitest'
import { groupNames, listText } from '#shared/words/group'

const ledgers = (...numbers: number[]) => numbers.map(no => `Ledger ${no}`)

describe('names of a group', () => {
  it('puts runs of numbers together', () => {
    expect(groupNames(ledgers(1, 2, 3, 4, 6))).toBe('Ledgers 1–\u20604 and 6')
    expect(groupNames(['Tide box 3', 'Tide box 4'])).toBe('Tide boxes 3 and 4')
    expect(groupNames(ledgers(7, 1, 3, 2))).toBe('Ledgers 1–\u20603 and 7')
    expect(groupNames(ledgers(5))).toBe('Ledger 5')
    expect(groupNames(ledgers(2, 4, 6))).toBe('Ledgers 2, 4 and 6')
  })

  it('makes a plural only where plain English is sure of it', () => {
    expect(groupNames(['Study 1', 'Study 2'])).toBe('Studies 1 and 2')
    expect(groupNames(['Tray 1', 'Tray 2'])).toBe('Trays 1 and 2')
    expect(groupNames(['Glass 1', 'Glass 2'])).toBe('Glasses 1 and 2')
    expect(groupNames(['Boxes 1', 'Boxes 2'])).toBe('Boxes 1 and 2')
    expect(groupNames(['Kästchen groß 1', 'Kästchen groß 2'])).toBe('Kästchen groß 1 and 2')
  })

  it('keeps names without numbers, and says how many more of very many', () => {
    expect(groupNames(['Clock case', 'Mirror frame'])).toBe('Clock case and Mirror frame')
    expect(groupNames(['Clock case', ...ledgers(1, 2)])).toBe('Clock case and Ledgers 1 and 2')
    expect(groupNames([...ledgers(1, 2), 'Clock case'])).toBe('Ledgers 1 and 2, and Clock case')
    expect(groupNames(['Ash', 'Birch', 'Cedar', 'Deal', 'Elm'])).toBe('Ash, Birch, Cedar and 2 more')
    expect(groupNames(['Lot 007', 'Lot 008'])).toBe('Lot 007 and Lot 008')
    expect([groupNames([]), listText(['a', 'b', 'c'])]).toEqual(['', 'a, b and c'])
  })
})
