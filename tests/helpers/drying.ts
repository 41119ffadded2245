import type { CoatCase, CoatPrediction, DryingMaterial, Milestone, Reading, RoomAir } from '#shared/drying/types'
import { roomClock } from '#shared/drying/clock'
import type { AirSpan } from '#shared/drying/ladder'
import type { BenchSpeed } from '#shared/drying/material'
import { prepareMaterial } from '#shared/drying/material'
import { predictCoat } from '#shared/drying/predict'
import { dryingTools } from '#shared/drying/tools'

/** Tables shared by the tests of one file. */
export const tools = dryingTools()

export const minuteMs = 60_000
export const hourMs = 60 * minuteMs
export const dayMs = 24 * hourMs

/** ms UTC of an ISO instant. */
export const at = (iso: string) => Date.parse(iso)

export function roomWith(over: Partial<RoomAir> = {}): RoomAir {
  return { readings: [], heated: true, nightDropC: 4, zone: 'UTC', usual: { tempC: 20, rh: 0.5 }, ...over }
}

/** A heated room read once, so that it keeps one climate for ever. */
export function steadyRoom(tempC: number, rh: number, readAt: number): RoomAir {
  return roomWith({ readings: [{ at: readAt, tempC, rh }] })
}

export const rung = (name: string, driver: Milestone['driver'], low: number, typical: number, high: number): Milestone => ({ name, driver, low, typical, high })

export function materialWith(over: Partial<DryingMaterial> = {}): DryingMaterial {
  return {
    reference: { tempC: 20, rh: 0.5 }, minTempC: 10, maxRh: 0.85, windows: [],
    milestones: [rung('set-to-touch', 'water', 20, 30, 50), rung('dry-to-handle', 'coalescence', 60, 120, 240), rung('cured', 'coalescence', 5000, 10_000, 20_000)],
    ...over,
  }
}

export function coatAt(appliedAt: number, over: Partial<CoatCase> = {}): CoatCase {
  return { appliedAt, size: 'normal', ground: 'primed', ...over }
}

/** Predicts a coat that stays in one room. `now` is its application unless told. */
export function predictIn(room: RoomAir, material: DryingMaterial, coat: CoatCase, now = coat.appliedAt, bench?: BenchSpeed): CoatPrediction {
  const clock = roomClock(room, coat.appliedAt, tools)
  const spans: AirSpan[] = [{ clock, fromAt: coat.appliedAt, toAt: null }]
  return predictCoat(prepareMaterial(material, tools, bench), coat, spans, { now, ...(bench ? { bench } : {}) })
}

export function read(iso: string, tempC: number | null, rh: number): Reading {
  return { at: at(iso), tempC, rh }
}
