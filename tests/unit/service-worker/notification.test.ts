import { describe, expect, it } from 'vitest'
import { noticeFor, pathAfter, readPush } from '../../../service-worker/notification'

const push = (path: string) => readPush(JSON.stringify({ title: 'Start by 13:50', body: 'Ledgers', path, tag: 'stable' }))
const keys = (path: string) => noticeFor(push(path)).options.actions.map(action => action.action)

describe('a notification', () => {
  it('carries the stable id as its tag', () => {
    expect(noticeFor(push('/hands?turn=7'))).toMatchObject({ title: 'Start by 13:50', options: { body: 'Ledgers', tag: 'stable', data: { path: '/hands?turn=7' }, requireInteraction: false } })
  })

  it('offers the keys that answer it', () => {
    expect(keys('/hands?turn=7&act=coat')).toEqual(['coat-on', 'still-tacky'])
    expect(keys('/hands?turn=7')).toEqual(['dry-enough', 'still-tacky'])
    expect(keys('/hands?rags=3')).toEqual(['flat-outdoors', 'in-water-can'])
    expect(keys('/hands?list=leaving')).toEqual([])
  })

  it('is shown even when the push cannot be read', () => {
    for (const text of [null, '', 'nonsense', '{}', '[]', 'null']) expect(readPush(text)).toMatchObject({ title: 'A call from the studio', path: '/' })
  })

  it('opens pages of its own only, with what the key says as a question', () => {
    expect(['//elsewhere.test/', '/\\elsewhere.test', 'https://elsewhere.test', 'javascript:alert(1)'].map(path => push(path).path)).toEqual(['/', '/', '/', '/'])
    expect(pathAfter({ path: '/hands?turn=7' }, 'coat-on')).toBe('/hands?turn=7&say=coat-on')
    expect(pathAfter({ path: '/hands' }, '')).toBe('/hands')
    expect(pathAfter(null, 'coat-on')).toBe('/?say=coat-on')
  })
})
