import { and, eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { batch, closure, member, memberStepKind, openHours, plan, pin, pieceStep, planChange, planEntry, reading, turn } from '~~/db/schema'
import { atOnce, replan } from '~~/server/planning/replan'
import { copyAgain } from '~~/server/utils/database'
import { predictPieces } from '~~/server/work/predict'
import { likeMoves } from '#shared/plan-moves'
import { causeText, moveText } from '#shared/words/plan-moves'
import { plannedStudio } from '../../helpers/planned-studio'
import { hour, minute } from '../../helpers/studio'
import { movesAt, planAt, startOf, zone } from '../../helpers/told-moves'
import type { PlannedStudio } from '../../helpers/told-moves'

// A Tuesday.
const now = Date.parse('2026-04-07T10:00:00Z')

const turnOf = ({ db }: PlannedStudio, pieceId: number, key: string) => {
  const found = db.select({ id: turn.id }).from(turn).innerJoin(pieceStep, eq(pieceStep.id, turn.stepId)).where(and(eq(pieceStep.pieceId, pieceId), eq(pieceStep.key, key), eq(turn.kind, 'work'))).get()
  if (!found) throw new Error(`There is no turn of ${key}.`)
  return found.id
}
const whyOf = (studio: PlannedStudio, turnId: number, at: number) => movesAt(studio, at).find(each => each.turnId === turnId)?.why

/** A box whose lid has its first paint since ten, planned. */
async function painted() {
  const studio = plannedStudio(now, 'painted-waxed-box', 1)
  studio.tell('coat on', now, 'lid-1', studio.pieceIds)
  await planAt(studio, now + 10 * minute)
  return { studio, turnLid: turnOf(studio, studio.pieceIds[0] ?? 0, 'turn-lid') }
}

describe('what moved', () => {
  it('is nothing when nothing happened', async () => {
    const { studio } = await painted()
    await planAt(studio, now + 15 * minute)
    expect(movesAt(studio, now + 15 * minute)).toEqual([])
  })

  it('says that a film dries later when the room has turned cold, with the room and how cold it gets', async () => {
    const { studio, turnLid } = await painted()
    const was = startOf(studio, turnLid)
    // 9 °C and damp from 10:20 on: the paint takes far longer, and the room is as cold as it was read.
    studio.db.insert(reading).values({ studioId: studio.studioId, roomId: studio.rooms.bench, at: now + 20 * minute, toldAt: now + 20 * minute, tempC: 9, rh: 0.75, source: 'note' }).run()
    studio.db.transaction(tx => predictPieces(tx, studio.studioId, null, now + 20 * minute))
    await planAt(studio, now + 20 * minute)
    const is = startOf(studio, turnLid)
    expect(is - was).toBeGreaterThan(hour / 2)
    const why = whyOf(studio, turnLid, now + 20 * minute)
    expect(why).toMatchObject({ code: 'film later', step: 'First paint on the lid top', room: 'Bench', tempC: 9 })
    // It begins no sooner than the film is ready.
    expect(why?.code === 'film later' && why.readyAt <= is && why.readyAt > was).toBe(true)
    const [told] = likeMoves(movesAt(studio, now + 20 * minute).filter(each => each.turnId === turnLid))
    expect(moveText(told ?? [], { now: now + 20 * minute, zone }, 'metric')).toMatch(/^Turning over of Box 1 moves from .* to .*: Bench falls to 9 °C, and “First paint on the lid top” is not dry enough before .*\.$/)
  })

  it('says of work that moves sooner which film lets it, and from when; in the air of before it would not', async () => {
    const { studio, turnLid } = await painted()
    const air = (at: number, tempC: number, rh: number) => {
      studio.db.insert(reading).values({ studioId: studio.studioId, roomId: studio.rooms.bench, at, toldAt: at, tempC, rh, source: 'note' }).run()
      studio.db.transaction(tx => predictPieces(tx, studio.studioId, null, at))
    }
    air(now + 20 * minute, 9, 0.75)
    await planAt(studio, now + 20 * minute)
    const was = startOf(studio, turnLid)
    const stayed = { ...studio, db: copyAgain(studio.db) }
    // Half an hour later the stove is lit.
    air(now + 50 * minute, 21, 0.5)
    for (const each of [studio, stayed]) expect(await replan(each.db, studio.studioId, now + 50 * minute, atOnce, true)).toMatchObject({ ok: true })
    const is = startOf(studio, turnLid)
    expect(was - is).toBeGreaterThan(hour / 2)
    expect(startOf(stayed, turnLid)).toBeGreaterThan(is + hour / 2)
    const why = whyOf(studio, turnLid, now + 50 * minute)
    expect(why).toMatchObject({ code: 'film sooner', step: 'First paint on the lid top' })
    expect(why?.code === 'film sooner' && why.readyAt <= is && why.readyAt < was).toBe(true)
    stayed.db.$client.close()
  })

  it('is told till the next working day is over, against what was first told, and goes when the turn comes back', async () => {
    const { studio, turnLid } = await painted()
    const { db, studioId } = studio
    const was = startOf(studio, turnLid)
    // Planned for Wednesday at noon: from 13:00 today on within a day. Pinned an hour later, then an hour more.
    const [one, two, three] = [now + 3 * hour, now + 3 * hour + 5 * minute, now + 3 * hour + 10 * minute]
    expect(was - one).toBeLessThan(24 * hour)
    db.insert(pin).values({ studioId, turnId: turnLid, startsAt: was + hour, madeAt: now, madeByMemberId: studio.members.maker.id }).run()
    await planAt(studio, one)
    expect(movesAt(studio, one).find(each => each.turnId === turnLid)).toMatchObject({ wasAt: was, isAt: was + hour, why: { code: 'pinned', by: 'The maker' } })
    db.update(pin).set({ startsAt: was + 2 * hour }).run()
    await planAt(studio, two)
    expect(movesAt(studio, two).find(each => each.turnId === turnLid)).toMatchObject({ wasAt: was, isAt: was + 2 * hour })
    // Moved on Tuesday at 13:05; Wednesday ends at 17:30.
    const evening = Date.parse('2026-04-08T17:30:00Z')
    expect(movesAt(studio, evening - minute).some(each => each.turnId === turnLid)).toBe(true)
    expect(movesAt(studio, evening)).toEqual([])
    db.update(pin).set({ startsAt: was }).run()
    await planAt(studio, three)
    expect(movesAt(studio, three).some(each => each.turnId === turnLid)).toBe(false)
  })

  it('counts small shifts together against what people last heard', async () => {
    const { studio, turnLid } = await painted()
    const { db, studioId } = studio
    const was = startOf(studio, turnLid)
    db.insert(pin).values({ studioId, turnId: turnLid, startsAt: was + 20 * minute }).run()
    await planAt(studio, now + 3 * hour)
    // Twenty minutes are not told; twenty more make forty, which are.
    expect(whyOf(studio, turnLid, now + 3 * hour)).toBeUndefined()
    db.update(pin).set({ startsAt: was + 40 * minute }).run()
    await planAt(studio, now + 3 * hour + 5 * minute)
    expect(db.select().from(planChange).where(eq(planChange.turnId, turnLid)).get()).toMatchObject({ wasAt: was, isAt: was + 40 * minute })
  })

  it('says that nobody works then when hours were taken away', async () => {
    const studio = plannedStudio(now, 'oiled-bowl', 1)
    await planAt(studio, now)
    const first = studio.db.select().from(planEntry).all().sort((a, b) => a.startsAt - b.startsAt)[0]
    // The rest of Tuesday is closed.
    studio.db.update(openHours).set({ toMin: 10 * 60 }).where(eq(openHours.weekday, 2)).run()
    await planAt(studio, now + minute)
    expect(whyOf(studio, first?.turnId ?? 0, now + minute)).toEqual({ code: 'hours', name: null })
  })

  it('names who is away, for their own work and for what gives way to it; with them there nothing moves', async () => {
    // Before the studio opens.
    const early = now - 3 * hour
    const studio = plannedStudio(early, 'painted-waxed-box', 6)
    const { db, studioId, members } = studio
    await planAt(studio, early)
    const theirs = new Set(db.select().from(planEntry).where(eq(planEntry.memberId, members.maker.id)).all().map(each => each.turnId))
    const stayed = { ...studio, db: copyAgain(db) }
    db.insert(closure).values({ studioId, memberId: members.maker.id, name: 'Away', fromDate: '2026-04-07', toDate: '2026-04-08' }).run()
    await planAt(studio, early + minute)
    const told = movesAt(studio, early + minute)
    const away = { code: 'hours', name: 'The maker' }
    expect(told.some(each => theirs.has(each.turnId) && JSON.stringify(each.why) === JSON.stringify(away))).toBe(true)
    const gaveWay = told.find(each => each.why.code === 'hands')
    expect(gaveWay?.why).toMatchObject({ name: 'The owner', step: 'Glue up the box', because: away })
    expect(moveText(gaveWay ? [gaveWay] : [], { now: early, zone }, 'metric')).toMatch(/: The owner is at “Glue up the box” of Boxs then; that moved because The maker does not work at the old time\.$/)
    expect(told.filter(each => each.why.code === 'fits better' || each.why.code === 'window missed')).toEqual([])
    // What it claims, solved: the same plan a minute later with nobody away.
    await planAt(stayed, early + minute)
    expect(movesAt(stayed, early + minute)).toEqual([])
    stayed.db.$client.close()
  })

  it.each([
    ['the studio', 'mitred-frame', { code: 'opened', name: null }, 'somebody who may do it works then now'],
    ['one person', 'laminated-boards', { code: 'opened', name: 'The maker' }, 'The maker works then now'],
  ] as const)('names hours of %s that were given back where work moves sooner by them, which without that it would not', async (whose, schedule, why, says) => {
    const early = now - 3 * hour
    const studio = plannedStudio(early, schedule, 1)
    const { db, studioId, members } = studio
    const ones = whose === 'one person'
    if (ones) db.update(member).set({ leftAt: early - hour }).where(eq(member.role, 'owner')).run()
    db.insert(closure).values({ studioId, memberId: ones ? members.maker.id : null, name: 'Away', fromDate: '2026-04-07', toDate: '2026-04-09' }).run()
    await planAt(studio, early)
    const stayed = { ...studio, db: copyAgain(db) }
    db.delete(closure).run()
    await planAt(studio, early + minute)
    const told = movesAt(studio, early + minute)
    expect(told.length).toBeGreaterThan(0)
    expect(told.map(each => each.why)).toContainEqual(why)
    expect(causeText(why, { now: early, zone }, 'metric')).toBe(says)
    await planAt(stayed, early + minute)
    expect(movesAt(stayed, early + minute)).toEqual([])
    stayed.db.$client.close()
  })

  it('does not blame a window that was missed in the last plan as well', async () => {
    const early = now - 3 * hour
    // Open for 75 minutes a day: windows shut in between.
    const studio = plannedStudio(early, 'made-over-cover', 1, 9 * 60 + 45)
    const { db, studioId } = studio
    await planAt(studio, early)
    expect(db.select().from(plan).get()?.objective.windowsMissed).toBeGreaterThan(0)
    db.insert(closure).values({ studioId, memberId: null, name: 'Shut', fromDate: '2026-04-07', toDate: '2026-04-07' }).run()
    await planAt(studio, early + minute)
    const told = movesAt(studio, early + minute)
    expect(told.length).toBeGreaterThan(0)
    expect(told.filter(each => JSON.stringify(each.why).includes('window missed'))).toEqual([])
  })

  it.each([
    ['what is done', 'done', { code: 'freed', name: 'The maker', step: 'Cut and shoot the mitres', batch: 'Boxs', gone: 'done' }, /^The maker is free then, since “Cut and shoot the mitres” of Boxs is done$/],
    ['a batch that is over', 'dropped', { code: 'freed', name: 'The maker', step: 'Cut and shoot the mitres', batch: 'Boxs', gone: 'dropped' }, /^The maker is free then, since “Cut and shoot the mitres” of Boxs is no longer to be done$/],
  ] as const)('names %s where work moves sooner by it, which without that it would not', async (_, what, cause, says) => {
    const early = now - 3 * hour
    const studio = plannedStudio(early, 'mitred-frame', 2)
    const { db, studioId } = studio
    db.update(member).set({ leftAt: early - hour }).where(eq(member.role, 'owner')).run()
    studio.batch('Tray', 1, 'mitred-frame', early)
    await planAt(studio, early)
    const stayed = { ...studio, db: copyAgain(db) }
    if (what === 'done') studio.tell('work done', early, db.select().from(pieceStep).where(eq(pieceStep.name, cause.step)).get()?.key ?? '', studio.pieceIds)
    else db.update(batch).set({ closedAt: early }).where(eq(batch.name, 'Boxs')).run()
    for (const each of [studio, stayed]) expect(await replan(each.db, studioId, early + minute, atOnce, true)).toMatchObject({ ok: true })
    const told = movesAt(studio, early + minute).filter(each => JSON.stringify(each.why) === JSON.stringify(cause))
    expect(told.length).toBeGreaterThan(0)
    for (const { why } of told) expect(causeText(why, { now: early, zone }, 'metric')).toMatch(says)
    // What it claims, solved: made anew as well, but without that, none of them begins so soon.
    for (const { turnId, isAt } of told) expect(startOf(stayed, turnId)).toBeGreaterThan(isAt)
    stayed.db.$client.close()
  })

  it('says of work that may begin sooner that what comes before it is done already', async () => {
    const early = now - 3 * hour
    const studio = plannedStudio(early, 'oiled-bowl', 2)
    await planAt(studio, early)
    const [step] = studio.db.select().from(pieceStep).all().sort((a, b) => a.ordinal - b.ordinal)
    studio.tell('work done', early, step?.key ?? '', studio.pieceIds)
    expect(await replan(studio.db, studio.studioId, early + minute, atOnce, true)).toMatchObject({ ok: true })
    expect(movesAt(studio, early + minute).map(each => each.why)).toContainEqual({ code: 'done before', step: step?.name })
  })

  it('says that somebody does such work no more, where a helper was given it and may do it no longer', async () => {
    const early = now - 3 * hour
    const studio = plannedStudio(early, 'mitred-frame', 6)
    const { db, studioId, members: { helper } } = studio
    for (const kind of ['bench work', 'packing'] as const) db.insert(memberStepKind).values({ studioId, memberId: helper.id, kind }).run()
    await planAt(studio, early)
    const theirs = db.select({ turnId: planEntry.turnId, kind: pieceStep.kind }).from(planEntry).innerJoin(turn, eq(turn.id, planEntry.turnId)).innerJoin(pieceStep, eq(pieceStep.id, turn.stepId)).where(eq(planEntry.memberId, helper.id)).all()
    expect(new Set(theirs.map(each => each.kind))).toEqual(new Set(['bench work', 'packing']))
    const stayed = { ...studio, db: copyAgain(db) }
    db.delete(memberStepKind).where(eq(memberStepKind.kind, 'bench work')).run()
    for (const each of [studio, stayed]) await planAt(each, early + minute)
    const told = movesAt(studio, early + minute).filter(each => theirs.some(one => one.turnId === each.turnId))
    expect(told.map(each => each.why)).toContainEqual({ code: 'not theirs', name: 'The helper' })
    // With those kinds of step still theirs nothing moves.
    expect(movesAt(stayed, early + minute)).toEqual([])
    stayed.db.$client.close()
  })

  it('names a pin as the root of what follows, also where nobody has told the pinned work', async () => {
    const studio = plannedStudio(now, 'oiled-bowl', 1)
    await planAt(studio, now)
    const [first, second, , later] = studio.db.select().from(planEntry).all().sort((a, b) => a.startsAt - b.startsAt)
    const pinAt = (startsAt: number) => {
      studio.db.delete(pin).run()
      studio.db.insert(pin).values({ studioId: studio.studioId, turnId: first?.turnId ?? 0, startsAt, madeAt: now, madeByMemberId: studio.members.maker.id }).run()
    }
    pinAt(now + 4 * hour)
    await planAt(studio, now + minute)
    expect(whyOf(studio, second?.turnId ?? 0, now + minute)).toMatchObject({ code: 'follows', startsAt: now + 4 * hour, because: { code: 'pinned', by: 'The maker' } })
    // Its hour goes by in silence, and somebody pins it to the evening.
    pinAt(now + 7 * hour)
    await planAt(studio, now + 5 * hour)
    // Its own hour has gone by as well: what comes after them both is told.
    expect(whyOf(studio, later?.turnId ?? 0, now + 5 * hour)).toMatchObject({ code: 'follows', startsAt: now + 7 * hour, because: { code: 'pinned', by: 'The maker' } })
  })

  it('names no time that has moved on since, where a move goes a little further', async () => {
    const studio = plannedStudio(now, 'oiled-bowl', 1)
    await planAt(studio, now)
    const [first, second] = studio.db.select().from(planEntry).all().sort((a, b) => a.startsAt - b.startsAt)
    const pinAt = (startsAt: number) => {
      studio.db.delete(pin).run()
      studio.db.insert(pin).values({ studioId: studio.studioId, turnId: first?.turnId ?? 0, startsAt, madeAt: now, madeByMemberId: studio.members.maker.id }).run()
    }
    pinAt(now + 4 * hour)
    await planAt(studio, now + minute)
    pinAt(now + 4 * hour + 20 * minute)
    await planAt(studio, now + 2 * minute)
    expect(whyOf(studio, second?.turnId ?? 0, now + 2 * minute)).toMatchObject({ code: 'follows', startsAt: now + 4 * hour + 20 * minute })
  })

  it('does not tell a start that went by in silence', async () => {
    const studio = plannedStudio(now, 'oiled-bowl', 1)
    await planAt(studio, now)
    const first = studio.db.select().from(planEntry).all().sort((a, b) => a.startsAt - b.startsAt)[0]
    await planAt(studio, now + 6 * hour)
    expect(startOf(studio, first?.turnId ?? 0)).toBeGreaterThanOrEqual(now + 6 * hour)
    expect(whyOf(studio, first?.turnId ?? 0, now + 6 * hour)).toBeUndefined()
    // What follows it is told, with that cause.
    expect(movesAt(studio, now + 6 * hour).map(({ why }) => why.code === 'follows' ? why.because?.code : why.code)).toContain('not told')
  })
})
