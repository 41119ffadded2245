import { eq, inArray } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import { cause, reminder, studio } from '~~/db/schema'
import { seedDemo } from '~~/db/seed/demo'
import { atOnce, replan } from '~~/server/planning/replan'
import { tick } from '~~/server/reminders/tick'
import { tellingListener } from '~~/server/reminders/wanted'
import { studioState } from '~~/server/services/studio-state'
import { wallState } from '~~/server/services/wall-state'
import type { Database } from '~~/server/utils/database'
import { drawBoard } from '#shared/board'
import { dayPlan } from '#shared/day-pegs'
import { handsJobs } from '#shared/hands'
import type { Job } from '#shared/hands'
import { filmsOf } from '#shared/hands-acts'
import { worstFilm } from '#shared/piece-strip'
import type { StudioState } from '#shared/schemas/piece-state'
import { handlingSheet } from '#shared/sheet'
import { studioZone } from '#shared/time'
import type { Clock } from '#shared/time'
import { groupMoment } from '#shared/verdict/next'
import { beginMoment, readPiece, startMoment } from '#shared/verdict/piece'
import type { ReadPiece } from '#shared/verdict/piece'
import { jobMoment } from '#shared/words/hands'
import { momentText, startByText } from '#shared/words/moments'
import { asSentence, betterText, verdictTitle } from '#shared/words/verdict'
import { testDatabase } from '../../helpers/database'
import { fakeChannels } from './reminders/fakes'

// A Wednesday morning in the middle of the demo's week.
const made = Date.parse('2026-12-02T10:20:00Z')
const minute = 60_000
const hour = 60 * minute

interface Studio { db: Database, studioId: number, now: number, state: StudioState, clock: Clock, reads: ReadPiece[] }

let demo: { db: Database, studioId: number }

beforeAll(async () => {
  const db = testDatabase() as Database
  const { studioId } = await seedDemo(db, made, 'Europe/London')
  demo = { db, studioId }
}, 240_000)

/** The demo studio as it stands so long after it was made; its plan is made anew there, or is the last one. */
async function studioAfter(afterMs: number, plans: boolean): Promise<Studio> {
  const { db, studioId } = demo
  const now = made + afterMs
  if (plans) expect(await replan(db, studioId, now, atOnce)).toMatchObject({ ok: true })
  const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()
  if (!owner) throw new Error('There is no demo studio.')
  const state = studioState(db, owner, now)
  return { db, studioId, now, state, clock: { now, zone: studioZone(owner.zone) }, reads: state.pieces.map(piece => readPiece(piece, state, now, null)) }
}

const isWhole = (read: ReadPiece) => new Set(read.groups.map(({ group }) => group.placeId)).size === 1
/** A fragment as the beginning of a sentence, without its end: more may follow. */
const begun = (fragment: string) => asSentence(fragment).slice(0, -1)
const jobText = (job: Job, clock: Clock) => jobMoment(job, worstFilm(filmsOf(job.pieces), job.tests ?? 'out-of-clamps'), clock)

function boardProblems({ state, reads, clock }: Studio): string[] {
  const drawing = drawBoard(state, reads, clock, new Set(state.places.map(place => place.id)))
  const cells = [...drawing.rooms.flatMap(room => room.places.flatMap(place => place.cells)), ...drawing.nowhere]
  return reads.filter(isWhole).flatMap((read) => {
    const own = cells.find(cell => cell.pieceIds.includes(read.piece.id))
    const moment = read.next ? momentText(read.next, clock) : null
    return own?.kind === read.verdict.kind && own.moment === moment ? [] : [`board, ${read.piece.name}: ${own?.kind}, ${own?.moment}, not ${read.verdict.kind}, ${moment}`]
  })
}

function sheetProblems({ state, reads, clock, now }: Studio): string[] {
  const sheet = handlingSheet(state, reads, clock, null)
  const onWall = wallState(state)
  expect(handlingSheet(onWall, onWall.pieces.map(piece => readPiece(piece, onWall, now, null)), clock, null)).toEqual(sheet)
  return reads.filter(isWhole).flatMap((read) => {
    const { verdict, groups } = read
    const shelf = sheet.shelves.find(each => each.key === (groups[0]?.group.placeId ?? 0))
    const better = betterText(verdict, clock)
    const says = shelf?.cells.some(cell => cell.title === verdictTitle(verdict.kind, verdict.grip) && (better === null || cell.lines.includes(better)))
    return says ? [] : [`sheet, ${read.piece.name}: ${JSON.stringify(shelf?.cells)}`]
  })
}

/** A job speaks for all its pieces: with the next moment of each, where all have theirs from this step. */
function handsProblems({ reads, clock }: Studio): string[] {
  const jobs = handsJobs(reads, clock, null)
  return jobs.flatMap((job) => {
    const { step, name } = job.turn
    const mine = job.pieces.map(({ read: { next } }) => (next && next.kind !== 'better' && [step.name, name].includes(next.what) ? next : null))
    const own = mine.flatMap(each => each ?? [])
    const moment = groupMoment(own)
    if (moment === null || step.status === 'set aside' || job.turn.status === 'doing') return []
    const text = jobText(job, clock)
    if (moment.kind === 'start by') return text.includes(begun(startByText(moment, clock))) && own.every(each => each.at === moment.at) ? [] : [`hands, start: ${text}, not ${startByText(moment, clock)}`]
    if (own.length < mine.length) return []
    if (moment.kind === 'may begin' && moment.open) return job.may ? [] : [`hands, open: ${text}`]
    if (moment.kind === 'check' && moment.out === null) return (job.section === 'now') === moment.due ? [] : [`hands, check: ${job.section}`]
    const time = momentText(moment, clock).split(' from ')[1] ?? ''
    return text.includes(time) ? [] : [`hands, from: ${text}, not ${momentText(moment, clock)}`]
  })
}

function rulerProblems({ state, reads, clock, now }: Studio): string[] {
  const says = dayPlan(state, reads, clock).pegs.map(peg => peg.says)
  return reads.flatMap(read => read.turns.flatMap((turn) => {
    const start = startMoment(turn, now)
    return start && start.at >= now && start.at < now + hour && !says.includes(startByText(start, clock)) ? [`ruler, ${read.piece.name}: ${startByText(start, clock)} is not in ${says.join(' | ')}`] : []
  }))
}

/** The calls as they are stored and then sent, against the pieces that they are about. */
async function callProblems(studioNow: Studio): Promise<string[]> {
  const { db, studioId, now, reads, clock } = studioNow
  tellingListener(db, studioId, now)
  const { channels, sent } = fakeChannels()
  await tick(db, now, channels)
  const rows = db.select({ kind: cause.kind, title: reminder.title, body: reminder.body, path: reminder.path }).from(reminder).innerJoin(cause, eq(reminder.causeId, cause.id)).where(inArray(reminder.status, ['due', 'claimed', 'sent'])).all()
  const calls = [...rows, ...sent].filter(call => call.kind === 'last moment to start' || call.kind === 'ready')
  expect(calls.length).toBeGreaterThan(3)
  const turnOf = (path: string) => reads.flatMap(read => read.turns.map(turn => ({ read, turn }))).find(each => each.turn.turn.turnId === Number(/turn=(\d+)/.exec(path)?.[1]))
  const wrong = calls.flatMap((call) => {
    const about = turnOf(call.path)
    if (!about) return [`call about no turn that is next: ${call.title}`]
    const { read: { next, piece }, turn } = about
    if (call.kind === 'last moment to start') {
      const start = startMoment(turn, now)
      const same = start !== null && call.body.includes(begun(momentText(start, clock))) && (next?.kind !== 'start by' || next.what !== turn.turn.step.name || next.at === start.at)
      return same ? [] : [`call, ${piece.name}: ${call.body}, not ${start && momentText(start, clock)}`]
    }
    const beside = reads.filter(each => each.piece.batch.id === piece.batch.id).flatMap(each => each.turns.filter(one => one.turn.step.key === turn.turn.step.key && one.turn.kind === turn.turn.kind).map(one => beginMoment(one, now)))
    const texts = beside.map(each => (each ? begun(momentText(each, clock)) : ''))
    return texts.includes(call.title) || call.title.startsWith('Touch it first') ? [] : [`call, ${piece.name}: ${call.title}, not ${texts.join(' or ')}`]
  })
  const silent = reads.flatMap(({ piece, next }) => (next?.kind === 'start by' && next.at >= now && !rows.some(row => row.body.includes(begun(momentText(next, clock)))) ? [`no call for ${piece.name}: ${momentText(next, clock)}`] : []))
  return [...wrong, ...silent]
}

describe('every piece of the demo studio', () => {
  it.each([
    ['when it was made', 0, true],
    ['forty minutes later, by the same plan', 40 * minute, false],
    ['past the first last moments, planned anew', 65 * minute, true],
    ['in the afternoon', 4 * hour, true],
    ['after the studio shut', 8 * hour, false],
    ['the next morning', 22.5 * hour, true],
  ] as const)('has one verdict and one next moment %s, on every screen and in every call', async (_, afterMs, plans) => {
    const now = await studioAfter(afterMs, plans)
    expect(now.reads.filter(read => read.next !== null).length).toBeGreaterThan(20)
    expect([...boardProblems(now), ...sheetProblems(now), ...handsProblems(now), ...rulerProblems(now), ...await callProblems(now)]).toEqual([])
  }, 120_000)
})
