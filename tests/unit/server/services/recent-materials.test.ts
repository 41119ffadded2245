import { describe, expect, it } from 'vitest'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { pieceStates } from '~~/server/services/piece-states'
import { ratesOf } from '~~/server/services/rates'
import { recentMaterials } from '~~/server/services/recent-materials'
import { rateText } from '#shared/words/rates'
import { hour, minute, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const iso = (at: number) => new Date(at).toISOString()

function withCoats(keys: string[]) {
  const studio = testStudio(now)
  const { db, studioId, members, places } = studio
  const started = startBatch(db, studioId, { member: members.maker }, { clientKey: 'start-one', name: 'Boards', scheduleId: null, pieces: ['Board 1'], sizeUnits: 1, placeId: places.shelf, order: null, startsAt: iso(now - 30 * hour), oldObject: false }, now)
  if (!started.ok) throw new Error(started.message)
  keys.forEach((key, index) => {
    const pieces = pieceStates(db, studioId, started.pieceIds).map(({ id, version }) => ({ id, version }))
    const told = recordAct(db, studioId, { member: members.maker }, { clientKey: `coat-on-${index}`, kind: 'coat on', doneAt: iso(now - (keys.length - index) * 5 * minute), pieces, vapour: { exhaust: 'running', flamesOff: true, nobodyElse: true }, body: { step: null, materialVersionId: studio.materialOf(key) } }, now)
    if (!told.ok) throw new Error(told.message)
  })
  return studio
}

describe('the materials on the big keys', () => {
  it('are those in common use while nothing has been put on', () => {
    const { db, studioId } = withCoats([])
    const { recent, others } = recentMaterials(db, studioId, true)
    expect(recent.map(each => each.name).slice(0, 2)).toEqual(['Acrylic gesso', 'Acrylic varnish'])
    expect(recent).toHaveLength(6)
    expect(others.some(each => recent.some(one => one.versionId === each.versionId))).toBe(false)
  })

  it('are the last used first, each once, filled up with the common ones', () => {
    const { db, studioId, materialOf } = withCoats(['wax', 'shellac', 'wax', 'bole'])
    const { recent } = recentMaterials(db, studioId, true)
    // In the order of their last coats: bole 5 min ago, wax 10, shellac 15.
    expect(recent.slice(0, 3).map(each => each.versionId)).toEqual(['bole', 'wax', 'shellac'].map(materialOf))
    expect(new Set(recent.map(each => each.versionId)).size).toBe(6)
  })

  it('belong to the studio that asks', () => {
    const { db, studioId } = withCoats(['wax'])
    expect(recentMaterials(db, studioId + 1, true)).toEqual({ recent: [], others: [] })
  })
})

describe('why a film dries as fast as it does', () => {
  it('compares the room with the sheet, and says when the air is only assumed', () => {
    const { db, studioId } = withCoats(['acrylic-gesso'])
    const coatId = pieceStates(db, studioId, null)[0]?.groups[0]?.films[0]?.coatId ?? 0
    const [rate] = ratesOf(db, studioId, [coatId], now)
    expect(rate).toMatchObject({ coatId, material: 'Acrylic gesso', towards: 'set-to-touch', assumed: true })
    // The whole is not the product of its parts for water, but it lies on their side of 1.
    expect(rate && Math.sign(Math.log(rate.factor))).toBe(rate && Math.sign(Math.log(rate.warmth * rate.damp)))
    expect(ratesOf(db, studioId + 1, [coatId], now)).toEqual([])
  })

  it('names the cause that pulls the same way', () => {
    const rate = { coatId: 1, material: 'Acrylic gesso', towards: 'dry-to-handle' as const, factor: 0.41, warmth: 1, damp: 0.41, tempC: 20, rh: 0.78, assumed: false, sheetTempC: 20, sheetRh: 0.5 }
    expect(rateText(rate)).toBe('Acrylic gesso, towards dry to handle: 0.41 of sheet speed: 78 % humidity.')
    expect(rateText({ ...rate, factor: 0.3, warmth: 0.7, tempC: 12 }, 'us')).toBe('Acrylic gesso, towards dry to handle: 0.30 of sheet speed: 54 °F, 78 % humidity.')
    expect(rateText({ ...rate, factor: 1.02, damp: 1.02, rh: 0.49 })).toBe('Acrylic gesso, towards dry to handle: as fast as its sheet says, at 20 °C, 49 % humidity.')
    expect(rateText({ ...rate, factor: 0, warmth: 0, tempC: 2 })).toBe('Acrylic gesso, towards dry to handle: stands still at 2 °C, 78 % humidity.')
  })
})
