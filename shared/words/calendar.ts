import { roughTime } from '#shared/time'
import type { Clock } from '#shared/time'

const note = 'A forecast: it moves with the air and with what is done. The board says how things stand now.'

/** A person's calendar, and the page that gives out its address. */
export const calendarWords = {
  note,
  work: (lastStartAt: number | null, clock: Clock) => lastStartAt === null ? note : `Start by ${roughTime(lastStartAt, clock, 'down')} at the latest. ${note}`,
  ready: (names: string, says: string) => `${names}: ${says}`,
  name: (studio: string, person: string | null) => person === null ? studio : `${studio}, ${person}`,
  title: 'Calendar',
  intro: 'A secret address that a calendar reads by itself: your planned work, and when things are ready. It is read every quarter of an hour at most, so calls are quicker.',
  whose: 'Whose work',
  mine: 'Mine',
  everybody: 'Everybody’s',
  make: 'Make my calendar address',
  again: 'Make a new address',
  againTitle: 'Put a new address in place of this one?',
  againAsk: 'Calendars that read the address of now get nothing any more. Give each of them the new one.',
  label: 'Address of the calendar',
  made: (time: string) => `Made ${time}. Whoever has the address can read it.`,
  none: 'No address has been made yet.',
  end: 'End it',
  endTitle: 'End the calendar address?',
  endAsk: 'Calendars that read it get nothing any more, and it cannot be opened again.',
  failed: 'Whether there is a calendar address could not be read.',
  waiting: 'Looking for the calendar address.',
} as const
