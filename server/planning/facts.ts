import { and, asc, eq, isNull, sql } from 'drizzle-orm'
import { batch, closure, coat, member, memberStepKind, openHours, order, part, piece, pieceStep, pin, place, plan, planChange, planEntry, planHold, planMate, prediction, recoatWindow, stay, stepLink, stepTarget, studio, turn, windowPrediction } from '~~/db/schema'
import { readVapourRooms } from '~~/server/planning/vapour'
import type { Database } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'
import { grouped } from '#shared/grouped'
import type { OpenHours } from '#shared/open-hours'

/** Statuses of steps that a plan has to do with. */
const open = ['waiting', 'doing', 'resting'] as const

/** All that a plan is made from, read in one go: work that is left, what it waits for, hands, places and the last plan. */
export function readPlanFacts(db: Database, studioId: number) {
  const owner = db.select().from(studio).where(eq(studio.id, studioId)).get()
  if (!owner) return null
  const here = and(isNull(piece.goneAt), isNull(batch.closedAt))
  const pieces = db.select({ id: piece.id, name: piece.name, batchId: piece.batchId, batch: batch.name, sizeUnits: piece.sizeUnits, startsAt: batch.startsAt, dueAt: order.dueAt, weight: order.weight })
    .from(piece).innerJoin(batch, eq(batch.id, piece.batchId)).leftJoin(order, eq(order.id, batch.orderId)).where(scoped(piece, studioId, here)).orderBy(asc(piece.id)).all()
  const openSteps = scoped(pieceStep, studioId, sql`${pieceStep.status} in ('waiting', 'doing', 'resting', 'set aside')`)
  const steps = db.select({ step: pieceStep }).from(pieceStep).innerJoin(piece, eq(piece.id, pieceStep.pieceId)).innerJoin(batch, eq(batch.id, piece.batchId))
    .where(and(openSteps, here)).orderBy(asc(pieceStep.pieceId), asc(pieceStep.ordinal)).all().map(row => row.step)
  const turns = db.select({ turn }).from(pieceStep).innerJoin(turn, eq(turn.stepId, pieceStep.id))
    .where(and(openSteps, sql`${turn.status} in ('waiting', 'doing')`)).orderBy(asc(turn.stepId), asc(turn.ordinal)).all().map(row => row.turn)
  const links = db.select({ link: stepLink }).from(pieceStep).innerJoin(stepLink, eq(stepLink.toStepId, pieceStep.id)).where(openSteps).all().map(row => row.link)
  const targets = db.selectDistinct({ stepId: stepTarget.stepId, partId: stepTarget.partId }).from(pieceStep).innerJoin(stepTarget, eq(stepTarget.stepId, pieceStep.id)).where(openSteps).all()
  return { owner, pieces, steps: steps.filter(step => open.some(status => status === step.status)), aside: new Set(steps.filter(step => step.status === 'set aside').map(step => step.id)), turns, links, targets, vapour: readVapourRooms(db, studioId), ...readFilms(db, studioId), ...readHands(db, studioId), ...readLast(db, studioId) }
}
export type PlanFacts = NonNullable<ReturnType<typeof readPlanFacts>>

/** When the studio itself is open, whoever is there. */
export const studioHours = ({ hours, closures }: Pick<PlanFacts, 'hours' | 'closures'>): OpenHours => ({ open: hours.filter(each => each.memberId === null), closed: closures.filter(each => each.memberId === null) })

/** The newest live film of each step with its times: what the next step waits for. */
function readFilms(db: Database, studioId: number) {
  const live = scoped(coat, studioId, isNull(coat.settledAt), isNull(coat.strippedAt))
  const films = db.select({ coatId: coat.id, pieceId: coat.pieceId, kind: coat.kind, stepId: turn.stepId, versionId: coat.materialVersionId, endedAt: coat.endedAt }).from(coat).innerJoin(turn, eq(turn.id, coat.turnId)).where(live).orderBy(asc(coat.endedAt)).all()
  const rungs = db.select({ prediction }).from(coat).innerJoin(prediction, eq(prediction.coatId, coat.id)).where(live).orderBy(asc(prediction.ordinal)).all().map(row => row.prediction)
  const windows = db.select({ window: windowPrediction }).from(coat).innerJoin(windowPrediction, eq(windowPrediction.coatId, coat.id)).where(live).orderBy(asc(windowPrediction.ordinal)).all().map(row => row.window)
  const recoveries = db.select({ versionId: recoatWindow.versionId, name: recoatWindow.recovery, minutes: recoatWindow.recoveryMin }).from(recoatWindow).where(scoped(recoatWindow, studioId)).all()
  return { films, rungs, windows, recoveries }
}

function readHands(db: Database, studioId: number) {
  const members = db.select({ id: member.id, role: member.role }).from(member).where(scoped(member, studioId, isNull(member.leftAt))).orderBy(asc(member.id)).all()
  const kinds = db.select({ memberId: memberStepKind.memberId, kind: memberStepKind.kind }).from(memberStepKind).where(scoped(memberStepKind, studioId)).all()
  const hours = db.select().from(openHours).where(scoped(openHours, studioId)).all()
  const closures = db.select().from(closure).where(scoped(closure, studioId)).all()
  const places = db.select().from(place).where(scoped(place, studioId)).orderBy(asc(place.sort), asc(place.id)).all()
  const stays = db.select({ partId: stay.partId, pieceId: part.pieceId, placeId: stay.placeId, roomId: place.roomId }).from(stay).innerJoin(place, eq(place.id, stay.placeId)).innerJoin(part, eq(part.id, stay.partId))
    .where(scoped(stay, studioId, isNull(stay.toAt))).all()
  return { members, kinds, hours, closures, places, stays }
}

function readLast(db: Database, studioId: number) {
  const inForce = scoped(plan, studioId, sql`${plan.current} = 1`)
  const mates = grouped(db.select({ mate: planMate }).from(plan).innerJoin(planMate, eq(planMate.planId, plan.id)).where(inForce).all(), ({ mate }) => mate.turnId)
  const last = db.select({ entry: planEntry }).from(plan).innerJoin(planEntry, eq(planEntry.planId, plan.id)).where(inForce).all()
    .map(({ entry }) => ({ ...entry, memberIds: [...entry.memberId === null ? [] : [entry.memberId], ...(mates.get(entry.turnId) ?? []).map(({ mate }) => mate.memberId)] }))
  const lastChanges = db.select({ change: planChange }).from(plan).innerJoin(planChange, eq(planChange.planId, plan.id)).where(inForce).all().map(row => row.change)
  const lastHolds = db.select({ hold: planHold }).from(plan).innerJoin(planHold, eq(planHold.planId, plan.id)).where(inForce).all().map(row => row.hold)
  const over = sql`(${turn.status} in ('done', 'left out') or ${pieceStep.status} in ('done', 'set aside', 'left out') or ${piece.goneAt} is not null or ${batch.closedAt} is not null)`
  const lastOver = db.select({ turnId: turn.id, stepId: turn.stepId, status: turn.status, step: pieceStep.name, batch: batch.name }).from(plan).innerJoin(planEntry, eq(planEntry.planId, plan.id)).innerJoin(turn, eq(turn.id, planEntry.turnId))
    .innerJoin(pieceStep, eq(pieceStep.id, turn.stepId)).innerJoin(piece, eq(piece.id, pieceStep.pieceId)).innerJoin(batch, eq(batch.id, piece.batchId)).where(and(inForce, over)).all()
  const lastHours = db.select({ hours: plan.hours }).from(plan).where(inForce).get()?.hours ?? null
  const pins = db.select().from(pin).where(scoped(pin, studioId)).all()
  return { last, lastHours, lastChanges, lastHolds, lastOver, pins }
}

/** The material editions that coats to come will need times for. */
export function materialsToCome(facts: PlanFacts): number[] {
  return [...new Set(facts.steps.flatMap(step => step.materialVersionId ?? []))]
}
