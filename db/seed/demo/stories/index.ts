import type { Calendar } from '~~/db/seed/demo/calendar'
import { airNotes, airTold, readingsIn } from '~~/db/seed/demo/air'
import type { Told } from '~~/db/seed/demo/play'
import { almanac } from '~~/db/seed/demo/stories/almanac'
import { boards } from '~~/db/seed/demo/stories/boards'
import { bowls } from '~~/db/seed/demo/stories/bowls'
import { boxes } from '~~/db/seed/demo/stories/boxes'
import { covers } from '~~/db/seed/demo/stories/covers'
import { dresser } from '~~/db/seed/demo/stories/dresser'
import { houseMix } from '~~/db/seed/demo/stories/house-mix'
import { lutes } from '~~/db/seed/demo/stories/lutes'
import { panels } from '~~/db/seed/demo/stories/panels'
import { skylight } from '~~/db/seed/demo/stories/skylight'
import { appliedFor } from '~~/db/seed/demo/timing'
import { dryingTools } from '#shared/drying/tools'
import type { RoomAir } from '#shared/drying/types'
import type { CoatSize } from '#shared/terms'
import { localMinutes } from '#shared/time'

const minute = 60_000
/** From now to the window's end: set-up, all the pieces and three quarters of an hour to get there. */
const untilBooksShut = 45 + 5 + 3 * 8
const untilFramesShut = 45 + 5 + 4 * 8

/** Whether somebody could have stood at the bench then: from before opening to the end of a long evening. */
function atWork(calendar: Calendar, at: number | null): at is number {
  if (at === null) return false
  const wall = localMinutes(at, calendar.zone)
  return wall >= 7 * 60 + 30 && wall <= 19 * 60 + 45
}

interface Varnishing { books: { at: number, size: CoatSize }, framesAt: number, shutting: 'books' | 'frames' }

/**
 * The two varnishes of the demo, so timed that the recoat window of one is about to shut: a water-based one lasts into
 * the same night or the next morning, an oily one into the second day. Whichever went on when people work is that one.
 * @throws when none of them did: the hours of the day that they cover leave no gap
 */
function varnishing(calendar: Calendar, benchAir: RoomAir): Varnishing {
  const { now, at, desk } = calendar
  const tools = dryingTools()
  const booksShut = (size: CoatSize) => appliedFor('water-polyurethane', { size, ground: 'primed', uncuredBeneath: 6 }, benchAir, now + untilBooksShut * minute, now, tools)
  const normal = booksShut('normal')
  if (atWork(calendar, normal)) return { books: { at: normal, size: 'normal' }, framesAt: at(-1, '14:00'), shutting: 'books' }
  const frames = appliedFor('wiping-varnish', { size: 'thin', ground: 'primed', uncuredBeneath: 1 }, benchAir, now + untilFramesShut * minute, now, tools)
  if (atWork(calendar, frames)) return { books: { at: desk(75), size: 'thin' }, framesAt: frames, shutting: 'frames' }
  const thin = booksShut('thin')
  if (atWork(calendar, thin)) return { books: { at: thin, size: 'thin' }, framesAt: at(-1, '14:00'), shutting: 'books' }
  throw new Error('No varnish of the demo can be made to shut its window now.')
}

/**
 * Yesterday's plan gave the panels a coat that nobody has spoken of since; of all else that it meant, somebody says
 * what has not gone on. Then today's plan.
 */
function planning({ at, desk, now }: Calendar): Told[] {
  const plannedAt = at(-1, '10:45')
  const askedAt = desk(6)
  return [
    { at: plannedAt, play: player => player.plan(plannedAt) },
    { at: askedAt, play: player => player.answerSilence(askedAt, 'maker', 'Dusk panel') },
    { at: now, play: async (player) => {
      await player.plan(now)
      player.unheard()
    } },
  ]
}

/** Everything that was told in the demo's weeks, in the order of telling. */
export function toldInOrder(calendar: Calendar): Told[] {
  const notes = airNotes(calendar)
  const benchAir: RoomAir = { readings: readingsIn(notes, 'bench'), heated: true, nightDropC: 1, zone: calendar.zone.name, usual: { tempC: 19, rh: 0.5 } }
  const { books, framesAt } = varnishing(calendar, benchAir)
  const told = [
    ...airTold(notes), ...boards(calendar), ...almanac(calendar, books), ...skylight(calendar, framesAt), ...covers(calendar),
    ...houseMix(calendar), ...planning(calendar), ...bowls(calendar), ...boxes(calendar), ...lutes(calendar), ...dresser(calendar), ...panels(calendar),
  ]
  return told.sort((a, b) => a.at - b.at)
}
