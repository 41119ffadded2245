import { dewMarginC } from '#shared/air/margin'
import type { FilmDriver, RoomAirState } from '#shared/schemas/air'
import { ago } from '#shared/time'
import { humidityText, temperatureGapText, temperatureText } from '#shared/units'
import type { Units } from '#shared/units'
import { airText, filmName } from '#shared/words/air-page'

export const airReasonWords = {
  title: 'Where these figures come from',
  air: 'Temperature and humidity',
  dewPoint: 'Dew point',
  board: 'Board and wood',
} as const

/** What each kind of film goes by, against `sheetAir`. */
const pulls: Record<FilmDriver, string> = {
  water: 'by how much more water this air would take up, and by how far the film cools as it gives water off',
  joint: 'by how dry the air is that the board beside it lies in, and by warmth',
  solvent: 'by warmth, as solvent leaves sooner when warm',
  oxidation: 'by warmth, and slower in air over 50 %',
  reaction: 'by warmth alone',
  moisture: 'by the water in the air, and by warmth',
}

type Asked = Pick<RoomAirState, 'tempC' | 'rh' | 'readAt' | 'assumed' | 'heated' | 'last' | 'dewPointC' | 'boardMoisture' | 'speeds'>

function airSays({ readAt, last, heated }: Asked, now: number, units: Units): string {
  if (readAt === null || last === null) return 'Nobody has noted this room: the usual climate of the studio stands in.'
  const night = heated ? '' : ', or falls by the room’s night drop in hours that nobody ever read'
  return `The last note was ${airText(last, units)}, ${ago(readAt, now)}. From there the water in the air is taken to stay, and the temperature goes as it went at these hours before${night}.`
}

/** Why the figures of a room are what they are, one sentence each, with the figures they are made of. Nothing is said of a figure that is not shown. */
export function airReasons(room: Asked, now: number, units: Units): { name: string, says: string }[] {
  const air = `${temperatureText(room.tempC, units)} and ${humidityText(room.rh)}`
  return [
    { name: airReasonWords.air, says: airSays(room, now, units) },
    ...room.dewPointC === null ? [] : [{ name: airReasonWords.dewPoint, says: `Air of ${air} wets whatever is at ${temperatureText(room.dewPointC, units)} or colder. Wet work wants ${temperatureGapText(dewMarginC, units)} more than that.` }],
    ...room.boardMoisture === null ? [] : [{ name: airReasonWords.board, says: `Left for weeks in ${air} they come to hold water of ${room.boardMoisture.toFixed(1)} % of their dry weight, by the published equation for wood at rest.` }],
    ...room.speeds.map(({ driver }) => ({ name: filmName(driver), says: `Against a sheet of ${temperatureText(20, units)} and 50 %: ${pulls[driver]}.` })),
  ]
}
