import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { materialVersion, piece, studio } from '~~/db/schema'
import { recordAct } from '~~/server/services/acts'
import { startBatch } from '~~/server/services/batches'
import { createSchedule } from '~~/server/services/schedule-edits'
import { draftOfPiece, scheduleOffers } from '~~/server/services/schedule-offers'
import { isRefusal } from '~~/server/utils/errors'
import { hour, testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-20T18:00:00Z')
let keys = 0

function made() {
  const bench = testStudio(now)
  const { db, studioId, members, places, materialOf } = bench
  const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()!
  const teller = { member: members.maker }
  const pieces = (name: string, count: number) => {
    const started = startBatch(db, studioId, teller, { clientKey: `offer-${keys += 1}-batch`, name, scheduleId: null, pieces: Array.from({ length: count }, (_, i) => `${name} ${i + 1}`), sizeUnits: 1, placeId: places.shelf, order: null, startsAt: new Date(now - 9 * 24 * hour).toISOString(), oldObject: false }, now)
    if (isRefusal(started)) throw new Error(started.message)
    return started.pieceIds
  }
  const coat = (ids: number[], key: string, agoHours: number) => {
    const versions = ids.map(id => ({ id, version: db.select().from(piece).where(eq(piece.id, id)).get()!.version }))
    const told = recordAct(db, studioId, teller, { clientKey: `offer-${keys += 1}-coat`, kind: 'coat on', doneAt: new Date(now - agoHours * hour).toISOString(), pieces: versions, body: { materialVersionId: materialOf(key), step: null, size: 'normal', name: key } }, now)
    if (isRefusal(told)) throw new Error(told.message)
  }
  const material = (key: string) => db.select().from(materialVersion).where(eq(materialVersion.id, materialOf(key)!)).get()!.materialId
  return { ...bench, owner, pieces, coat, material, offers: () => scheduleOffers(db, owner, now) }
}

describe('what is offered to be kept', () => {
  it('is one coat three times in a row on a piece, not twice', () => {
    const { pieces, coat, offers } = made()
    const ids = pieces('Bowl', 1)
    coat(ids, 'craft-acrylic', 72)
    coat(ids, 'craft-acrylic', 48)
    expect(offers()).toEqual([])
    coat(ids, 'craft-acrylic', 24)
    expect(offers()).toEqual([{ pieceId: ids[0], pieceName: 'Bowl 1', times: 3, steps: 3 }])
  })

  it('is a row of coats done alike at three goings; twelve at once are one going', () => {
    const { pieces, coat, offers } = made()
    const many = pieces('Frame', 12)
    coat(many, 'acrylic-gesso', 100)
    coat(many, 'craft-acrylic', 80)
    expect(offers()).toEqual([])
    for (const name of ['Tray', 'Box']) {
      const ids = pieces(name, 2)
      coat(ids, 'acrylic-gesso', 60)
      coat(ids, 'craft-acrylic', 40)
    }
    expect(offers()).toMatchObject([{ times: 3, steps: 2, pieceName: 'Box 2' }])
  })

  it('is not offered again once it is kept', () => {
    const { db, owner, members, pieces, coat, offers } = made()
    const ids = pieces('Bowl', 1)
    for (const ago of [72, 48, 24]) coat(ids, 'craft-acrylic', ago)
    const kept = draftOfPiece(db, owner, ids[0]!)
    if (isRefusal(kept)) throw new Error(kept.message)
    expect(isRefusal(createSchedule(db, owner, members.maker, kept.draft, now))).toBe(false)
    expect(offers()).toEqual([])
  })
})

describe('a schedule made of what was done', () => {
  it('makes a round of coats alike on three days, and waits between the rest', () => {
    const { db, owner, pieces, coat, material } = made()
    const ids = pieces('Bowl', 1)
    coat(ids, 'acrylic-gesso', 100)
    for (const ago of [72, 48, 24]) coat(ids, 'craft-acrylic', ago)
    const found = draftOfPiece(db, owner, ids[0]!)
    if (isRefusal(found)) throw new Error(found.message)
    expect(found.draft).toMatchObject({ name: 'As Bowl', parts: [{ key: 'whole', name: 'Piece' }] })
    expect(found.draft.steps.map(step => [step.kind, step.materialId, step.perDay, step.days])).toEqual([['coat', material('acrylic-gesso'), 1, 1], ['coat', material('craft-acrylic'), 1, 3]])
    expect(found.draft.links).toMatchObject([{ milestone: 'ready-to-recoat', risk: 'p90' }])
  })

  it('is refused for a piece that nothing was done to, and absent for another studio\'s', () => {
    const { db, owner, pieces } = made()
    const [id = 0] = pieces('Bowl', 1)
    expect(draftOfPiece(db, owner, id)).toMatchObject({ reason: 'impossible' })
    expect(draftOfPiece(db, { ...owner, id: owner.id + 7 }, id)).toMatchObject({ reason: 'absent' })
  })
})
