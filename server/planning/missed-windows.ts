import { and, eq, isNull } from 'drizzle-orm'
import { alias } from 'drizzle-orm/sqlite-core'
import { act, coat, pieceStep, recoatWindow, scheduleLink, turn, windowPrediction } from '~~/db/schema'
import { pieceStates } from '~~/server/services/piece-states'
import { change } from '~~/server/utils/change'
import type { Database, Transaction } from '~~/server/utils/database'
import { owned, scoped } from '~~/server/utils/scoped'
import { predictPieces } from '~~/server/work/predict'
import { insertAct, piecesOf, subjectsOf } from '~~/server/work/record'
import { refold } from '~~/server/work/refold'
import { readPiece } from '#shared/verdict/piece'

interface Missed { pieceId: number, from: string, to: string, recovery: string | null, minutes: number, partIds: number[] }

/**
 * Puts in the recovery that a material asks for where its window shut with nobody at it, and takes it out again where a
 * correction has opened the window after all. Said by the product itself, as acts like any other.
 */
export function missedWindows(db: Database, studioId: number, now: number) {
  const missed = findMissed(db, studioId, now)
  const reopened = findReopened(db, studioId, now)
  if (missed.length === 0 && reopened.length === 0) return
  change(db, studioId, 'work', (tx) => {
    const pieceIds = new Set<number>()
    for (const each of missed) {
      insertAct(tx, studioId, {
        clientKey: `window ${each.pieceId} ${each.from} ${each.to} ${now}`, kind: 'window missed', doneAt: now, toldAt: now, acting: { actor: 'system', memberId: null },
        body: { from: each.from, to: each.to, recovery: each.recovery, minutes: each.minutes }, subjects: each.partIds.map(partId => ({ partId, doneAt: now })),
      })
      pieceIds.add(each.pieceId)
    }
    for (const each of reopened) for (const pieceId of takeBack(tx, studioId, each, now)) pieceIds.add(pieceId)
    refold(tx, studioId, [...pieceIds])
    predictPieces(tx, studioId, [...pieceIds], now)
  })
}

function findMissed(db: Database, studioId: number, now: number): Missed[] {
  const where = { rooms: [], places: [] }
  return pieceStates(db, studioId, null).flatMap(piece => readPiece(piece, where, now, null).turns.flatMap(({ turn: open, begin }): Missed[] => {
    if (begin.because.code !== 'window shut') return []
    const own = open.step.status === 'resting'
    const from = own ? { key: open.step.key, id: open.step.id } : keyBefore(db, studioId, piece.id, begin.because.step)
    if (!from) return []
    const recovery = (own ? null : agreedBetween(db, studioId, from.id, open.step.id)) ?? recoveryAfter(db, studioId, from.id)
    return [{ pieceId: piece.id, from: from.key, to: open.step.key, recovery: recovery?.recovery ?? null, minutes: recovery?.recoveryMin ?? 10, partIds: open.partIds }]
  }))
}

function keyBefore(db: Database, studioId: number, pieceId: number, name: string) {
  return db.select({ key: pieceStep.key, id: pieceStep.id }).from(pieceStep).where(scoped(pieceStep, studioId, eq(pieceStep.pieceId, pieceId), eq(pieceStep.name, name))).get() ?? null
}

/** What the schedule itself says a missed window between two steps asks for. */
function agreedBetween(db: Database, studioId: number, fromId: number, toId: number) {
  const scheduled = (id: number) => db.select({ id: pieceStep.scheduleStepId }).from(pieceStep).where(owned(pieceStep, studioId, id)).get()?.id ?? 0
  const row = db.select({ recovery: scheduleLink.recovery, recoveryMin: scheduleLink.recoveryMin }).from(scheduleLink)
    .where(scoped(scheduleLink, studioId, eq(scheduleLink.fromStepId, scheduled(fromId)), eq(scheduleLink.toStepId, scheduled(toId)))).get()
  return row?.recovery ? { recovery: row.recovery, recoveryMin: row.recoveryMin ?? 10 } : null
}

function recoveryAfter(db: Database, studioId: number, stepId: number) {
  const rows = db.select({ recovery: recoatWindow.recovery, recoveryMin: recoatWindow.recoveryMin }).from(turn)
    .innerJoin(coat, eq(coat.turnId, turn.id)).innerJoin(recoatWindow, eq(recoatWindow.versionId, coat.materialVersionId))
    .where(scoped(turn, studioId, eq(turn.stepId, stepId))).all()
  return rows.find(row => row.recovery !== null) ?? null
}

interface Standing { id: number, rootId: number, doneAt: number, body: Record<string, unknown> }

/** Recoveries put in by the product whose window is open after all, and that nobody has begun. */
function findReopened(db: Database, studioId: number, now: number): Standing[] {
  const later = alias(act, 'later')
  const standing = db.select({ act }).from(act).leftJoin(later, eq(later.replacesActId, act.id))
    .where(and(scoped(act, studioId, eq(act.kind, 'window missed'), eq(act.voided, false)), isNull(later.id))).all().map(row => row.act)
  return standing.flatMap((each) => {
    const rootId = each.rootActId ?? each.id
    const step = db.select({ id: pieceStep.id, pieceId: pieceStep.pieceId, status: pieceStep.status }).from(pieceStep).where(scoped(pieceStep, studioId, eq(pieceStep.insertedByActId, rootId))).get()
    if (step?.status !== 'waiting') return []
    const windows = windowsAfter(db, studioId, step.pieceId, String(each.body.from))
    return windows.some(window => window.shutsAt === null || window.shutsAt > now) ? [{ id: each.id, rootId, doneAt: each.doneAt, body: each.body }] : []
  })
}

function windowsAfter(db: Database, studioId: number, pieceId: number, stepKey: string) {
  return db.select({ shutsAt: windowPrediction.shutsAt }).from(pieceStep).innerJoin(turn, eq(turn.stepId, pieceStep.id)).innerJoin(coat, eq(coat.turnId, turn.id)).innerJoin(windowPrediction, eq(windowPrediction.coatId, coat.id))
    .where(and(scoped(pieceStep, studioId, eq(pieceStep.pieceId, pieceId), eq(pieceStep.key, stepKey)), isNull(coat.settledAt), isNull(coat.strippedAt))).all()
}

function takeBack(tx: Transaction, studioId: number, standing: Standing, now: number): number[] {
  const subjects = subjectsOf(tx, studioId, standing.id)
  insertAct(tx, studioId, { clientKey: `window open ${standing.id}`, kind: 'window missed', doneAt: standing.doneAt, toldAt: now, acting: { actor: 'system', memberId: null }, body: standing.body, subjects, replaces: standing, voided: true })
  return piecesOf(tx, studioId, subjects.map(each => each.partId))
}
