import { describe, expect, it } from 'vitest'
import { actionOf, forgetKey, learnKey, readKeyMap, usualKeys } from '#shared/bench/keys'

describe('the key of a foot-switch', () => {
  it('is learned for one thing, and let go by what it did before', () => {
    expect(learnKey(usualKeys, 'done', 'b')).toEqual({ map: { ...usualKeys, done: 'b' } })
    expect(learnKey(usualKeys, 'done', 'PageDown')).toEqual({ map: { ...usualKeys, next: null, done: 'PageDown' } })
  })
  it('is none of those that work the page, and no key that says nothing by itself', () => {
    expect(['Tab', 'Enter', ' ', 'Escape', 'ArrowDown'].map(key => learnKey(usualKeys, 'next', key))).toEqual(Array(5).fill({ problem: 'kept' }))
    expect(learnKey(usualKeys, 'next', 'Shift')).toEqual({ problem: 'silent' })
  })
  it('does its one thing per press: not while held, not when a worn switch bounces', () => {
    const press = (key: string, at: number, repeat = false) => actionOf(usualKeys, { key, repeat, at }, 1000)
    expect([press('F8', 1400), press('F8', 1299), press('F8', 1400, true), press('x', 1400)]).toEqual(['done', null, null, null])
    expect(actionOf(usualKeys, { key: 'PageDown', repeat: false, at: 0 }, null)).toBe('next')
    expect(actionOf(forgetKey(usualKeys, 'done'), { key: 'F8', repeat: false, at: 0 }, null)).toBeNull()
  })
  it('is read as the device kept it, and as at first where that is no map', () => {
    expect(readKeyMap({ ...usualKeys, next: 'b', undo: null })).toEqual({ ...usualKeys, next: 'b', undo: null })
    expect([readKeyMap(null), readKeyMap('x'), readKeyMap({ next: 7 })]).toEqual([usualKeys, usualKeys, usualKeys])
  })
})
