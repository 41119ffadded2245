import { describe, expect, it } from 'vitest'
import { pieceVerdict } from '#shared/verdict/verdict'
import { film, hour, minute, moment, part, unpromised } from './facts'

const at = (hours: number, ...parts: ReturnType<typeof part>[]) => pieceVerdict(parts, hour(hours), null)

describe('what a piece may be held by', () => {
  it('names the grip', () => {
    expect(at(12, part({ films: [film()], grip: { name: 'spine', films: [] } }))).toMatchObject({ kind: 'hold by', grip: 'spine', reason: { code: 'grip wet', grip: 'spine' } })
  })

  it('takes a grip on another part that moves along', () => {
    expect(at(12, part({ films: [film()] }), part({ partId: 2, grip: { name: 'base', films: [] } }))).toMatchObject({ kind: 'hold by', grip: 'base' })
  })

  it('takes the carrier like any other grip', () => {
    expect(at(12, part({ films: [film()], grip: { name: 'carrier', films: [] } }))).toMatchObject({ kind: 'hold by', grip: 'carrier' })
  })

  it('refuses a grip that carries the wet film itself', () => {
    expect(at(13, part({ films: [film({ coatId: 7 })], grip: { name: 'back', films: [7] } }))).toMatchObject({ kind: 'hands off', line: 7 })
  })

  it('takes a grip whose own film is past dry to handle', () => {
    // Film 7 on the grip is dry to handle at 10:00; film 8 on the front is set to touch at 12:00.
    const old = film({ coatId: 7, touch: moment(hour(9)), tackFree: moment(hour(9)), handle: moment(hour(10)) })
    expect(at(12, part({ films: [old, film({ coatId: 8 })], grip: { name: 'back', films: [7] } }))).toMatchObject({ kind: 'hold by', grip: 'back' })
  })

  it('takes the next grip when the first is wet', () => {
    const first = part({ films: [film({ coatId: 7 })], grip: { name: 'back', films: [7] } })
    expect(at(12, first, part({ partId: 2, grip: { name: 'spine', films: [] } }))).toMatchObject({ kind: 'hold by', grip: 'spine' })
  })

  it('waits for the worst film anywhere on the piece', () => {
    const slow = film({ coatId: 2, touch: moment(hour(13)), handle: moment(hour(15)) })
    const parts = [part({ films: [film()], grip: { name: 'back', films: [] } }), part({ partId: 2, films: [slow] })]
    expect(pieceVerdict(parts, hour(13) - 1, null)).toMatchObject({ kind: 'hands off', line: 7 })
    expect(pieceVerdict(parts, hour(13), null)).toMatchObject({ kind: 'hold by', line: 12 })
  })

  it('leaves a film that must lie level until it is tack-free, the carrier included', () => {
    const resin = part({ films: [film({ mustLieLevel: true })], grip: { name: 'carrier', films: [] } })
    // Set to touch 12:00, tack-free 13:00.
    expect(pieceVerdict([resin], hour(13) - 1, null).kind).toBe('hands off')
    expect(pieceVerdict([resin], hour(13), null).kind).toBe('hold by')
  })

  it('lets dry to handle speak where the ladder has no set to touch or tack-free', () => {
    const grip = { name: 'back', films: [] }
    expect(at(13.9, part({ films: [film({ touch: null })], grip })).kind).toBe('hands off')
    expect(at(13.9, part({ films: [film({ tackFree: null, mustLieLevel: true })], grip })).kind).toBe('hands off')
    expect(at(14, part({ films: [film({ touch: null, tackFree: null, mustLieLevel: true })], grip })).kind).toBe('may be handled')
  })

  it('gives no grip on a size before it is cured', () => {
    // At tack 10:00; cured 40:00, which `handle` carries for a size.
    const size = part({ films: [film({ kind: 'size', touch: moment(hour(10)), handle: moment(hour(40)) })], grip: { name: 'back', films: [] } })
    expect(at(11, size)).toMatchObject({ kind: 'hands off', line: 7 })
    expect(pieceVerdict([size], hour(40) - 1, null).kind).toBe('hands off')
    expect(at(40, size).kind).toBe('may be handled')
  })

  it('waits for out of clamps on a glue line, then for somebody to say it is out', () => {
    const glue = film({ kind: 'glue-up', touch: null, hold: 'clamps', strength: moment(hour(38)) })
    expect(at(10, part({ films: [glue] }))).toMatchObject({ kind: 'hands off', line: 3, reason: { hold: 'clamps', giveTillAt: hour(14) - 20 * minute }, betterAt: null })
    expect(at(15, part({ films: [glue] }))).toMatchObject({ kind: 'hands off', line: 3 })
    expect(at(15, part({ films: [{ ...glue, hold: null }] }))).toMatchObject({ kind: 'may be handled', limits: [{ kind: 'strain', until: hour(38) }] })
  })

  it('gives no grip while a wet film has no promise', () => {
    const damp = part({ films: [film({ handle: unpromised(hour(15)) })], grip: { name: 'back', films: [] } })
    expect(at(14, damp)).toMatchObject({ kind: 'hands off', reason: { code: 'wet', until: null, reason: 'too-damp' } })
    expect(at(15, damp)).toMatchObject({ kind: 'ask first', reason: { code: 'no promise', reason: 'too-damp' } })
  })
})

describe('limits', () => {
  it('stand beside hold by and may be handled until their own 98 % time', () => {
    const coat = part({ films: [film({ gloves: true })] })
    expect(at(14, coat).limits).toEqual([
      { kind: 'gloves', until: hour(20) }, { kind: 'stack', until: hour(16) }, { kind: 'wrap', until: hour(20) }, { kind: 'glaze', until: hour(20) },
    ])
    expect(at(16, coat).limits.map(limit => limit.kind)).toEqual(['gloves', 'wrap', 'glaze'])
    expect(at(20, coat).limits).toEqual([])
    expect(at(12, part({ films: [film()], grip: { name: 'back', films: [] } })).limits).toContainEqual({ kind: 'stack', until: hour(16) })
  })

  it('do not stand beside hands off or ask first', () => {
    expect(at(9, part({ films: [film({ gloves: true })] })).limits).toEqual([])
    expect(at(14, part({ films: [film({ gloves: true })], intake: 'lead' })).limits).toEqual([])
  })

  it('last for ever without a time, and the slowest film speaks', () => {
    const endless = film({ coatId: 2, hard: null, cured: unpromised(hour(15)) })
    expect(at(15, part({ films: [film(), endless] })).limits).toEqual([{ kind: 'stack', until: null }, { kind: 'wrap', until: null }, { kind: 'glaze', until: null }])
    const slow = film({ coatId: 2, hard: moment(hour(18)) })
    expect(at(15, part({ films: [film(), slow] })).limits[0]).toEqual({ kind: 'stack', until: hour(18) })
  })

  it('end with a maker\'s word', () => {
    expect(at(15, part({ films: [film({ hard: moment(hour(16), { reachedAt: hour(15) }) })] })).limits.map(limit => limit.kind)).toEqual(['wrap', 'glaze'])
  })
})
