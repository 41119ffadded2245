import { asc, eq } from 'drizzle-orm'
import { scheduleCheck, scheduleFace, scheduleLink, schedulePart, scheduleStep, scheduleStepTarget } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'

/** Minutes of a recovery that nobody timed (planning value). */
const usualRecovery = 10

/** An edition of a finishing schedule with all its rows, as a piece is started from it. */
export interface ScheduleEdition {
  parts: (typeof schedulePart.$inferSelect & { faces: (typeof scheduleFace.$inferSelect)[] })[]
  steps: (typeof scheduleStep.$inferSelect & { targets: { partKey: string, faceKey: string | null }[], checks: (typeof scheduleCheck.$inferSelect)[] })[]
  links: { from: string, to: string, milestone: typeof scheduleLink.$inferSelect['milestone'], risk: typeof scheduleLink.$inferSelect['risk'], windowed: boolean, recovery: { name: string, minutes: number } | null }[]
}

/** Reads one edition. An edition in use is frozen, so callers may keep what they read for the length of a request. */
export function readEdition(db: Database | Transaction, studioId: number, versionId: number): ScheduleEdition {
  const parts = db.select().from(schedulePart).where(scoped(schedulePart, studioId, eq(schedulePart.versionId, versionId))).orderBy(asc(schedulePart.id)).all()
  const faces = db.select({ face: scheduleFace }).from(scheduleFace).innerJoin(schedulePart, eq(schedulePart.id, scheduleFace.partId))
    .where(scoped(schedulePart, studioId, eq(schedulePart.versionId, versionId))).orderBy(asc(scheduleFace.id)).all().map(row => row.face)
  const steps = db.select().from(scheduleStep).where(scoped(scheduleStep, studioId, eq(scheduleStep.versionId, versionId))).orderBy(asc(scheduleStep.ordinal)).all()
  const targets = db.select({ target: scheduleStepTarget }).from(scheduleStepTarget).innerJoin(scheduleStep, eq(scheduleStep.id, scheduleStepTarget.stepId))
    .where(scoped(scheduleStep, studioId, eq(scheduleStep.versionId, versionId))).orderBy(asc(scheduleStepTarget.id)).all().map(row => row.target)
  const checks = db.select({ check: scheduleCheck }).from(scheduleCheck).innerJoin(scheduleStep, eq(scheduleStep.id, scheduleCheck.stepId))
    .where(scoped(scheduleStep, studioId, eq(scheduleStep.versionId, versionId))).orderBy(asc(scheduleCheck.ordinal)).all().map(row => row.check)
  const links = db.select({ link: scheduleLink }).from(scheduleLink).innerJoin(scheduleStep, eq(scheduleStep.id, scheduleLink.fromStepId))
    .where(scoped(scheduleStep, studioId, eq(scheduleStep.versionId, versionId))).all().map(row => row.link)
  const partKeys = new Map(parts.map(part => [part.id, part.key]))
  const faceKeys = new Map(faces.map(face => [face.id, face.key]))
  const stepKeys = new Map(steps.map(step => [step.id, step.key]))
  return {
    parts: parts.map(part => ({ ...part, faces: faces.filter(face => face.partId === part.id) })),
    steps: steps.map(step => ({
      ...step,
      targets: targets.filter(target => target.stepId === step.id).map(target => ({ partKey: partKeys.get(target.partId) ?? '', faceKey: target.faceId === null ? null : faceKeys.get(target.faceId) ?? null })),
      checks: checks.filter(check => check.stepId === step.id),
    })),
    links: links.map(link => ({ from: stepKeys.get(link.fromStepId) ?? '', to: stepKeys.get(link.toStepId) ?? '', milestone: link.milestone, risk: link.risk, windowed: link.windowed, recovery: link.recovery === null ? null : { name: link.recovery, minutes: link.recoveryMin ?? usualRecovery } })),
  }
}
