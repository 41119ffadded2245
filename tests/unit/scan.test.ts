import sharp from 'sharp'
import { describe, expect, it } from 'vitest'
import { decodePicture } from '~~/composables/scan/picture'
import { readScanned } from '#shared/scan'
import { isTagCode, makeTagCode, tagPath } from '#shared/tag-code'
import { dotsOf, seenTag } from '../helpers/tag-pictures'
import type { Seen } from '../helpers/tag-pictures'

const code = makeTagCode(() => 0.4)

describe('what a code says', () => {
  it('is a tag of ours by its path, wherever it leads, and by its letters alone', () => {
    expect(isTagCode(code)).toBe(true)
    for (const text of [`http://studio.test:3000/tag/${code}`, `https://elsewhere.test/tag/${code.toLowerCase()}`, ` ${code} `]) expect(readScanned(text)).toEqual({ kind: 'tag', code })
  })
  it('is a piece of ours with the host it leads to', () => {
    expect(readScanned('http://Studio.test:3000/pieces/12')).toEqual({ kind: 'piece', id: 12, host: 'studio.test:3000' })
  })
  it('is foreign where it is anything else', () => {
    const wrong = `${code.slice(0, 4)}${code.endsWith('3') ? '4' : '3'}`
    for (const text of ['', 'WIFI:S:kiln;;', 'https://studio.test/', `https://studio.test/tag/${wrong}`, 'https://studio.test/pieces/0', `https://studio.test/tag/${code}/x`, 'javascript:alert(1)']) expect(readScanned(text)).toEqual({ kind: 'foreign', text })
  })
})

describe('a tag before the camera', () => {
  const text = `http://192.168.1.20:3000${tagPath(code)}`
  const cases: [string, Seen][] = [
    ['straight', {}], ['turned a little', { turned: 17 }], ['on its side', { turned: 90 }], ['on its head', { turned: 163 }], ['blurred', { blur: 2 }], ['dim', { light: 0.18 }],
    ['turned, blurred and dim', { turned: 24, blur: 1.4, light: 0.3 }], ['far away', { wide: 300 }],
  ]
  it.each(cases)('is read %s', async (_, seen) => {
    expect(decodePicture(await dotsOf(await seenTag(text, seen)))).toEqual([text])
  })
  it('is not made up where there is none', async () => {
    expect(decodePicture(await dotsOf(sharp({ create: { width: 640, height: 480, channels: 3, background: '#8a7a66' } })))).toEqual([])
    expect(decodePicture(await dotsOf(await seenTag(text, { blur: 30 })))).toEqual([])
  })
})
