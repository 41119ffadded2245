import { describe, expect, it } from 'vitest'
import { ragsFirstMs } from '~~/server/reminders/causes'
import { saturationPressure, wetBulb } from '#shared/air/psychrometrics'
import { driverRate } from '#shared/drying/rates'
import { findCaution } from '#shared/library/cautions'
import { findLibraryMaterial, libraryMaterials, librarySchedules } from '#shared/library/index'
import { systemRulesFor } from '#shared/library/systems'
import { dryingMaterial } from '#shared/library/types'
import type { LibraryMaterial } from '#shared/library/types'
import { limitsOf } from '#shared/verdict/limits'
import type { Film } from '#shared/verdict/types'
import { startAdviceText } from '#shared/words/advice-start'
import { at, coatAt, hourMs, minuteMs, predictIn, steadyRoom } from '../helpers/drying'

const start = at('2026-03-10T09:00:00Z')
const material = (key: string): LibraryMaterial => {
  const found = findLibraryMaterial(key)
  if (!found) throw new Error(`no starter material ${key}`)
  return found
}
const handTest = (key: string, rung: string) => material(key).milestones.find(each => each.name === rung)?.handTest ?? ''
/** Minutes to the middle of a rung in a steady room. */
function minutesIn(key: string, rung: string, tempC: number, rh: number, airSpeed = 0.1): number {
  const found = predictIn(steadyRoom(tempC, rh, start), dryingMaterial(material(key)), coatAt(start, { airSpeed })).milestones.find(each => each.name === rung)
  return found?.likelyAt === null || !found ? Infinity : (found.likelyAt - start) / minuteMs
}

describe('rules between coats', () => {
  it('C7: acrylic paint on gesso when it no longer lifts, overnight preferred (Golden, Just Paint, "Suggested Drying Times")', () => {
    for (const paint of ['heavy-body-acrylic', 'craft-acrylic']) {
      const [rule] = systemRulesFor('acrylic-gesso', paint)
      expect(rule?.minMin, paint).toBe(60)
      expect(rule?.recommendedMin, paint).toBeGreaterThanOrEqual(8 * 60)
    }
    // Wherever the library's own schedules paint on gesso, the gesso is at least ready for it.
    const allowed = ['ready-to-recoat', 'dry-to-handle', 'dry-to-sand-lightly', 'dry-to-sand-flat', 'cured', null]
    for (const { steps, links } of librarySchedules) {
      const gesso = steps.filter(step => step.material === 'acrylic-gesso').map(step => step.key)
      const paint = steps.filter(step => ['heavy-body-acrylic', 'craft-acrylic'].includes(step.material ?? '')).map(step => step.key)
      for (const link of links.filter(one => gesso.includes(one.from) && paint.includes(one.to))) expect(allowed).toContain(link.milestone)
    }
  })
})

describe('fire', () => {
  it('C19: rags take fire 5 to 10 h after use, so they are asked for long before (Arcata fire chief, Times-Standard 2009)', () => {
    expect(ragsFirstMs).toBeLessThanOrEqual(hourMs)
    expect(5 * hourMs / ragsFirstMs).toBeGreaterThanOrEqual(5)
  })

  it('C20: flat in one layer outdoors, or in a lidded metal can of water, never wadded, the sander bag too (Cleveland Heights fire department; NFPA in Harvard GSD)', () => {
    const text = findCaution('oily rags')?.text ?? ''
    for (const word of [/one layer outdoors/, /under water in a metal can with a lid/, /Never ball, bag or bin/, /sander bag/]) expect(text).toMatch(word)
    for (const oil of libraryMaterials.filter(each => each.dryingOil)) expect(oil.cautions, oil.key).toContain('oily rags')
  })
})

describe('handling', () => {
  const moment = (hours: number) => ({ likelyAt: start + hours * hourMs, p90At: start + hours * hourMs, p98At: start + hours * hourMs, reachedAt: null, reason: null })
  const film = (hard: number, cured: number): Film => ({ coatId: 1, material: 'varnish', kind: 'coat', mustLieLevel: false, gloves: false, hold: null, doubt: null, touch: moment(1), handle: moment(4), tackFree: moment(3), hard: moment(hard), cured: moment(cured), strength: null })

  it('C21: nothing is stacked before it is hard nor wrapped before it is cured, and packing asks two days at least, never finish to finish (Bryze, "Pack & Stack")', () => {
    expect(limitsOf([film(24, 30 * 24)], start + 5 * hourMs).map(each => [each.kind, (each.until! - start) / hourMs])).toEqual([['stack', 24], ['wrap', 30 * 24], ['glaze', 30 * 24]])
    expect(startAdviceText({ code: 'pack-early', when: 'Thu 14:00' })).toMatch(/two days at least, longer in damp air, and never finish to finish/)
    // Full cure about 30 days: the oil-modified varnish of the library.
    const cured = material('oil-polyurethane').milestones.find(each => each.name === 'cured')
    expect(cured?.typical).toBe(30 * 1440)
  })

  it('C24: a fan only after tack-free, half an hour to an hour (Basic Coatings)', () => {
    const codes = (minutes: number) => predictIn(steadyRoom(21, 0.5, start), dryingMaterial(material('water-polyurethane')), coatAt(start, { airSpeed: 1 }), start + minutes * minuteMs).advice.map(each => each.code)
    expect(codes(5)).toContain('fan-early')
    expect(codes(12 * 60)).not.toContain('fan-early')
    const tackFree = material('water-polyurethane').milestones.find(each => each.name === 'tack-free')
    expect(tackFree && [tackFree.low <= 60, tackFree.high >= 30]).toEqual([true, true])
  })

  it('C30: what a hand is told to feel for', () => {
    // Water-based, General Finishes: no longer cool to the touch and sands to powder. Oil-based: no tack and no smell. Waterlox: tissue pressed leaves no fibres.
    expect(handTest('water-polyurethane', 'ready-to-recoat')).toMatch(/Not cool to the touch.*dry powder/)
    for (const key of ['oil-polyurethane', 'wiping-varnish', 'alkyd-enamel', 'oil-primer', 'spray-enamel']) expect(handTest(key, 'ready-to-recoat'), key).toMatch(/No tack, no smell/)
    for (const m of libraryMaterials) for (const rung of m.milestones.filter(each => each.name === 'tack-free')) expect(rung.handTest, m.key).toMatch(/tissue pressed on it leaves no fibres/)
    // Every water-based film that waits for the next coat says cool or shine; none of them asks for a smell that water has not got.
    for (const m of libraryMaterials.filter(each => each.solvent === 'water' && each.film === 'open')) {
      for (const rung of m.milestones.filter(each => each.name === 'ready-to-recoat')) expect(rung.handTest, m.key).toMatch(/cool|shine/i)
    }
  })
})

describe('physics', () => {
  it('C25: water-based films are later in damp, sooner in warmth and moving air; what cures from moisture is sooner with more water in the air', () => {
    for (const m of libraryMaterials.filter(each => each.milestones[0]?.driver === 'water')) {
      const rung = m.milestones[0]!.name
      expect(minutesIn(m.key, rung, 20, 0.6), m.key).toBeGreaterThan(minutesIn(m.key, rung, 20, 0.4))
      expect(minutesIn(m.key, rung, 18, 0.5), m.key).toBeGreaterThan(minutesIn(m.key, rung, 24, 0.5))
      expect(minutesIn(m.key, rung, 20, 0.5, 1), m.key).toBeLessThan(minutesIn(m.key, rung, 20, 0.5))
    }
    for (const key of ['polyurethane-glue', 'cyanoacrylate']) {
      const rung = material(key).milestones.find(each => each.driver === 'moisture')!.name
      expect(minutesIn(key, rung, 20, 0.6), key).toBeLessThan(minutesIn(key, rung, 20, 0.4))
    }
  })

  it('C25: at or over its ceiling nothing is promised, under its minimum neither', () => {
    for (const m of libraryMaterials.filter(each => each.milestones[0]?.driver === 'water' && each.minTempC !== null)) {
      const first = (tempC: number, rh: number) => predictIn(steadyRoom(tempC, rh, start), dryingMaterial(m), coatAt(start)).milestones.find(each => each.name === 'dry-to-handle') ?? null
      expect(first(20, 0.97)?.p90At ?? null, m.key).toBeNull()
      expect(first(m.minTempC! - 2.5, 0.5)?.p90At ?? null, m.key).toBeNull()
    }
  })

  it('C26: at its own reference climate every rung of every material goes at exactly its sheet\'s speed', () => {
    for (const m of libraryMaterials) for (const { driver } of m.milestones) expect(driverRate(driver, m.reference, m.reference, m.minTempC), `${m.key} ${driver}`).toBe(1)
  })

  it('C28: an enamel sheet gives x2.0 at 10 C and x0.6 at 40 C, 50 % (Jotun, Fenomastic Pure Color Enamel Matt): both lie between the two physical limits', () => {
    const deficit = (tempC: number) => saturationPressure(tempC) * 0.5
    const depression = (tempC: number) => tempC - wetBulb(tempC, 0.5)
    const limits = (tempC: number) => [deficit(23) / deficit(tempC), depression(23) / depression(tempC)].sort((a, b) => a - b)
    // The table's own limits: 1.52 to 2.29 at 10 C, 0.38 to 0.70 at 40 C.
    for (const [tempC, factor, low, high] of [[10, 2, 1.52, 2.29], [40, 0.6, 0.38, 0.7]] as const) {
      const [from, to] = limits(tempC)
      expect(from!).toBeCloseTo(low, 1)
      expect(to!).toBeCloseTo(high, 1)
      expect(factor).toBeGreaterThan(from!)
      expect(factor).toBeLessThan(to!)
      const ours = 1 / driverRate('water', { tempC, rh: 0.5 }, { tempC: 23, rh: 0.5 })
      expect(ours).toBeGreaterThan(from!)
      expect(ours).toBeLessThan(to!)
    }
  })
})
