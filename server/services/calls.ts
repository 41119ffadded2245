import { eq } from 'drizzle-orm'
import { callChoice } from '~~/db/schema'
import type { Database } from '~~/server/utils/database'
import { impossible } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { scoped } from '~~/server/utils/scoped'
import type { CallChoiceWire } from '#shared/schemas/calls'
import { callKinds } from '#shared/terms'
import type { CallKind } from '#shared/terms'
import { settings } from '#shared/words/settings'

/** Fire calls cannot be switched off. */
const isFixed = (kind: CallKind) => kind === 'rags'

/** Which calls a member gets. Every kind is on until they turn it off. */
export function listCallChoices(db: Database, studioId: number, memberId: number): CallChoiceWire[] {
  const rows = db.select().from(callChoice).where(scoped(callChoice, studioId, eq(callChoice.memberId, memberId))).all()
  return callKinds.map(kind => ({ kind, fixed: isFixed(kind), wanted: rows.find(row => row.kind === kind)?.wanted ?? true }))
}

export function chooseCall(db: Database, studioId: number, memberId: number, kind: CallKind, wanted: boolean): { ok: true } | Refusal {
  if (isFixed(kind)) return wanted ? { ok: true } : impossible(settings.ragsStay, { kind: settings.ragsStay })
  db.insert(callChoice).values({ studioId, memberId, kind, wanted })
    .onConflictDoUpdate({ target: [callChoice.memberId, callChoice.kind], set: { wanted } }).run()
  return { ok: true }
}
