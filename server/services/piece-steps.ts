import { eq, inArray, isNull, sql } from 'drizzle-orm'
import { coat, doubt, pieceStep, plan, planEntry, stepLink, stepTarget, turn } from '~~/db/schema'
import { memberNames } from '~~/server/services/member-names'
import { materialNames } from '~~/server/services/piece-names'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import type { FoldedPiece } from '~~/server/work/refold'
import { inGraphOrder } from '#shared/schedule-walk'
import type { StepLine } from '#shared/schemas/piece-detail'

/** Every step of a piece, each after all it waits for: what is done, what lies drying, what is to come and when. */
export function pieceSteps(db: Database, studioId: number, folded: FoldedPiece): StepLine[] {
  const rows = readRows(db, studioId, folded.piece.id)
  const names = new Map(rows.steps.map(step => [step.id, step]))
  const materials = materialNames(db, studioId, rows.steps.flatMap(step => step.materialVersionId ?? []))
  const members = memberNames(db, studioId)
  const acts = new Map(folded.acts.map(each => [each.rootId, each]))
  const keyed = rows.links.map(link => ({ from: names.get(link.fromStepId)?.key ?? '', to: names.get(link.toStepId)?.key ?? '' }))
  return inGraphOrder(rows.steps, keyed).map((step): StepLine => {
    const turns = rows.turns.filter(each => each.stepId === step.id)
    const work = turns.filter(each => each.kind === 'work' && each.status !== 'left out')
    const film = rows.coats.filter(each => turns.some(one => one.id === each.turnId)).at(-1)
    const told = step.insertedByActId === null ? undefined : acts.get(step.insertedByActId)
    const before = rows.links.filter(link => link.toStepId === step.id).flatMap(link => names.get(link.fromStepId) ?? [])
    return {
      id: step.id, key: step.key, name: step.name || (materials.get(step.materialVersionId ?? 0) ?? ''), kind: step.kind, origin: step.origin, status: step.status, asideReason: step.asideReason,
      material: materials.get(step.materialVersionId ?? 0) ?? null,
      parts: folded.parts.length < 2 ? [] : folded.parts.filter(each => rows.targets.some(target => target.stepId === step.id && target.partId === each.id)).map(each => each.name),
      waitsFor: before.filter(each => ['waiting', 'doing', 'set aside'].includes(each.status)).map(each => each.name),
      turnsDone: work.filter(each => each.status === 'done').length, turnsOf: work.length,
      doneAt: turns.reduce<number | null>((at, each) => (each.doneAt === null ? at : Math.max(at ?? 0, each.doneAt)), null),
      plannedAt: turns.filter(each => each.status === 'waiting').flatMap(each => rows.entries.filter(entry => entry.turnId === each.id).map(entry => entry.startsAt)).sort((a, b) => a - b)[0] ?? null,
      film: film ? { hold: film.outAt === null ? film.hold : null, doubt: rows.doubts.find(each => each.coatId === film.id)?.cause ?? null } : null,
      because: told ? { kind: told.kind, doneAt: told.doneAt, by: told.memberId === null ? null : members.get(told.memberId) ?? null } : null,
    }
  })
}

function readRows(db: Database, studioId: number, pieceId: number) {
  const steps = db.select().from(pieceStep).where(scoped(pieceStep, studioId, eq(pieceStep.pieceId, pieceId))).orderBy(pieceStep.ordinal).all()
  const ids = steps.map(step => step.id)
  const turns = db.select().from(turn).where(scoped(turn, studioId, inArray(turn.stepId, ids))).orderBy(turn.ordinal).all()
  const coats = db.select().from(coat).where(scoped(coat, studioId, eq(coat.pieceId, pieceId), isNull(coat.settledAt), isNull(coat.strippedAt))).orderBy(coat.endedAt).all()
  return {
    steps, turns, coats,
    links: db.select().from(stepLink).where(scoped(stepLink, studioId, inArray(stepLink.toStepId, ids))).all(),
    targets: db.selectDistinct({ stepId: stepTarget.stepId, partId: stepTarget.partId }).from(stepTarget).where(scoped(stepTarget, studioId, inArray(stepTarget.stepId, ids))).all(),
    doubts: db.select().from(doubt).where(scoped(doubt, studioId, inArray(doubt.coatId, coats.map(each => each.id)), isNull(doubt.clearedActId))).all(),
    entries: db.select({ turnId: planEntry.turnId, startsAt: planEntry.startsAt }).from(plan).innerJoin(planEntry, eq(planEntry.planId, plan.id))
      .where(scoped(plan, studioId, sql`${plan.current} = 1`, inArray(planEntry.turnId, turns.map(each => each.id)))).all(),
  }
}
