import type { CoursePoint, FilmDriver, RoomAirState } from '#shared/schemas/air'
import type { MovedRung } from '#shared/moved'
import { milestoneNames } from '#shared/terms'
import type { ReadingSource } from '#shared/terms'
import { ago, span } from '#shared/time'
import type { Clock } from '#shared/time'
import { humidityText, temperatureText } from '#shared/units'
import type { Units } from '#shared/units'
import { groupNames } from '#shared/words/group'
import { effectText } from '#shared/words/hands'
import { lowerFirst } from '#shared/words/steps'

/** What the page of the air says. */
export const airWords = {
  title: 'Air',
  waiting: 'Fetching the air of the rooms',
  failed: 'The air of the rooms could not be fetched.',
  noRooms: 'There are no rooms yet',
  noRoomsSays: 'Add a room in Settings, then note its air here.',
  toRooms: 'Add rooms',
  note: 'Note the air',
  inRoom: 'In which room',
  humidity: 'Humidity',
  temperature: 'Temperature',
  orWords: 'Or without a meter',
  words: { dry: 'dry', normal: 'normal', damp: 'damp', wet: 'wet' },
  noteAct: 'Note it',
  sameAct: 'Same as before',
  sameHint: 'For a look without a figure. It counts with more doubt.',
  last: 'Last noted:',
  noLast: 'Nobody has noted the air here yet.',
  when: 'When was that',
  noted: (room: string) => `Noted in ${room}.`,
  nextRoom: (room: string) => `${room} was read longest ago: it is next.`,
  nothingMoves: 'No film moves.',
  dewPoint: 'Dew point',
  board: 'Board and wood settle at',
  boardValue: (percent: number) => `${percent.toFixed(1)} % moisture`,
  boardCold: 'too cold to say',
  outdoor: 'outdoors',
  unheated: 'not heated',
  speeds: (when: string | null, ahead: boolean) => when === null ? 'How fast films dry now' : ahead ? `How fast films would dry: ${when}` : `How fast films dried: ${when}`,
  speedsHint: 'Drying speed is against a sheet that speaks of 20 °C and 50 % humidity; each film goes by its own sheet on the board.',
  span: 'Show',
  spans: { day: 'a day', week: 'a week', month: 'a month' },
  spanNames: { day: 'the last day and the night ahead', week: 'the last week and two days ahead', month: 'the last month and four days ahead' },
  courseWaiting: 'Fetching how the air went',
  courseFailed: 'How the air went could not be fetched.',
  courseEmpty: 'Nothing was read here in this time.',
  warmth: 'Temperature and dew point',
  warmthLine: 'temperature',
  dewLine: 'dew point',
  sheetLine: 'Dotted: as fast as the sheet says.',
  reckonedLine: 'Dashed: reckoned on, nobody read it. It lies in the shaded band eight times in ten.',
  doubt: (value: string, low: string, high: string) => `${value}, ${low} to ${high}`,
  coldest: 'Coldest ahead',
  coldestValue: (temp: string, when: string) => `${temp} at ${when}`,
  drip: 'Near its dew point',
  dripValue: (when: string) => `from ${when}: bring wet work in`,
  lookAlong: (room: string, span: string) => `Look along ${span}: ${room}`,
  nowPoint: 'Now',
  reckonedPoint: 'reckoned on',
  figures: 'Figures as a table',
  figuresOf: (room: string, span: string) => `Air of ${room}, ${span}`,
  time: 'Time',
  list: 'Last notes',
  undo: 'Take it back',
  bySensor: 'a sensor',
} as const

const filmNames: Record<FilmDriver, string> = {
  water: 'Water-based films', joint: 'Water-based glue in a joint', solvent: 'Solvent films', oxidation: 'Drying oils', reaction: 'Films with a hardener', moisture: 'Glue that cures with moisture',
}
export const filmName = (driver: FilmDriver) => filmNames[driver]

/** "0.78 of sheet speed", "as fast as the sheet", "stands still". */
export function speedText(factor: number): string {
  if (factor <= 0.005) return 'stands still'
  if (factor > 0.95 && factor < 1.05) return 'as fast as the sheet says'
  return factor < 1 ? `${factor.toFixed(2)} of sheet speed` : `${factor.toFixed(1)} times sheet speed`
}

/** "19.4 °C, 61 %"; a reading without a thermometer gives the humidity alone. */
export function airText(air: { tempC: number | null, rh: number }, units: Units): string {
  return air.tempC === null ? humidityText(air.rh) : `${temperatureText(air.tempC, units)}, ${humidityText(air.rh)}`
}

/** How well the figures are known: "read 12 min ago", "reckoned on from a note 2 h ago", "nobody has noted it". */
export function airAge({ readAt, assumed }: Pick<RoomAirState, 'readAt' | 'assumed'>, now: number): string {
  if (readAt === null) return 'Assumed: nobody has noted it, so the studio’s usual climate stands in.'
  const age = ago(readAt, now)
  if (assumed) return `Partly assumed: last noted ${age}.`
  return now - readAt < 30 * 60_000 ? `Noted ${age}.` : `Reckoned on from a note ${age}.`
}

const sources: Record<ReadingSource, string> = { note: 'by the meter', words: 'without a meter', same: 'same as before', file: 'from a file', sensor: 'sensor', weather: 'weather' }
export const sourceText = (source: ReadingSource) => sources[source]

/** What a reading did: "3 films move: the latest by 40 min later." `mostMs` is the shift that is largest, later above 0. */
export function movedText(count: number, mostMs: number): string {
  if (count === 0) return airWords.nothingMoves
  const by = `${span(Math.abs(mostMs) / 60_000)} ${mostMs > 0 ? 'later' : 'sooner'}`
  return count === 1 ? `One film moves: by ${by}.` : `${count} films move: the most by ${by}.`
}

/** "Tide boxes 1–4, first paint. Ready to recoat: likely 16:20, give it till 17:05. It was likely 15:50, give it till 16:30." */
export function movedRungText({ names, step, before, after }: MovedRung, clock: Clock): string {
  const as = (rung: MovedRung['after']) => ({ ...rung, milestone: milestoneNames.find(name => name === rung.name) ?? 'cured' as const })
  return `${groupNames(names)}${step === '' ? '' : `, ${lowerFirst(step)}`}. ${effectText(as(after), as(before), clock)}`
}

/** "Tue 14:00: 19.4 °C, 61 %, dew point 11.8 °C, board and wood at 10.9 %." A point of a chart read out. */
export function coursePointText(point: CoursePoint, when: string, units: Units): string {
  const board = point.boardMoisture === null ? '' : `, board and wood settle at ${point.boardMoisture.toFixed(1)} %`
  const { doubt } = point
  const between = doubt ? ` (${doubt.tempC.map(each => temperatureText(each, units)).join(' to ')}, ${doubt.rh.map(humidityText).join(' to ')})` : ''
  return `${when}: ${temperatureText(point.tempC, units)}, ${humidityText(point.rh)}${between}, dew point ${temperatureText(point.dewPointC, units)}${board}${point.reckoned ? `, ${airWords.reckonedPoint}` : ''}`
}
