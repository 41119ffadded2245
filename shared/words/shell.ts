import { type Clock, clockFace, clockTime } from '#shared/time'

/** The words around every page. */
export const shellWords = {
  name: 'Stillwet',
  skip: 'To the page',
  main: 'Main',
  more: 'More',
  opening: 'Opening the page',
  board: 'Board',
  pieces: 'Pieces',
  hands: 'Hands',
  week: 'Week',
  schedules: 'Finishing schedules',
  materials: 'Materials',
  air: 'Air',
  safety: 'Safety',
  settings: 'Settings',
  putOn: 'Put on',
  putOnLong: 'I put something on',
  sheet: 'Handling sheet',
  startBatch: 'Start a batch',
} as const

const longDays = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday'] as const

/** "Tuesday 14:20", or "Tue 14:20" where room is scarce. */
export function nowWords({ now, zone }: Clock, short: boolean): string {
  const { weekday, minutes } = zone.wall(now)
  const day = longDays[weekday - 1] ?? ''
  return `${short ? day.slice(0, 3) : day} ${clockFace(minutes)}`
}

/** Said on every page while nothing comes from the studio. */
export function notHeard(since: number, clock: Clock): string {
  return `Not heard from the studio since ${clockTime(since, clock)}. Ask before you handle anything.`
}
