import { describe, expect, it } from 'vitest'
import { decodeText } from '#shared/logger-file/decode'

const line = '19,4 °C'
const wide = (mark: number[]) => Uint8Array.from([...mark, ...Buffer.from(line, 'utf16le')])

describe('the letters of a file', () => {
  it.each([
    ['UTF-8', new TextEncoder().encode(line)],
    ['UTF-8 with a mark', Uint8Array.from([0xEF, 0xBB, 0xBF, ...new TextEncoder().encode(line)])],
    ['the Western set, where the degree sign is one byte', Uint8Array.from([...line].map(letter => letter.charCodeAt(0)))],
    ['UTF-16 with a mark', wide([0xFF, 0xFE])],
    ['UTF-16 without one', wide([])],
  ])('%s', (_name, bytes) => expect(decodeText(bytes)).toBe(line))
  it('are none in a packed table', () => expect(decodeText(Uint8Array.from([0x50, 0x4B, 3, 4, 0x14, 0, 6, 0, 8, 0, 0, 0, 0x21, 0x90]))).toBeNull())
})
