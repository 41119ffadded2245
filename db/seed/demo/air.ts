import type { Calendar } from '~~/db/seed/demo/calendar'
import type { DemoKey } from '~~/db/seed/demo/people'
import type { Told } from '~~/db/seed/demo/play'
import type { RoomKey } from '~~/db/seed/demo/places'
import { humidityWords, sameDoubt, wordDoubt } from '#shared/schemas/reading'
import type { Reading } from '#shared/drying/types'

type Word = keyof typeof humidityWords
/** A meter's word (Celsius, share 0..1), a word for the damp with or without a thermometer, or "same as before". */
type Said = { tempC: number, rh: number } | { words: Word, tempC: number | null } | 'same'
interface Note { room: RoomKey, at: number, by: DemoKey, said: Said }

/** The air of a day by the clock, room by room: morning, midday, evening. Degrees Celsius and per cent. */
const pattern: Partial<Record<RoomKey, readonly (readonly [wall: string, tempC: number, percent: number])[]>> = {
  bench: [['8:40', 18.4, 51], ['12:30', 20.6, 47], ['17:05', 20.9, 49]],
  workshop: [['8:50', 11.4, 66], ['13:30', 15.2, 58], ['17:00', 15.6, 59]],
  spray: [['9:10', 20.2, 46]],
}

/** How much warmer and damper one day was than the next: rain on the fifth day back, a bright cold spell since. */
const weather = (days: number) => ({ tempC: [0, -0.4, 0.3, 0.8, 0.5, -0.7, 0.2][-days % 7] ?? 0, percent: [0, 2, -2, 3, 5, 9, -1][-days % 7] ?? 0 })

const firstDay = -16
/** From this day on everybody notes the air as they should; before it only the mornings. */
const firstFullDay = -7

/** Everything anybody has noted of the air up to now, in no order. */
export function airNotes(calendar: Calendar): Note[] {
  const days = Array.from({ length: 1 - firstDay }, (_, index) => firstDay + index).filter(calendar.isOpen)
  const regular = days.flatMap(day => (Object.keys(pattern) as RoomKey[]).flatMap(room => dayOf(calendar, room, day)))
  return [...regular, ...oneByOne(calendar)].filter(note => note.at + 2 * 60_000 < calendar.now)
}

function dayOf(calendar: Calendar, room: RoomKey, day: number): Note[] {
  const shift = weather(day)
  const rows = pattern[room] ?? []
  const noted = day >= firstFullDay ? rows.filter(([wall]) => !isGap(room, day, wall)) : rows.slice(0, 1)
  return noted.map(([wall, tempC, percent], index): Note => ({
    room, at: calendar.at(day, wall), by: index === 0 ? 'helper' : 'maker',
    said: { tempC: Math.round((tempC + shift.tempC) * 10) / 10, rh: (percent + shift.percent) / 100 },
  }))
}

/** Nobody is there to note it every time. */
const isGap = (room: RoomKey, day: number, wall: string) => (room === 'bench' && day === -6 && wall === '12:30') || (room === 'workshop' && day === -7 && wall !== '8:50') || (room === 'spray' && day === -2)

/** What was noted out of the ordinary: the cold night in the workshop, words without a meter, a look just now. */
function oneByOne(calendar: Calendar): Note[] {
  const { at, desk } = calendar
  return [
    { room: 'workshop', at: at(-1, '21:30'), by: 'owner', said: { tempC: 8.8, rh: 0.71 } },
    { room: 'workshop', at: at(0, '7:10'), by: 'owner', said: { tempC: 5.4, rh: 0.8 } },
    { room: 'yard', at: at(-5, '9:00'), by: 'helper', said: { words: 'wet', tempC: 9 } },
    { room: 'yard', at: at(-2, '9:05'), by: 'helper', said: { words: 'damp', tempC: 8.5 } },
    { room: 'yard', at: at(-1, '9:00'), by: 'helper', said: { words: 'normal', tempC: 10 } },
    { room: 'yard', at: at(-1, '16:00'), by: 'second', said: { tempC: 12.5, rh: 0.57 } },
    { room: 'spray', at: at(-2, '9:15'), by: 'helper', said: { words: 'normal', tempC: null } },
    { room: 'bench', at: at(-2, '15:20'), by: 'second', said: 'same' },
    { room: 'spray', at: desk(60), by: 'second', said: { tempC: 20.4, rh: 0.46 } },
    { room: 'bench', at: desk(12), by: 'maker', said: { tempC: 20.3, rh: 0.5 } },
  ]
}

export const airTold = (notes: readonly Note[]): Told[] => notes.map(({ room, by, at, said }) => ({
  at: at + 60_000,
  play: player => player.read(room, by, at, said === 'same' ? { same: true } : said),
}))

/** The notes of one room as the drying clock reads them, so that a coat can be timed before the weeks are played. */
export function readingsIn(notes: readonly Note[], room: RoomKey): Reading[] {
  const rows = notes.filter(note => note.room === room).sort((a, b) => a.at - b.at)
  return rows.reduce<Reading[]>((known, { at, said }) => {
    const last = known.at(-1)
    if (said === 'same') return last ? [...known, { ...last, at, doubt: (last.doubt ?? 0) + sameDoubt }] : known
    return [...known, 'words' in said ? { at, tempC: said.tempC, rh: humidityWords[said.words], doubt: wordDoubt } : { at, tempC: said.tempC, rh: said.rh, doubt: 0 }]
  }, [])
}
