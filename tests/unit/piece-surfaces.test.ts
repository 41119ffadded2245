import { describe, expect, it } from 'vitest'
import { chalkRung, surfaceName, surfaceStrip, surfacesOf } from '#shared/piece-surfaces'
import type { LayerLine } from '#shared/schemas/piece-detail'
import type { FilmState, GroupState } from '#shared/schemas/piece-state'

const hour = 60 * 60_000
const now = Date.parse('2026-04-07T10:00:00Z')
const rung = (name: string, hours: number) => ({ name, likelyAt: now + hours * hour, p90At: now + 2 * hours * hour, p98At: now + 3 * hours * hour, reachedAt: null, reason: null })
const film = (coatId: number, layer: number, faces: string[], over: Partial<FilmState> = {}): FilmState => ({
  coatId, actId: coatId, kind: 'coat', step: `Coat ${coatId}`, material: 'Gesso', materialVersionId: 1, solventBorne: false, mustLieLevel: false, glovesUntil: null, partIds: [1], faces, layer,
  beganAt: now - hour, endedAt: now - hour, hold: null, milestones: [rung('set-to-touch', 0.2), rung('dry-to-handle', 1), rung('cured', 200)], windows: [], doubts: [], ...over,
})
const line = (coatId: number, layer: number, faces: string[], settled = false): LayerLine => ({ coatId, what: `Coat ${coatId}`, material: 'Gesso', endedAt: now - 48 * hour, partIds: [1], faces, layer, settled })
const group = (films: FilmState[]): GroupState => ({ parts: [{ partId: 1, key: 'lid', name: 'Lid', grip: null, missingAt: null, seenAt: null }], placeId: 1, roomId: 1, carrier: null, films })

describe('surfaces', () => {
  it('lay films of the same faces over one another, the top one first, dry ones beneath', () => {
    const [top, underside] = surfacesOf(group([film(2, 2, ['top']), film(3, 1, ['underside'])]), [line(1, 1, ['top'], true), line(2, 2, ['top'])])
    expect(top?.layers.map(layer => [layer.line.coatId, layer.film === null])).toEqual([[2, false], [1, true]])
    // Coat 3 was told after the lines were read: the state's own film stands in.
    expect(underside?.layers.map(layer => layer.line.what)).toEqual(['Coat 3'])
  })
  it('leave out a film taken off since, and put what is dry through last', () => {
    const surfaces = surfacesOf(group([film(5, 1, ['back'])]), [line(4, 1, ['front'], true), line(9, 1, ['edge'])])
    expect(surfaces.map(each => each.key)).toEqual(['1|back', '1|front'])
  })
  it('are called by part and face, by face alone on a piece of one part', () => {
    const [surface] = surfacesOf(group([film(1, 1, ['top'])]), [])
    expect(surfaceName(surface!, group([]), { top: 'Top' }, false)).toBe('Lid: Top')
    expect(surfaceName(surface!, group([]), { top: 'Top' }, true)).toBe('Top')
  })
})

describe('the strip of a surface', () => {
  it('shows every film and the rungs of the top one that are near', () => {
    const [surface] = surfacesOf(group([film(1, 1, ['top']), film(2, 2, ['top'], { beganAt: now - 2 * hour })]), [])
    const strip = surfaceStrip(surface!, [], now, 'UTC')
    expect(strip?.coats).toHaveLength(2)
    expect(strip?.milestones.map(each => each.label)).toEqual(['set to touch', 'dry to handle'])
    expect(strip?.fromAt).toBe(now - 2 * hour)
    // The last doubt ends two hours ahead; a quarter of an hour of margin.
    expect(strip?.toAt).toBe(now + 2 * hour + 15 * 60_000)
  })
  it('is none where all is dry', () => {
    const [surface] = surfacesOf(group([]), [line(1, 1, ['top'], true)])
    expect(surfaceStrip(surface!, [], now, 'UTC')).toBeNull()
  })
  it('turns to chalk at dry to handle, for glue when it comes out of the clamps', () => {
    expect(chalkRung(film(1, 1, []))?.name).toBe('dry-to-handle')
    expect(chalkRung(film(1, 1, [], { kind: 'glue-up', milestones: [rung('out-of-clamps', 1), rung('full-strength', 9)] }))?.name).toBe('out-of-clamps')
  })
})
