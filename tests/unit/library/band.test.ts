import { describe, expect, it } from 'vitest'
import { roomClock } from '#shared/drying/clock'
import type { RoomClock } from '#shared/drying/clock'
import { prepareMaterial } from '#shared/drying/material'
import { predictCoat } from '#shared/drying/predict'
import { dryingTools } from '#shared/drying/tools'
import type { Air } from '#shared/drying/types'
import { findLibraryMaterial, libraryMaterials } from '#shared/library/index'
import { dryingMaterial } from '#shared/library/types'
import type { LibraryMaterial } from '#shared/library/types'

const day = 86_400_000
const tools = dryingTools()
const clocks = new Map<string, RoomClock>()

/** A heated room that keeps one climate and has readings to the end; each climate is built once. */
function steadyRoom(air: Air): RoomClock {
  const name = JSON.stringify(air)
  const clock = clocks.get(name) ?? roomClock({ readings: [{ at: 0, ...air }, { at: 450 * day, ...air }], heated: true, nightDropC: 0, zone: 'UTC', usual: air }, 0, tools)
  clocks.set(name, clock)
  return clock
}

/** What is foretold of a normal coat put on at 0 in the sheet's own climate. */
function atReference(material: LibraryMaterial) {
  const drying = dryingMaterial(material)
  const coat = { appliedAt: 0, size: 'normal' as const, ground: 'primed' as const }
  return predictCoat(prepareMaterial(drying, tools), coat, [{ clock: steadyRoom(drying.reference), fromAt: 0, toAt: null }], { now: 0 })
}
const minutes = (at: number | null) => at === null ? Infinity : at / 60_000

describe('what the clock makes of the library in the sheet\'s own climate', () => {
  it.each(libraryMaterials.map(m => [m.key, m] as const))('%s comes back', (_key, material) => {
    const { milestones, state } = atReference(material)
    expect(state).toBe('sound')
    material.milestones.forEach((rung, at) => {
      const made = milestones[at]
      expect(made?.name).toBe(rung.name)
      expect(made?.reason, rung.name).toBeNull()
      // A lopsided sheet (2, 12, 24 h for chalk-type paint is the worst) pulls the middle towards its long side, for what the bench shares
      // is taken as even on both sides; the cautious end does not move.
      const likely = minutes(made?.likelyAt ?? null) / rung.typical
      expect(likely, rung.name).toBeGreaterThan(0.7)
      expect(likely, rung.name).toBeLessThan(1.2)
      // Within 15 % of the sheet's high end. A sheet tighter than 0.18 in the log is never believed so far, and the clock keeps at least
      // sqrt(0.15^2 + 0.10^2) = 0.18, so its high end may lie above: exp(1.2816 x 0.18) = 1.26 of typical.
      const cautious = minutes(made?.p90At ?? null) / Math.max(rung.high, rung.typical * Math.exp(1.2816 * 0.18))
      expect(cautious, rung.name).toBeGreaterThan(0.85)
      expect(cautious, rung.name).toBeLessThan(1.15)
    })
  })

  it('opens and shuts the windows that schedules wait for', () => {
    for (const key of ['oil-size-slow', 'oil-size-quick', 'epoxy-coating', 'water-polyurethane', 'wiping-varnish', 'nitrocellulose-lacquer']) {
      const material = findLibraryMaterial(key)
      if (!material) throw new Error(`no ${key}`)
      const [first] = atReference(material).windows
      expect(minutes(first?.opensAt ?? null), key).toBeLessThan(minutes(first?.shutsAt ?? null))
    }
  })
})
