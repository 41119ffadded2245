import { describe, expect, it } from 'vitest'
import { libraryMaterials } from '#shared/library/index'
import { dryingMaterial } from '#shared/library/types'
import type { RoomClock } from '#shared/drying/clock'
import { roomClock } from '#shared/drying/clock'
import { prepareMaterial } from '#shared/drying/material'
import { predictCoat } from '#shared/drying/predict'
import type { CoatPrediction, DryingMaterial } from '#shared/drying/types'
import { at, coatAt, minuteMs, steadyRoom, tools } from '../../helpers/drying'

/**
 * Every starter material in every steady climate from -5 to 40 C and 5 to 100 % RH. An answer is silly when
 * - a time is not a number, lies before the coat, or likely, give-till and 98 % are out of order on a rung or up the ladder;
 * - a time is missing without a reason, or a reason stands beside a give-till;
 * - something is promised that the sheet forbids: a film that fuses under its minimum, one that loses water at or over its ceiling;
 * - in a room that people work in (15 to 28 C, 35 to 65 %) the likely time is off the sheet's typical by more than 4 times (cures of over half the 400 days aside: those may end in "never");
 * - a window shuts before it opens, though the sheet leaves it open for over a factor of 2.5 (the doubt of both ends with day-old air is exp(2 x 1.2816 x 0.354) = 2.48);
 * - warmer air makes any film but a gelling one later, or damper air one that gives water off earlier, by more than a minute in a thousand.
 */
const now = at('2026-06-01T08:00:00Z')
const temps = [-5, 0, 5, 10, 15, 20, 25, 30, 35, 40]
const humidities = [0.05, 0.2, 0.35, 0.5, 0.65, 0.8, 0.9, 0.95, 1]
const clocks = new Map<string, RoomClock>(temps.flatMap(tempC => humidities.map(rh => [`${tempC} ${rh}`, roomClock(steadyRoom(tempC, rh, now), now, tools)] as const)))

function sillyTimes({ milestones }: CoatPrediction): string[] {
  const found: string[] = []
  let likely = now
  let p90 = now
  for (const m of milestones) {
    if ([m.likelyAt, m.p90At, m.p98At].some(t => t !== null && !(t >= now))) found.push(`${m.name}: before the coat`)
    if (m.likelyAt === null ? m.reason !== 'never' : m.likelyAt < likely) found.push(`${m.name}: likely`)
    if ((m.p90At === null) !== (m.reason !== null)) found.push(`${m.name}: a time or a reason`)
    if (m.p90At !== null && (m.p90At < Math.max(p90, m.likelyAt!) || (m.p98At !== null && m.p98At < m.p90At))) found.push(`${m.name}: order of chances`)
    likely = m.likelyAt ?? likely
    p90 = m.p90At ?? p90
  }
  return found
}

function sillyPromises(material: DryingMaterial, tempC: number, rh: number, { milestones }: CoatPrediction): string[] {
  const first = milestones[0]!
  const fuses = material.milestones.some(r => r.name === first.name && ['water', 'joint', 'coalescence'].includes(r.driver))
  const wet = material.milestones.some(r => r.name === first.name && ['water', 'joint'].includes(r.driver))
  const found: string[] = []
  if (fuses && material.minTempC !== null && tempC < material.minTempC && first.p90At !== null) found.push(`${first.name}: promised under the minimum`)
  const ceiling = Math.min(material.maxRh ?? 0.92, 0.92)
  // A rung shorter than the half hour that counts as damp may still be given.
  if (wet && rh >= ceiling && (first.likelyAt ?? Infinity) - now > 30 * minuteMs && first.p90At !== null) found.push(`${first.name}: promised over the ceiling`)
  if (tempC >= 15 && tempC <= 28 && rh >= 0.35 && rh <= 0.65 && tempC >= (material.minTempC ?? -Infinity)) {
    for (const m of milestones) {
      const { typical } = material.milestones.find(r => r.name === m.name)!
      const factor = ((m.likelyAt ?? Infinity) - now) / minuteMs / typical
      if (typical < 200 * 1440 && !(factor > 0.25 && factor < 4)) found.push(`${m.name}: ${factor.toFixed(2)} of the sheet`)
    }
  }
  return found
}

function sillyWindows(material: DryingMaterial, { windows }: CoatPrediction): string[] {
  return windows.flatMap(({ opensAt, shutsAt }, i) => {
    const [from, to] = material.windows[i]!
    const roomy = from === null || to === null || to > 2.5 * from
    return roomy && opensAt !== null && shutsAt !== null && shutsAt < opensAt ? [`window ${i} shuts before it opens`] : []
  })
}

const later = (one: number | null, other: number | null) => (one ?? Infinity) - now > ((other ?? Infinity) - now) * 1.001 + minuteMs

describe('every starter material in every climate', () => {
  it.each(libraryMaterials.map(m => [m.key, dryingMaterial(m)] as const))('%s gives no silly answer', (_, material) => {
    const prepared = prepareMaterial(material, tools)
    const coat = coatAt(now)
    const said = new Map<string, CoatPrediction>(temps.flatMap(tempC => humidities.map(rh => [`${tempC} ${rh}`, predictCoat(prepared, coat, [{ clock: clocks.get(`${tempC} ${rh}`)!, fromAt: now, toAt: null }], { now })] as const)))
    const silly: string[] = []
    const rungs = prepared.rungs.map(r => r.driver)
    for (const [t, tempC] of temps.entries()) {
      for (const [h, rh] of humidities.entries()) {
        const here = said.get(`${tempC} ${rh}`)!
        silly.push(...[...sillyTimes(here), ...sillyPromises(material, tempC, rh, here), ...sillyWindows(material, here)].map(s => `${tempC} C ${rh}: ${s}`))
        const warmer = said.get(`${temps[t + 1]} ${rh}`)
        const damper = said.get(`${tempC} ${humidities[h + 1]}`)
        for (const [k, m] of here.milestones.entries()) {
          if (warmer && !rungs.slice(0, k + 1).includes('gel') && later(warmer.milestones[k]!.likelyAt, m.likelyAt)) silly.push(`${tempC} C ${rh}: ${m.name} later when warmer`)
          if (damper && rungs.slice(0, k + 1).every(d => ['water', 'joint', 'oxidation'].includes(d)) && later(m.likelyAt, damper.milestones[k]!.likelyAt)) silly.push(`${tempC} C ${rh}: ${m.name} earlier when damper`)
        }
      }
    }
    expect(silly).toEqual([])
  })
})
