import { eq } from 'drizzle-orm'
import { quietHours, studio } from '~~/db/schema'
import { isSwitchable } from '~~/server/reminders/audience'
import type { Database, Transaction } from '~~/server/utils/database'
import type { QuietHours } from '#shared/schemas/calls'
import type { CallKind } from '#shared/terms'
import { addDays, fromLocal, localDate, studioZone } from '#shared/time'
import type { StudioZone } from '#shared/time'

/**
 * When quiet hours that hold at `at` (ms UTC) end, in ms UTC; null outside them. Wall time, so that they begin and
 * end by the clock on the wall in the nights in which it is changed.
 */
export function quietUntil({ fromMin, toMin }: QuietHours, zone: StudioZone, at: number): number | null {
  const overMidnight = toMin < fromMin
  for (const offset of [-1, 0]) {
    const date = addDays(localDate(at, zone), offset)
    const until = fromLocal(overMidnight ? addDays(date, 1) : date, toMin, zone)
    if (fromLocal(date, fromMin, zone) <= at && at < until) return until
  }
  return null
}

/** Until when a call of this kind is kept from a member at `at` (ms UTC), or null: it may go. Fire calls always may. */
export function heldUntil(tx: Database | Transaction, memberId: number, kind: CallKind, at: number): number | null {
  if (!isSwitchable(kind)) return null
  const row = tx.select({ fromMin: quietHours.fromMin, toMin: quietHours.toMin, zone: studio.zone }).from(quietHours).innerJoin(studio, eq(studio.id, quietHours.studioId)).where(eq(quietHours.memberId, memberId)).get()
  return row ? quietUntil(row, studioZone(row.zone), at) : null
}
