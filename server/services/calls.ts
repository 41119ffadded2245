import { eq } from 'drizzle-orm'
import { callChoice, quietHours } from '~~/db/schema'
import { isOnByDefault, isSwitchable } from '~~/server/reminders/audience'
import type { Database } from '~~/server/utils/database'
import { impossible } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import type { CallChoiceWire, QuietHours, QuietWire } from '#shared/schemas/calls'
import { callKinds } from '#shared/terms'
import type { CallKind, Role } from '#shared/terms'
import { settings } from '#shared/words/settings'

/** Fire calls cannot be switched off. */
const isFixed = (kind: CallKind) => !isSwitchable(kind)

/** Which calls a member gets: what they chose, else what their role gets. */
export function listCallChoices(db: Database, studioId: number, { id: memberId, role }: { id: number, role: Role }): CallChoiceWire[] {
  const rows = db.select().from(callChoice).where(scoped(callChoice, studioId, eq(callChoice.memberId, memberId))).all()
  return callKinds.map(kind => ({ kind, fixed: isFixed(kind), wanted: rows.find(row => row.kind === kind)?.wanted ?? isOnByDefault(kind, role) }))
}

export function chooseCall(db: Database, studioId: number, memberId: number, kind: CallKind, wanted: boolean): { ok: true } | Refusal {
  if (isFixed(kind)) return wanted ? { ok: true } : impossible(settings.fireStays, { kind: settings.fireStays })
  db.insert(callChoice).values({ studioId, memberId, kind, wanted })
    .onConflictDoUpdate({ target: [callChoice.memberId, callChoice.kind], set: { wanted } }).run()
  return { ok: true }
}

/** When a member is not to be called but for fire. */
export function findQuiet(db: Database, studioId: number, memberId: number): QuietWire {
  const row = db.select({ fromMin: quietHours.fromMin, toMin: quietHours.toMin }).from(quietHours).where(scoped(quietHours, studioId, eq(quietHours.memberId, memberId))).get()
  return { quiet: row ?? null }
}

export function chooseQuiet(db: Database, studioId: number, memberId: number, quiet: QuietHours | null): { ok: true } {
  if (quiet === null) db.delete(quietHours).where(scoped(quietHours, studioId, eq(quietHours.memberId, memberId))).run()
  else db.insert(quietHours).values({ studioId, memberId, ...quiet }).onConflictDoUpdate({ target: quietHours.memberId, set: quiet }).run()
  return { ok: true }
}
