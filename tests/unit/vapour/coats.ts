import type { RoomVapour, VapourLimits, VentilatedRoom, WetCoat } from '#shared/vapour/types'
import { roomVapour } from '#shared/vapour/room'

export const from = Date.UTC(2026, 3, 6, 8)
export const hourMs = 3_600_000

/** Limits of no solvent in particular: 350 mg/m3 over eight hours, 1800 over a quarter of an hour, 42 g/m3 to burn. */
export const limits: VapourLimits = { limitMgM3: 350, ceilingMgM3: 1800, lelGramsM3: 42, textOnly: null }

export const coatOf = (over: Partial<WetCoat> = {}): WetCoat => ({ at: from, carrier: 'solvent', massGrams: 135, touchDryMinutes: 240, limits, ...over })

export const airOf = (coats: readonly WetCoat[], room: Partial<VentilatedRoom> = {}, hours = 24): RoomVapour =>
  roomVapour({ volumeM3: 40, airChangesPerHour: 4, mixingFactor: 3, ...room }, coats, { from, hours })
