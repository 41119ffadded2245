import { describe, expect, it } from 'vitest'
import { groupVerdict, pieceVerdict } from '#shared/verdict/verdict'
import { film, hour, moment, part } from './facts'

const grip = { name: 'back', films: [] }
const of = (changes: Parameters<typeof part>[0]) => pieceVerdict([part(changes)], hour(13), null)
const wet = of({ films: [film()] })
const wetter = of({ films: [film({ handle: moment(hour(15)) })] })
const held = of({ films: [film()], grip })
const heldByBase = of({ films: [film()], grip: { name: 'base', films: [] } })
const dry = of({})
const clamped = of({ films: [film({ hold: 'clamps' })] })

describe('one line for a group of pieces', () => {
  it('says nothing of no pieces', () => {
    expect(groupVerdict([])).toBeNull()
  })

  it('is the worst over its pieces, with the latest next moment of those', () => {
    expect(groupVerdict([dry, wet, wetter, held])).toMatchObject({ kind: 'hands off', line: 7, betterAt: hour(15), betterKind: 'hold by' })
  })

  it('never gets better by itself while one of its worst does not', () => {
    expect(groupVerdict([wet, clamped])).toMatchObject({ kind: 'hands off', line: 3, betterAt: null, betterKind: null })
  })

  it('names a grip only when all agree', () => {
    expect(groupVerdict([held, held])).toMatchObject({ kind: 'hold by', grip: 'back' })
    expect(groupVerdict([held, heldByBase])).toMatchObject({ kind: 'hold by', grip: null })
  })

  it('gathers the latest limit of each kind', () => {
    const soft = of({ films: [film({ touch: moment(hour(8)), handle: moment(hour(9)), hard: moment(hour(18)) })] })
    const firm = of({ films: [film({ touch: moment(hour(8)), handle: moment(hour(9)), gloves: true })] })
    expect(groupVerdict([soft, firm])?.limits).toEqual([
      { kind: 'gloves', until: hour(20) }, { kind: 'stack', until: hour(18) }, { kind: 'wrap', until: hour(20) }, { kind: 'glaze', until: hour(20) },
    ])
    expect(groupVerdict([soft, wet])?.limits).toEqual([])
  })

  it('is the same in whatever order the pieces come', () => {
    expect(groupVerdict([dry, wet, clamped, held])).toEqual(groupVerdict([held, clamped, wet, dry]))
  })
})
