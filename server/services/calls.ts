import { eq } from 'drizzle-orm'
import { callChoice } from '~~/db/schema'
import { isOnByDefault, isSwitchable } from '~~/server/reminders/audience'
import type { Database } from '~~/server/utils/database'
import { impossible } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import type { CallChoiceWire } from '#shared/schemas/calls'
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
