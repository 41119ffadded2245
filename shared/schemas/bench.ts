import * as z from 'zod/mini'
import { actRequest } from '#shared/schemas/act'
import { name, rowId } from '#shared/schemas/common'
import type { Role, StepKind } from '#shared/terms'
import { benchRefusals } from '#shared/words/bench-refusals'

const lockMin = z.int(benchRefusals.lockMin).check(z.gte(1, benchRefusals.lockMin), z.lte(60, benchRefusals.lockMin))

/** POST /api/bench-tablets: `roomId` null shows all rooms; `lockMin` in minutes. */
export const benchTabletBody = z.strictObject({ name: name(benchRefusals.name), roomId: z.nullable(rowId), lockMin })
export type BenchTabletBody = z.output<typeof benchTabletBody>
export const benchTabletPatch = z.partial(benchTabletBody)
export type BenchTabletPatch = z.output<typeof benchTabletPatch>

/** A tablet as the settings show it: waiting for its code till `pairsTill`, in use since `pairedAt`, ended at `revokedAt`. */
export interface BenchTabletWire { id: number, name: string, roomId: number | null, lockMin: number, madeAt: string, pairsTill: string | null, pairedAt: string | null, revokedAt: string | null }

/** POST /api/bench/pair */
export const pairBody = z.strictObject({ code: z.string(benchRefusals.code).check(z.maxLength(40, benchRefusals.code)) })

/** PUT /api/own-pin */
export const pinBody = z.strictObject({ pin: z.string(benchRefusals.pinDigits).check(z.maxLength(40, benchRefusals.pinLength)) })

/** POST /api/bench/person */
export const benchPersonBody = z.strictObject({ memberId: z.int(benchRefusals.member).check(z.positive(benchRefusals.member)), pin: z.string(benchRefusals.pinDigits).check(z.maxLength(40, benchRefusals.pinLength)) })

/** POST /api/bench/acts: an act, and under whose name it was pressed; null at the bench. */
export const benchAct = z.extend(actRequest, { memberId: z.nullable(rowId) })
export type BenchAct = z.output<typeof benchAct>

export interface OwnPinWire { set: boolean, lockedTill: string | null }

/** Somebody who acts at a bench tablet under their own name, till `till`. */
export interface BenchPerson { memberId: number, name: string, role: Role, stepKinds: StepKind[], till: string }

/** A tablet as it knows itself. `people` have a PIN. */
export interface BenchWire { id: number, name: string, studio: { name: string, zone: string }, roomId: number | null, lockMin: number, locked: boolean, as: BenchPerson | null, people: { id: number, name: string }[] }
