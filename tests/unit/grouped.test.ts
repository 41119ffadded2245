import { expect, it } from 'vitest'
import { grouped } from '#shared/grouped'

it('keeps the order of keys and rows, and leaves out what has no key', () => {
  const groups = grouped([['b', 1], ['a', 2], ['b', 3], [null, 4]] as const, ([key]) => key)
  expect([...groups]).toEqual([['b', [['b', 1], ['b', 3]]], ['a', [['a', 2]]]])
})
