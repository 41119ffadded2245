import { eq } from 'drizzle-orm'
import { expect } from 'vitest'
import { openHours, planEntry } from '~~/db/schema'
import { atOnce, replan } from '~~/server/planning/replan'
import { movedTurns } from '~~/server/services/plan-moves'
import { studioZone } from '#shared/time'
import type { plannedStudio } from './planned-studio'

export type PlannedStudio = ReturnType<typeof plannedStudio>
export const zone = studioZone('UTC')

/** Plans a studio anew at an instant, ms UTC. */
export const planAt = async (studio: PlannedStudio, at: number) => expect(await replan(studio.db, studio.studioId, at, atOnce)).toMatchObject({ ok: true })
/** When the plan lets a turn begin, ms UTC; 0 without a start. */
export const startOf = ({ db }: PlannedStudio, turnId: number) => db.select().from(planEntry).where(eq(planEntry.turnId, turnId)).get()?.startsAt ?? 0
/** What is told at an instant of starts that moved. */
export const movesAt = (studio: PlannedStudio, at: number) => movedTurns(studio.db, studio.studioId, at, { open: studio.db.select().from(openHours).all(), closed: [] }, zone)
