import { studio } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { callWords } from '#shared/words/calls'
import { clockWords, wallClock } from '#shared/time'
import { lastMoments, leaving, ragCalls, readies } from './causes'
import { localDate } from './hours'
import { reconcile } from './reconcile'
import type { Reconciled } from './reconcile'
import { readCallState } from './state'
import type { WantedReminder } from './types'

/** Every call that a studio's state asks for at `now` (ms UTC). */
export function wantedReminders(db: Database, studioId: number, now: number): WantedReminder[] {
  const state = readCallState(db, studioId, now)
  if (!state) return []
  const say = (at: number) => sayTime(at, now, state.hours.zone)
  return [...ragCalls(state, now, say), ...lastMoments(state, now, say), ...readies(state, say), ...leaving(state, now, say)]
}

/** Brings one studio's calls in line with its state. To be called after each new plan, and by the minute tick. */
export function tellingListener(db: Database, studioId: number, now: number): Reconciled {
  return reconcile(db, studioId, wantedReminders(db, studioId, now), now)
}

/** Clock words, with the weekday when it is another day. */
function sayTime(at: number, now: number, zone: string) {
  const wall = wallClock(zone).wallAt(at)
  const clock = clockWords(wall.minute)
  return localDate(at, zone) === localDate(now, zone) ? clock : callWords.onDay(wall.weekday, clock)
}

/** The same for every studio of the installation. */
export function reconcileAll(db: Database, now: number): void {
  for (const { id } of db.select({ id: studio.id }).from(studio).all()) tellingListener(db, id, now)
}
