import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { batch, pieceStep, scheduleVersion, studio } from '~~/db/schema'
import { startBatch } from '~~/server/services/batches'
import { createSchedule, readDraft, saveSchedule, shelveSchedule } from '~~/server/services/schedule-edits'
import { scheduleMaterials } from '~~/server/services/schedule-materials'
import { findSchedule, listPutAway, listSchedules } from '~~/server/services/schedule-times'
import { scheduleVersions } from '~~/server/services/schedule-versions'
import { isRefusal } from '~~/server/utils/errors'
import { changeStep, removeStep } from '#shared/schedules/edit'
import type { ScheduleDraftWire } from '#shared/schemas/schedule'
import type { ScheduleDraft } from '#shared/schemas/schedule-draft'
import { testStudio } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')
const { db, studioId, members, places, scheduleOf } = testStudio(now)
const owner = () => db.select().from(studio).where(eq(studio.id, studioId)).get()!
const sheets = new Map(scheduleMaterials(db, owner()).materials.map(each => [each.id, each]))
const box = scheduleOf('painted-waxed-box') ?? 0
const read = (id: number, no?: number) => {
  const found = readDraft(db, studioId, id, no)
  if (isRefusal(found)) throw new Error(found.message)
  return found
}
const save = ({ id, no }: Pick<ScheduleDraftWire, 'id' | 'no'>, draft: ScheduleDraft, who = members.maker) => saveSchedule(db, owner(), who, id, { baseNo: no, draft }, now)
let keys = 0
const start = (scheduleId: number, name: string) => startBatch(db, studioId, { member: members.maker }, { clientKey: `schedule-batch-${keys += 1}`, name, scheduleId, pieces: [name], sizeUnits: 1, placeId: places.shelf, order: null, startsAt: new Date(now).toISOString(), oldObject: false }, now)

describe('what can be laid', () => {
  it('comes with the least minutes that glue can be worked, and without where its sheet says nothing', () => {
    const worked = (name: string) => [...sheets.values()].find(each => each.name === name)?.workMin
    expect(['Yellow wood glue (PVA, indoor)', 'Liquid hide glue', 'Wheat or rice paste', 'Shellac'].map(worked)).toEqual([4 + 10, 8 + 25, 15, null])
  })
})

describe('an edition saved', () => {
  it('comes back as it was drawn, and the library\'s is edited in place', () => {
    const first = read(box)
    expect(first).toMatchObject({ no: 1, of: 1, fromLibrary: true })
    const key = first.draft.steps[1]!.key
    const wanted = changeStep(first.draft, key, { pieceMin: 33, checks: [{ name: 'Look along the light', afterMin: 960, minutes: 2 }] }, sheets)
    expect(save(first, wanted)).toEqual({ id: box, no: 2 })
    expect(read(box).draft).toEqual(wanted)
    expect(read(box, 1).draft).toEqual(first.draft)
  })

  it('leaves a piece on the edition it started with', () => {
    const started = start(box, 'Before')
    if (isRefusal(started)) throw new Error(started.message)
    const before = read(box)
    const gone = before.draft.steps[0]!.key
    expect(save(before, removeStep(before.draft, gone, sheets))).toEqual({ id: box, no: 3 })
    const steps = db.select({ key: pieceStep.key }).from(pieceStep).where(eq(pieceStep.pieceId, started.pieceIds[0]!)).all().map(row => row.key)
    expect(steps.sort()).toEqual(before.draft.steps.map(step => step.key).sort())
    const version = db.select({ no: scheduleVersion.no, frozen: scheduleVersion.frozen }).from(batch).innerJoin(scheduleVersion, eq(scheduleVersion.id, batch.scheduleVersionId)).where(eq(batch.id, started.batchId)).get()
    expect(version).toEqual({ no: 2, frozen: true })
    const after = start(box, 'After')
    if (isRefusal(after)) throw new Error(after.message)
    expect(db.select({ key: pieceStep.key }).from(pieceStep).where(eq(pieceStep.pieceId, after.pieceIds[0]!)).all().map(row => row.key)).not.toContain(gone)
  })

  it('lists its editions with who, what changed and how many pieces', () => {
    const versions = scheduleVersions(db, studioId, box)
    if (isRefusal(versions)) throw new Error(versions.message)
    expect(versions.map(({ no, by, pieces, fromLibrary, madeAt }) => ({ no, by, pieces, fromLibrary, madeAt }))).toEqual([
      { no: 3, by: 'The maker', pieces: 1, fromLibrary: false, madeAt: now }, { no: 2, by: 'The maker', pieces: 1, fromLibrary: false, madeAt: now }, { no: 1, by: null, pieces: 0, fromLibrary: true, madeAt: null },
    ])
    expect(versions[1]?.changes).toEqual([{ code: 'step changed', of: read(box, 2).draft.steps[1]!.name, was: read(box, 2).draft.steps[1]!.name, fields: ['minutes', 'checks'] }])
  })
})

describe('two editors at once', () => {
  it('leave the first\'s edition; the second is told what stands there now', () => {
    const both = read(scheduleOf('oiled-bowl') ?? 0)
    const key = both.draft.steps[0]!.key
    const mine = changeStep(both.draft, key, { pieceMin: 41 }, sheets)
    expect(save(both, mine, members.owner)).toEqual({ id: both.id, no: 2 })
    const late = save(both, changeStep(both.draft, key, { pieceMin: 42 }, sheets))
    expect(late).toMatchObject({ ok: false, reason: 'conflict', current: { no: 2, by: 'The owner', draft: mine } })
    expect(read(both.id)).toMatchObject({ no: 2, draft: mine })
  })
})

describe('an edition refused', () => {
  const draft = () => read(scheduleOf('resin-tray') ?? 0)
  it('names the step, and keeps nothing', () => {
    const standing = draft()
    const key = standing.draft.steps[0]!.key
    const refused = save(standing, changeStep(standing.draft, key, { targets: [] }, sheets))
    expect(refused).toMatchObject({ ok: false, reason: 'impossible', fields: { [`steps.${key}`]: `“${standing.draft.steps[0]!.name}” works on no part. Choose its faces.` } })
    expect(draft().no).toBe(1)
  })
  it('is one in which nothing is different, or which takes another\'s name', () => {
    const standing = draft()
    expect(save(standing, standing.draft)).toMatchObject({ ok: false, reason: 'impossible' })
    expect(save(standing, { ...standing.draft, name: read(box).draft.name })).toMatchObject({ ok: false, reason: 'malformed', fields: { name: expect.any(String) } })
  })
  it('is absent in another studio', () => {
    const other = testStudio(now)
    expect(readDraft(db, studioId + 50, box)).toMatchObject({ reason: 'absent' })
    expect(saveSchedule(db, { ...owner(), id: studioId + 50 }, members.maker, box, { baseNo: 3, draft: read(box).draft }, now)).toMatchObject({ reason: 'absent' })
    expect(scheduleVersions(other.db, other.studioId, 9999)).toMatchObject({ reason: 'absent' })
  })
})

describe('a schedule of one\'s own', () => {
  it('is made, started with, put away and taken out again', () => {
    const copy = { ...read(box).draft, name: 'Box, our way' }
    const made = createSchedule(db, owner(), members.maker, copy, now)
    if (isRefusal(made)) throw new Error(made.message)
    const found = findSchedule(db, owner(), made.id, now)
    expect(found).toMatchObject({ name: 'Box, our way', no: 1, libraryKey: null, stepCount: copy.steps.length })
    // The same steps in the same air take the same time.
    const original = findSchedule(db, owner(), box, now)
    if (isRefusal(found) || isRefusal(original)) throw new Error('absent')
    expect(found.elapsed).toEqual(original.elapsed)
    expect(createSchedule(db, owner(), members.maker, copy, now)).toMatchObject({ reason: 'malformed' })
    expect(shelveSchedule(db, studioId, made.id, true, now)).toEqual({ ok: true })
    expect(listSchedules(db, owner(), now).some(each => each.id === made.id)).toBe(false)
    expect(listPutAway(db, studioId)).toEqual([{ id: made.id, name: 'Box, our way' }])
    expect(start(made.id, 'None')).toMatchObject({ ok: false })
    shelveSchedule(db, studioId, made.id, false, now)
    expect(listSchedules(db, owner(), now).some(each => each.id === made.id)).toBe(true)
  })
})
