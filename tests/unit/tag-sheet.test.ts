import QrCode from 'qrcode'
import decodeQr from 'qr/decode.js'
import { describe, expect, it } from 'vitest'
import { papers, qrPath, qrRim, qrSquareMm, tagLayout, tagMm, tagNamePoints, tagSheets } from '#shared/tag-sheet'
import { pieceLabels, tagLabels } from '#shared/tag-label'

describe('tags on paper', () => {
  it('lie in the middle of a sheet, as many as it holds', () => {
    // A4: 3 x 62 = 186 of 210 leaves 12 on either side; 6 x 42 = 252 of 297 leaves 22.5 above and below.
    expect(tagLayout('a4')).toMatchObject({ columns: 3, rows: 6, perSheet: 18, left: 12, top: 22.5 })
    // Letter: 215.9 - 186 = 29.9; 279.4 - 252 = 27.4.
    const letter = tagLayout('letter')
    expect(letter).toMatchObject({ columns: 3, rows: 6, perSheet: 18 })
    expect([letter.left, letter.top].map(mm => mm.toFixed(2))).toEqual(['14.95', '13.70'])
    expect(tagLayout('roll')).toMatchObject({ columns: 1, rows: 1, left: 0, top: 0, width: 62, height: 42 })
  })

  it('never reach over an edge, and go on on the next sheet', () => {
    for (const paper of papers) {
      const { left, top, columns, rows, width, height } = tagLayout(paper)
      expect(left + columns * tagMm.width).toBeLessThanOrEqual(width)
      expect(top + rows * tagMm.height).toBeLessThanOrEqual(height)
    }
    expect(tagSheets(Array.from({ length: 20 }, (_, n) => n), 'a4').map(sheet => sheet.length)).toEqual([18, 2])
    expect(tagSheets([], 'roll')).toEqual([])
  })

  it('print a long name smaller, never cut', () => {
    expect([tagNamePoints('Shelf A'), tagNamePoints('Hooks by the stove, left'), tagNamePoints('x'.repeat(60)), tagNamePoints('x'.repeat(80))]).toEqual([13, 10, 8.5, 7.5])
  })

  it('draw a code that an independent decoder reads, with squares of half a millimetre or more', () => {
    for (const url of ['http://192.168.1.20:3000/tag/YYYY6', 'https://stillwet.a-studio-with-a-long-name.example.org/tag/YYYY6']) {
      const { size, data } = QrCode.create(url, { errorCorrectionLevel: 'M' }).modules
      const side = size + 2 * qrRim
      // Six pixels a square, from the very path that is printed.
      const pixels = rasterOf(qrPath(size, (row, column) => data[row * size + column] === 1), side, 6)
      expect(decodeQr({ width: side * 6, height: side * 6, data: pixels })).toBe(url)
      expect(qrSquareMm(size)).toBeGreaterThan(0.5)
    }
    // Version 3 has 29 squares, 37 with the rim: 28 / 37 = 0.757 mm.
    expect(qrSquareMm(29)).toBeCloseTo(0.757, 3)
  })
})

/** Fills the rectangles of a path with dark, as a printer would. */
function rasterOf(path: string, side: number, scale: number): Uint8Array {
  const edge = side * scale
  const data = new Uint8Array(edge * edge * 4).fill(255)
  for (const [, x, y, run] of path.matchAll(/M(\d+) (\d+)h(\d+)v1h-\3z/g)) {
    for (let row = Number(y) * scale; row < (Number(y) + 1) * scale; row++) {
      for (let column = Number(x) * scale; column < (Number(x) + Number(run)) * scale; column++) data.fill(0, (row * edge + column) * 4, (row * edge + column) * 4 + 3)
    }
  }
  return data
}

describe('what a tag says', () => {
  const where = { origin: 'http://192.168.1.20:3000', studio: 'Fir Lane', day: 'Tue 1 Dec' }
  const shelf = { kind: 'place' as const, id: 4, code: 'YYYY6', name: 'Shelf A', room: { id: 1, name: 'Bench room' }, pieces: ['Bowl 1'], cautions: ['oily rags', 'sanding dust'] }

  it('is the code for the hand, the address for the camera, the room, and the gravest caution first', () => {
    expect(tagLabels([shelf], where)).toEqual([{ key: 'place 4', url: 'http://192.168.1.20:3000/tag/YYYY6', code: 'YYYY6', name: 'Shelf A', says: 'Bench room', caution: 'Rags burn: flat outdoors or in the water can. Catch the dust, mask on. Read the data sheet.', asOf: 'As of Tue 1 Dec' }])
  })

  it('has no caution line where nothing asks for one, names the studio on a carrier, and waits for a code', () => {
    expect(tagLabels([{ ...shelf, kind: 'carrier', name: 'Tray 1', room: null, cautions: [] }, { ...shelf, code: null }], where)).toMatchObject([{ key: 'carrier 4', says: 'Carrier, Fir Lane', caution: null }])
    expect(pieceLabels([{ id: 7, name: 'Bowl 1', cautions: ['gloves'] }], { origin: where.origin, batch: 'Bowls', day: where.day })).toMatchObject([{ url: 'http://192.168.1.20:3000/pieces/7', code: null, says: 'Bowls', caution: 'Gloves till cured. Read the data sheet.' }])
  })
})
