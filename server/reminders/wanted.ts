import { studio } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { lastMoments, leaving, ragCalls, readies } from './causes'
import { roomChecks, vapourCalls } from './vapour'
import { slippingCalls } from './promises'
import { reconcile } from './reconcile'
import type { Reconciled } from './reconcile'
import { readCallState } from './state'
import type { WantedReminder } from './types'

/** Every call that a studio's state asks for at `now` (ms UTC). */
export function wantedReminders(db: Database, studioId: number, now: number): WantedReminder[] {
  const state = readCallState(db, studioId, now)
  if (!state) return []
  return [...ragCalls(state, now), ...vapourCalls(state), ...roomChecks(state), ...lastMoments(state, now), ...readies(state, now), ...leaving(state, now), ...slippingCalls(db, studioId, now)]
}

/** Brings one studio's calls in line with its state. To be called after each new plan, and by the minute tick. */
export function tellingListener(db: Database, studioId: number, now: number): Reconciled {
  return reconcile(db, studioId, wantedReminders(db, studioId, now), now)
}

/** The same for every studio of the installation. */
export function reconcileAll(db: Database, now: number): void {
  for (const { id } of db.select({ id: studio.id }).from(studio).all()) tellingListener(db, id, now)
}
