import { desc, eq, isNull } from 'drizzle-orm'
import { act, keepOut, room, vapourStart } from '~~/db/schema'
import { memberNames } from '~~/server/services/member-names'
import type { Membership } from '~~/server/services/sessions'
import { end } from '~~/server/services/vapour-starts'
import { change } from '~~/server/utils/change'
import type { Database } from '~~/server/utils/database'
import { absent, conflict, notAllowed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { owned, scoped } from '~~/server/utils/scoped'
import { insertAct } from '~~/server/work/record'
import { may } from '#shared/permissions'
import { roomWords } from '#shared/words/rooms'

/**
 * A named person has looked at a room that was shut and lets the others in again: an act, and the end of the keep-out.
 * The one who shut it may, and every owner; another maker is told whom to ask. Time alone never opens a room.
 */
export function openRoom(db: Database, studioId: number, who: Membership, roomId: number, now: number): { ok: true } | Refusal {
  return change(db, studioId, 'work', (tx): { ok: true } | Refusal => {
    const named = tx.select({ name: room.name }).from(room).where(owned(room, studioId, roomId)).get()
    if (!named) return absent()
    if (!may(who.role, 'start batches')) return notAllowed(roomWords.makersOnly)
    const shut = tx.select().from(keepOut).where(scoped(keepOut, studioId, eq(keepOut.roomId, roomId), isNull(keepOut.openedAt))).get()
    if (!shut) return conflict(roomWords.isOpen(named.name))
    const opener = shut.opensByMemberId
    if (opener !== null && opener !== who.id && who.role !== 'owner') return notAllowed(roomWords.opensBy(named.name, memberNames(db, studioId).get(opener) ?? ''))
    const actId = insertAct(tx, studioId, { clientKey: `open room ${shut.id} ${now}`, kind: 'room opened', doneAt: now, toldAt: now, acting: { actor: 'member', memberId: who.id }, body: { roomId, keepOutId: shut.id }, subjects: [] })
    end(tx, studioId, roomId, now)
    tx.update(keepOut).set({ openedActId: actId, openedAt: now }).where(owned(keepOut, studioId, shut.id)).run()
    return { ok: true }
  })
}

/** How long an opening can be taken back, ms. */
export const reshutMs = 24 * 60 * 60_000

/**
 * Takes the last opening of a room back: the keep-out stands as if it had not been opened. Anybody may, since it can only keep people out; the act
 * that opened it stays in the history, replaced by one that takes it back.
 */
export function shutAgain(db: Database, studioId: number, who: Membership, roomId: number, now: number): { ok: true } | Refusal {
  return change(db, studioId, 'work', (tx): { ok: true } | Refusal => {
    const named = tx.select({ name: room.name }).from(room).where(owned(room, studioId, roomId)).get()
    if (!named) return absent()
    const last = tx.select().from(keepOut).where(scoped(keepOut, studioId, eq(keepOut.roomId, roomId))).orderBy(desc(keepOut.id)).get()
    if (!last || last.openedAt === null || last.openedActId === null || now - last.openedAt > reshutMs) return conflict(roomWords.nothingToShut(named.name))
    const opening = tx.select().from(act).where(owned(act, studioId, last.openedActId)).get()
    if (!opening) return absent()
    insertAct(tx, studioId, { clientKey: `shut room ${last.id} ${now}`, kind: 'room opened', doneAt: now, toldAt: now, acting: { actor: 'member', memberId: who.id }, body: opening.body, subjects: [], replaces: { id: opening.id, rootId: opening.rootActId ?? opening.id }, voided: true })
    // The work that the opening ended goes on as it was said to, its exhaust too.
    tx.update(vapourStart).set({ endedAt: null }).where(scoped(vapourStart, studioId, eq(vapourStart.roomId, roomId), eq(vapourStart.endedAt, last.openedAt), eq(vapourStart.exhaust, 'running'))).run()
    tx.update(keepOut).set({ openedActId: null, openedAt: null }).where(owned(keepOut, studioId, last.id)).run()
    return { ok: true }
  })
}
