import { eq, inArray } from 'drizzle-orm'
import { expect, it } from 'vitest'
import { pieceStep, studio } from '~~/db/schema'
import { missedWindows } from '~~/server/planning/missed-windows'
import { readDraft, saveSchedule } from '~~/server/services/schedule-edits'
import { isRefusal } from '~~/server/utils/errors'
import { setLink } from '#shared/schedules/edit'
import { plannedStudio } from '../../../helpers/planned-studio'
import { hour } from '../../../helpers/studio'

const now = Date.parse('2026-04-07T10:00:00Z')

it('puts in what the schedule asks for after a missed window, else what the sheet does; each piece by its own edition', () => {
  const { db, studioId, members, scheduleOf, pieceIds: first, batch, tell } = plannedStudio(now, 'resin-tray', 1)
  const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()!
  const standing = readDraft(db, studioId, scheduleOf('resin-tray') ?? 0)
  if (isRefusal(standing)) throw new Error(standing.message)
  const link = standing.draft.links.find(each => each.from === 'seal' && each.to === 'flood')!
  const saved = saveSchedule(db, owner, members.maker, standing.id, { baseNo: 1, draft: setLink(standing.draft, { ...link, recovery: { name: 'Wash and key the seal', minutes: 25 } }) }, now)
  if (isRefusal(saved)) throw new Error(saved.message)
  const second = batch('Later tray', 1)
  for (const pieceIds of [first, second]) {
    tell('work done', now + hour, 'tape', pieceIds)
    tell('coat on', now + 2 * hour, 'seal', pieceIds)
  }
  missedWindows(db, studioId, now + 40 * hour)
  const recoveries = db.select({ pieceId: pieceStep.pieceId, name: pieceStep.name, pieceMin: pieceStep.pieceMin }).from(pieceStep).where(inArray(pieceStep.origin, ['recovery'])).all()
  // Epoxy's own sheet speaks for the piece of the first edition.
  expect(recoveries.find(each => each.pieceId === second[0])).toEqual({ pieceId: second[0], name: 'Wash and key the seal', pieceMin: 25 })
  const other = recoveries.find(each => each.pieceId === first[0])
  expect(other?.name).toBeTruthy()
  expect(other?.name).not.toBe('Wash and key the seal')
})
