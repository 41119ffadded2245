import { and, eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { pieceStep, pin, planEntry, turn } from '~~/db/schema'
import { atOnce, replan } from '~~/server/planning/replan'
import { searchHere } from '~~/server/planning/search'
import { planState } from '~~/server/services/plan-state'
import { checkPin, pinTurns, unpin } from '~~/server/services/pins'
import { studioZone } from '#shared/time'
import { pinWords } from '#shared/words/pins'
import { plannedStudio } from '../../helpers/planned-studio'
import { hour, minute } from '../../helpers/studio'

// A Tuesday.
const now = Date.parse('2026-04-07T10:00:00Z')
type Studio = ReturnType<typeof plannedStudio>

const turnsOf = ({ db }: Studio, key: string) => db.select({ id: turn.id }).from(turn).innerJoin(pieceStep, eq(pieceStep.id, turn.stepId)).where(and(eq(pieceStep.key, key), eq(turn.kind, 'work'))).all().map(row => row.id)
const startOf = ({ db }: Studio, turnId: number | undefined) => db.select().from(planEntry).where(eq(planEntry.turnId, turnId ?? 0)).get()?.startsAt ?? 0
const pinAt = ({ db, studioId, members }: Pick<Studio, 'db' | 'studioId' | 'members'>, turnIds: number[], at: number, memberId: number | null = null, asked = now) => {
  const body = { turnIds, startsAt: new Date(at).toISOString(), memberId }
  return pinTurns(db, studioId, members.maker.id, body, asked, () => checkPin(db, studioId, body, asked, searchHere))
}

/** Two boxes, planned; the first paint of both lids is a session. */
async function boxes() {
  const studio = plannedStudio(now, 'painted-waxed-box', 2)
  expect(await replan(studio.db, studio.studioId, now, atOnce)).toMatchObject({ ok: true })
  return studio
}

describe('pinning', () => {
  it('keeps what was pinned through every plan, one piece after another, till it is let go', async () => {
    const studio = await boxes()
    const lids = turnsOf(studio, 'lid-1')
    const thursday = Date.parse('2026-04-09T09:00:00Z')
    expect(await pinAt(studio, lids, thursday, studio.members.owner.id)).toEqual({ ok: true })
    for (const later of [0, 5, 20]) expect(await replan(studio.db, studio.studioId, now + later * minute, atOnce)).toMatchObject({ ok: true })
    // A lid takes six minutes: the second follows the first.
    expect(lids.map(id => startOf(studio, id)).sort()).toEqual([thursday, thursday + 6 * minute])
    const block = planState(studio.db, studio.studioId, now + 20 * minute)?.people.flatMap(person => person.blocks).find(each => each.turnIds.includes(lids[0] ?? 0))
    expect(block).toMatchObject({ memberId: studio.members.owner.id, pieces: ['Box 1', 'Box 2'], workAt: thursday })
    expect(block?.pinId).not.toBeNull()
    expect(unpin(studio.db, studio.studioId, block?.pinId ?? 0)).toEqual({ ok: true })
    expect(studio.db.select().from(pin).all()).toEqual([])
  })

  it('refuses a time that has gone by, one outside hours, and one before what it waits for, and keeps nothing', async () => {
    const studio = await boxes()
    const [lid] = turnsOf(studio, 'lid-1')
    const [turnLid] = turnsOf(studio, 'turn-lid')
    expect(await pinAt(studio, [lid ?? 0], now - hour)).toMatchObject({ ok: false, reason: 'impossible', message: 'That time has gone by. The next that can be given is 10:00.' })
    expect(await pinAt(studio, [lid ?? 0], Date.parse('2026-04-07T20:00:00Z'))).toMatchObject({ message: 'Nobody who may do “First paint on the lid top” is at work then for as long as it takes.' })
    // The first paint ends at the soonest at 10:06 and then dries: eleven is too soon to turn the lid.
    expect(await pinAt(studio, [turnLid ?? 0], now + hour)).toMatchObject({ message: expect.stringMatching(/^“Turn the lid over onto points” cannot begin before .*: “First paint on the lid top” comes first\.$/) })
    expect(studio.db.select().from(pin).all()).toEqual([])
  })

  it('refuses somebody who may not do it, and gives it to nobody else', async () => {
    const studio = await boxes()
    const [lid] = turnsOf(studio, 'lid-1')
    expect(await pinAt(studio, [lid ?? 0], Date.parse('2026-04-08T11:00:00Z'), studio.members.helper.id)).toMatchObject({ ok: false, reason: 'impossible', message: expect.stringMatching(/ does not do “First paint on the lid top”: choose somebody who may\.$/) })
    expect(studio.db.select().from(pin).all()).toEqual([])
  })

  it('refuses two pinned pieces of work for one pair of hands, and work that has been begun', async () => {
    const studio = await boxes()
    const lids = turnsOf(studio, 'lid-1')
    const at = Date.parse('2026-04-08T11:00:00Z')
    expect(await pinAt(studio, lids.slice(0, 1), at, studio.members.maker.id)).toEqual({ ok: true })
    // Six minutes from eleven are taken; at 11:03 the maker is still at it, at 11:06 no more.
    expect(await pinAt(studio, lids.slice(1), at + 3 * minute, studio.members.maker.id)).toMatchObject({ message: 'The maker has “First paint on the lid top” then, which stays where it is.' })
    expect(await pinAt(studio, lids.slice(1), at + 6 * minute, studio.members.maker.id)).toEqual({ ok: true })
    studio.tell('began', now, 'glue-box', studio.pieceIds.slice(0, 1))
    expect(await pinAt(studio, turnsOf(studio, 'glue-box'), at)).toMatchObject({ ok: false, reason: 'conflict', message: 'It has been begun: work in hand stays where it is.' })
  })

  it('takes the hands for the set-up before a pinned row and the clean-up after it', async () => {
    const studio = await boxes()
    const { db } = studio
    db.update(pieceStep).set({ setupMin: 20, cleanMin: 15 }).where(eq(pieceStep.key, 'lid-1')).run()
    const lids = turnsOf(studio, 'lid-1')
    const at = Date.parse('2026-04-08T11:00:00Z')
    // Wednesday opens at 8:30: at 8:40 there is no time to set up.
    expect(await pinAt(studio, lids, Date.parse('2026-04-08T08:40:00Z'))).toMatchObject({ message: expect.stringContaining('is at work then for as long as it takes') })
    expect(await pinAt(studio, lids, at, studio.members.maker.id)).toEqual({ ok: true })
    expect(await replan(db, studio.studioId, now, atOnce)).toMatchObject({ ok: true })
    // Two lids of six minutes from 11:00, set up from 10:40, cleaned up till 11:27: the maker has nothing else then.
    const others = db.select().from(planEntry).where(eq(planEntry.memberId, studio.members.maker.id)).all().filter(entry => !lids.includes(entry.turnId))
    expect(others.filter(entry => entry.startsAt < at + 27 * minute && entry.endsAt > at - 20 * minute)).toEqual([])
    // Gluing at 10:45 would be in the middle of the set-up.
    expect(await pinAt(studio, turnsOf(studio, 'glue-box').slice(0, 1), at - 15 * minute, studio.members.maker.id)).toMatchObject({ message: 'The maker has “First paint on the lid top” then, which stays where it is.' })
  })

  it('says of a window that shut by now that it shut, and of one to come that it shuts', () => {
    const clock = { now, zone: studioZone('UTC') }
    expect(pinWords.windowShut('Second coat', now - hour, clock)).toBe('The window for “Second coat” shut 9:00. It wants its recovery first.')
    expect(pinWords.windowShut('Second coat', now + hour, clock)).toBe('The window for “Second coat” shuts 11:00. Later it wants its recovery.')
  })

  it('is absent for a turn of another studio', async () => {
    const studio = await boxes()
    expect(await pinAt({ ...studio, studioId: studio.studioId + 1 }, turnsOf(studio, 'lid-1'), now + hour)).toMatchObject({ ok: false, reason: 'absent' })
  })
})
