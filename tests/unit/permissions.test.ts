import { describe, expect, it } from 'vitest'
import { may, mayDoStep, permissions } from '#shared/permissions'

describe('may', () => {
  it('gives an owner everything', () => {
    expect(permissions.filter(permission => !may('owner', permission))).toEqual([])
  })
  it('keeps people, settings, export and deletion from a maker, and nothing else', () => {
    expect(permissions.filter(permission => !may('maker', permission))).toEqual(['manage people', 'change settings', 'export', 'delete the studio'])
  })
  it('gives a helper what can be done without knowing the material', () => {
    expect(permissions.filter(permission => may('helper', permission))).toEqual(['read the studio', 'record touch tests', 'move pieces', 'do steps', 'add readings', 'add photos', 'choose own calls', 'set own absences'])
  })
})

describe('mayDoStep', () => {
  it('lets a helper do the kinds allowed to them and no other', () => {
    expect(mayDoStep('helper', ['light sanding'], 'light sanding')).toBe(true)
    expect(mayDoStep('helper', ['light sanding'], 'coat')).toBe(false)
    expect(mayDoStep('helper', [], 'light sanding')).toBe(false)
  })
  it('asks no list of a maker or an owner', () => {
    expect(mayDoStep('maker', [], 'coat')).toBe(true)
    expect(mayDoStep('owner', [], 'glue-up')).toBe(true)
  })
})
